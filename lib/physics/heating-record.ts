/** One reading of a heating record. */
export interface HeatReading {
  /** s from the start of the record. */
  readonly time: number;
  /** °C */
  readonly temperature: number;
}

/** What a short heating record says of the steady state, or why it says nothing. */
export type SteadyForecast =
  | {
      readonly ok: true;
      /** °C, with the ends of its 95 % interval. */
      readonly settled: number;
      readonly low: number;
      readonly high: number;
      /** s */
      readonly timeConstant: number;
      /** K, standard deviation about the fitted curve. */
      readonly scatter: number;
    }
  | { readonly ok: false; readonly because: "too_few" | "too_short" | "too_straight" };

/** Readings that a fit of three constants needs. */
const LEAST_READINGS = 3;
/** Span of the record over its time constant below which the steady state is a guess. */
const LEAST_SPAN = 0.7;
/** Bend of the curve over the sensor's noise below which a straight line fits as well. */
const LEAST_BEND = 4;

/**
 * Steady temperature from a short record: least squares of T(t) = T∞ − (T∞ − T0)·e^(−t/τ), times in s, temperatures in
 * °C, `noise` the sensor's standard deviation in K. Three evenly spaced readings give T2 + d1·d2/(d1 − d2) exactly.
 * Refused: fewer than three readings, a span below 0.7·τ, or a bend d1 − d2 (of the fitted halves) below four times
 * the noise. The 95 % interval is linearised, with the greater of scatter and noise. The case lags the winding: a record
 * of the case forecasts the case only. Source: first-order heating (derived); τ is 10 to 40 min (common practice).
 */
export function steadyFromRecord(readings: readonly HeatReading[], noise: number): SteadyForecast {
  const sorted = [...readings].sort((one, other) => one.time - other.time);
  const [first, last] = [sorted[0], sorted.at(-1)];
  if (first === undefined || last === undefined || distinctTimes(sorted) < LEAST_READINGS)
    return { ok: false, because: "too_few" };
  const span = last.time - first.time;
  const points = sorted.map(({ time, temperature }) => ({ time: (time - first.time) / span, temperature }));
  const tau = bestTimeConstant(points);
  const fit = fitAt(points, tau);
  const at = (time: number) => fit.settled + fit.amplitude * Math.exp(-time / tau);
  const bend = Math.abs(at(0.5) - at(0) - (at(1) - at(0.5)));
  if (!(bend >= LEAST_BEND * noise) || bend === 0) return { ok: false, because: "too_straight" };
  if (1 < LEAST_SPAN * tau) return { ok: false, because: "too_short" };
  return forecast({ points, tau, fit, span, noise });
}

function distinctTimes(readings: readonly HeatReading[]): number {
  return new Set(readings.map(({ time }) => time)).size;
}

interface Fit {
  /** °C */
  readonly settled: number;
  /** K, negative while heating. */
  readonly amplitude: number;
  /** K² */
  readonly squares: number;
}

/** Straight least squares of the two constants that are left once τ (in spans) is chosen. */
function fitAt(points: readonly HeatReading[], tau: number): Fit {
  const n = points.length;
  const shape = points.map(({ time }) => Math.exp(-time / tau));
  const meanShape = shape.reduce((sum, x) => sum + x, 0) / n;
  const meanHeat = points.reduce((sum, { temperature }) => sum + temperature, 0) / n;
  let [cross, square] = [0, 0];
  points.forEach(({ temperature }, index) => {
    const x = (shape[index] ?? 0) - meanShape;
    cross += x * (temperature - meanHeat);
    square += x * x;
  });
  const amplitude = square === 0 ? 0 : cross / square;
  const settled = meanHeat - amplitude * meanShape;
  const squares = points.reduce(
    (sum, { temperature }, index) => sum + (temperature - settled - amplitude * (shape[index] ?? 0)) ** 2,
    0,
  );
  return { settled, amplitude, squares };
}

/** τ in spans between 0.02 and 50 with the least squares: a scan, then a golden section about its best place. */
function bestTimeConstant(points: readonly HeatReading[]): number {
  const steps = 120;
  const at = (index: number) => 0.02 * 2500 ** (index / steps);
  let best = 0;
  for (let index = 1; index <= steps; index++)
    if (fitAt(points, at(index)).squares < fitAt(points, at(best)).squares) best = index;
  let [low, high] = [Math.max(0, best - 1), Math.min(steps, best + 1)];
  const share = (Math.sqrt(5) - 1) / 2;
  for (let round = 0; round < 60; round++) {
    const [one, other] = [high - share * (high - low), low + share * (high - low)];
    if (fitAt(points, at(one)).squares < fitAt(points, at(other)).squares) high = other;
    else low = one;
  }
  return at((low + high) / 2);
}

function forecast(input: {
  readonly points: readonly HeatReading[];
  readonly tau: number;
  readonly fit: Fit;
  readonly span: number;
  readonly noise: number;
}): SteadyForecast {
  const { points, tau, fit, span, noise } = input;
  const freedom = points.length - 3;
  const scatter = freedom > 0 ? Math.sqrt(fit.squares / freedom) : 0;
  const deviation = Math.max(scatter, noise);
  const factor = noise >= scatter || freedom === 0 ? 1.96 : studentFactor(freedom);
  const half = factor * deviation * Math.sqrt(settledVariance(points, tau, fit.amplitude));
  return {
    ok: true,
    settled: fit.settled,
    low: fit.settled - half,
    high: fit.settled + half,
    timeConstant: tau * span,
    scatter,
  };
}

/** First entry of (JᵀJ)⁻¹ with J = [1, e^(−t/τ), A·t/τ²·e^(−t/τ)]: the variance of T∞ for unit scatter. */
function settledVariance(points: readonly HeatReading[], tau: number, amplitude: number): number {
  let [a, b, c, d, e, f] = [0, 0, 0, 0, 0, 0];
  for (const { time } of points) {
    const x = Math.exp(-time / tau);
    const y = ((amplitude * time) / tau ** 2) * x;
    a += 1;
    b += x;
    c += y;
    d += x * x;
    e += x * y;
    f += y * y;
  }
  const minor = d * f - e * e;
  const determinant = a * minor - b * (b * f - c * e) + c * (b * e - c * d);
  return determinant > 0 ? minor / determinant : Infinity;
}

const STUDENT = [12.71, 4.3, 3.18, 2.78, 2.57, 2.45, 2.36, 2.31, 2.26, 2.23];

/** 97.5 % point of Student's distribution; beyond ten degrees of freedom 1.96 + 2.5/n, within 0.01. */
function studentFactor(freedom: number): number {
  return STUDENT[freedom - 1] ?? 1.96 + 2.5 / freedom;
}
