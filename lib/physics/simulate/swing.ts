import { fullSteps } from "./outcome";
import type { Recording } from "./recording";

/** The strongest swing of the rotor about the mean of its lag. */
export interface Swing {
  /** Half of it, full steps. */
  readonly fullSteps: number;
  /** s from the start of the move. */
  readonly time: number;
  /** Shaft speed commanded then, rad/s. */
  readonly shaftSpeed: number;
  /** Hz, counted over some periods around that time; null where it is no swing but a single jerk. */
  readonly frequency: number | null;
}

/** Natural periods on each side over which the frequency is counted. */
const PERIODS_COUNTED = 3;
const LEAST_CROSSINGS = 3;

/**
 * The strongest swing in a recording up to a time (s): the lag less its mean over one natural period (of `frequency`,
 * Hz), its largest value, and how often it changes sign around there. Null where the recording is shorter than a period.
 */
export function strongestSwing(input: {
  readonly recording: Recording;
  readonly frequency: number;
  readonly until: number;
}): Swing | null {
  const { recording, frequency, until } = input;
  const count = recording.time.filter((time) => time <= until).length;
  const last = recording.time[count - 1];
  if (last === undefined || !(frequency > 0)) return null;
  const samplesPerPeriod = count / (last * frequency);
  const half = Math.max(1, Math.round(samplesPerPeriod / 2));
  const swing = lessItsMean(recording.lag.subarray(0, count), half);
  const place = largestPlace(swing);
  const size = swing[place];
  if (size === undefined) return null;
  const reach = Math.round(PERIODS_COUNTED * samplesPerPeriod);
  return {
    fullSteps: fullSteps(Math.abs(size)),
    time: recording.time[place + half] ?? 0,
    shaftSpeed: recording.commandedSpeed[place + half] ?? 0,
    frequency: crossingFrequency(swing.subarray(Math.max(0, place - reach), place + reach), last / count),
  };
}

/** Values less their mean over `half` neighbours on each side; those without enough neighbours are left out. */
function lessItsMean(values: Float32Array, half: number): Float64Array {
  const width = 2 * half + 1;
  const rest = new Float64Array(Math.max(0, values.length - width + 1));
  let sum = values.subarray(0, width).reduce((total, value) => total + value, 0);
  for (let place = 0; place < rest.length; place += 1) {
    rest[place] = (values[place + half] ?? 0) - sum / width;
    sum += (values[place + width] ?? 0) - (values[place] ?? 0);
  }
  return rest;
}

function largestPlace(values: Float64Array): number {
  return values.reduce(
    (best, value, place) => (Math.abs(value) > Math.abs(values[best] ?? 0) ? place : best),
    0,
  );
}

/** Hz, from the first to the last change of sign; values `interval` seconds apart. */
function crossingFrequency(values: Float64Array, interval: number): number | null {
  const crossings = [...values.keys()].filter(
    (place) => place > 0 && (values[place] ?? 0) < 0 !== (values[place - 1] ?? 0) < 0,
  );
  const first = crossings[0];
  const last = crossings.at(-1);
  if (first === undefined || last === undefined || crossings.length < LEAST_CROSSINGS) return null;
  return (crossings.length - 1) / (2 * (last - first) * interval);
}
