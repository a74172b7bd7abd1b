import { fullSteps } from "@/lib/physics/simulate/outcome";
import type { Recording } from "@/lib/physics/simulate/recording";

/** Lowest and highest value in a stretch of time. */
export interface Span {
  readonly low: number;
  readonly high: number;
}

/** One stretch of the move, as drawn and as listed. Speeds in m/s (rad/s on a rotary axis). */
export interface MoveMoment {
  /** s, middle of the stretch. */
  readonly time: number;
  readonly commandedSpeed: number;
  readonly speed: Span;
  /** Full steps of the rotor behind the command. */
  readonly lag: Span;
  /** Highest current in either phase, A. */
  readonly current: number;
}

/** Currents at one instant. */
export interface CurrentMoment {
  /** s */
  readonly time: number;
  /** A */
  readonly a: number;
  readonly b: number;
}

/** Stretches in which a move is drawn: about one for two pixels. */
const STRETCHES = 360;

/** A recording in at most 360 stretches of equally many samples; `radius` is travel for one radian of the motor. */
export function moveMoments(recording: Recording, radius: number): MoveMoment[] {
  const { time, commandedSpeed, speed, lag, currentA, currentB } = recording;
  const width = Math.max(1, Math.ceil(time.length / STRETCHES));
  return Array.from({ length: Math.ceil(time.length / width) }, (_, index) => {
    const cut = (values: Float32Array): Float32Array => values.subarray(index * width, (index + 1) * width);
    const middle = cut(time).length >> 1;
    return {
      time: cut(time)[middle] ?? 0,
      commandedSpeed: (cut(commandedSpeed)[middle] ?? 0) * radius,
      speed: spanOf(cut(speed), radius),
      lag: spanOf(cut(lag), fullSteps(1)),
      current: Math.max(highest(cut(currentA)), highest(cut(currentB))),
    };
  });
}

/** Samples of the currents between two times, s; at most some hundred, evenly thinned. */
export function currentMoments(recording: Recording, from: number, to: number): CurrentMoment[] {
  const places = [...recording.time.keys()].filter((place) => {
    const time = recording.time[place] ?? 0;
    return time >= from && time <= to;
  });
  const thin = Math.max(1, Math.ceil(places.length / STRETCHES));
  return places
    .filter((_, index) => index % thin === 0)
    .map((place) => ({
      time: recording.time[place] ?? 0,
      a: recording.currentA[place] ?? 0,
      b: recording.currentB[place] ?? 0,
    }));
}

function spanOf(values: Float32Array, factor: number): Span {
  let low = Infinity;
  let high = -Infinity;
  for (const value of values) {
    if (value < low) low = value;
    if (value > high) high = value;
  }
  return { low: low * factor, high: high * factor };
}

function highest(values: Float32Array): number {
  return values.reduce((most, value) => Math.max(most, Math.abs(value)), 0);
}
