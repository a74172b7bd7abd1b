import { SAMPLE } from "./integrate";

/** What was recorded, one entry a sample; the first stands one sampling interval after the start. */
export interface Recording {
  /** s from the start of the move. */
  readonly time: Float32Array;
  /** rad/s of the motor's shaft, commanded and real. */
  readonly commandedSpeed: Float32Array;
  readonly speed: Float32Array;
  /** Angle of the rotor behind the command, electrical rad: 2π are four full steps. */
  readonly lag: Float32Array;
  /** A */
  readonly currentA: Float32Array;
  readonly currentB: Float32Array;
}

/** The samples of an integration, sorted by what they are. */
export function recordingOf(samples: Float32Array, count: number): Recording {
  const column = (offset: number): Float32Array =>
    Float32Array.from({ length: count }, (_, index) => samples[index * SAMPLE + offset] ?? 0);
  return {
    time: column(0),
    commandedSpeed: column(1),
    speed: column(2),
    lag: column(3),
    currentA: column(4),
    currentB: column(5),
  };
}
