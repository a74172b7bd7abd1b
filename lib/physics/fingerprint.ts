import { windingSteadyState } from "./motor-heat";
import { PROBE_UNCERTAINTY } from "./thermal-fit";

/** Single explanations of a motor that is warmer or cooler than predicted. */
export const EXPLANATIONS = [
  "as_predicted",
  "peak_for_rms",
  "hold_current",
  "sense_resistor",
  "other_winding",
  "less_airflow",
] as const;
export type Explanation = (typeof EXPLANATIONS)[number];

/** What can be measured to tell explanations apart. */
export const TELLING_MEASUREMENTS = ["winding_current", "cold_resistance", "winding", "case"] as const;
export type TellingMeasurement = (typeof TELLING_MEASUREMENTS)[number];

export interface PredictedHeat {
  /** A rms in one winding. */
  readonly current: number;
  /** A rms that the driver falls back to at standstill; null where not known. */
  readonly holdCurrent: number | null;
  /** Ω of one winding at 20 °C. */
  readonly resistanceAt20: number;
  /** K/W, winding to ambient. */
  readonly windingResistance: number;
  /** K/W, case to ambient; null where not known. */
  readonly caseResistance: number | null;
  /** Standard uncertainty of these thermal resistances together, share of 1. */
  readonly spread: number;
}

export interface HeatMeasurement {
  readonly place: "winding" | "case";
  readonly celsius: number;
  /** Air around the motor, °C. */
  readonly ambient: number;
}

/** Mean and standard deviation; A, Ω or °C. */
export interface Expected {
  readonly mean: number;
  readonly deviation: number;
}

export interface ExplanationOdds {
  readonly explanation: Explanation;
  /** Probability, share of 1; those of all explanations add up to 1. */
  readonly odds: number;
  /** Factor on the current, the winding's resistance or the path from case to air that fits best. */
  readonly factor: number;
}

export interface Fingerprint {
  /** The likeliest first. */
  readonly explanations: readonly ExplanationOdds[];
  /** The one measurement that is expected to tell the most, with what each explanation expects of it. */
  readonly telling: {
    readonly measurement: TellingMeasurement;
    readonly expected: readonly (Expected & { readonly explanation: Explanation })[];
  } | null;
}

/** One way in which an explanation may be true, with its share of the prior. */
interface State {
  readonly prior: number;
  readonly factor: number;
  readonly current: number;
  readonly resistance: number;
  readonly winding: number;
  readonly case: number | null;
}

interface Weighed {
  readonly explanation: Explanation;
  readonly odds: number;
  /** Share of each state in its explanation, given the measurements. */
  readonly states: readonly { readonly state: State; readonly share: number }[];
}

/** Another winding: resistance 1.5 to 4 times, up or down. Less airflow: 1.2 to 3 times. Design choices, no source. */
const WINDING_RANGE = [1.5, 4] as const;
const AIRFLOW_RANGE = [1.2, 3] as const;
const FACTOR_STEPS = 24;
const NUISANCE_STEPS = 31;
const NUISANCE_REACH = 3;
/** Shares of 1: a clamp or shunt ammeter with the driver's own ±5 %; catalog resistance ±10 % with the meter. */
const CURRENT_SPREAD = 0.06;
const RESISTANCE_SPREAD = 0.06;

/**
 * Which single explanation fits measured temperatures best, with odds by Bayes' rule. Prior: all are equally likely.
 * Likelihood: each temperature is normal about the steady state of `windingSteadyState` with the probe's 2.2 K; that the
 * catalog's thermal resistances are only good to `spread` is one log-normal factor common to all temperatures of a
 * motor, integrated out on a grid. Explanations: peak taken for rms changes the current by √2 and the copper loss by 2,
 * standing on hold current makes it the hold current (left out where that is not known or is the run current),
 * a sense resistor off by two changes the current by 2 and the loss by 4, each up or down with equal share; another
 * winding has a resistance 1.5 to 4 times as great or small, less airflow a path from case to air 1.2 to 3 times as
 * resistive, each log-uniform. A vaguer explanation thus pays for its freedom.
 * Temperatures °C, settled, standing on run current. Source: Bayes' rule; ranges are design choices, no source.
 */
export function faultFingerprint(
  predicted: PredictedHeat,
  measurements: readonly HeatMeasurement[],
): Fingerprint {
  const likelihoods = explanationsOf(predicted).map((explanation) => {
    const states = statesOf(explanation, predicted);
    const logs = states.map((state) => Math.log(state.prior) + logLikelihood(state, measurements));
    return { explanation, states, logs, log: logSum(logs) };
  });
  const total = logSum(likelihoods.map(({ log }) => log));
  const weighed = likelihoods.map(({ explanation, states, logs, log }): Weighed => ({
    explanation,
    odds: Math.exp(log - total),
    states: states.map((state, index) => ({ state, share: Math.exp((logs[index] ?? 0) - log) })),
  }));
  const explanations = weighed.map(({ explanation, odds, states }) => ({
    explanation,
    odds,
    factor: Math.exp(
      states.reduce((sum, { state, share }) => sum + (share > 0 ? share * Math.log(state.factor) : 0), 0),
    ),
  }));
  return {
    explanations: [...explanations].sort((one, other) => other.odds - one.odds),
    telling: mostTelling(weighed, measurements),
  };
}

function explanationsOf({ current, holdCurrent }: PredictedHeat): readonly Explanation[] {
  const differs = current > 0 && holdCurrent !== null && holdCurrent !== current;
  return differs ? EXPLANATIONS : EXPLANATIONS.filter((explanation) => explanation !== "hold_current");
}

function logSum(logs: readonly number[]): number {
  const greatest = Math.max(...logs);
  return greatest + Math.log(logs.reduce((sum, one) => sum + Math.exp(one - greatest), 0));
}

/** Factors of an explanation with their shares. */
function factorsOf(
  explanation: Explanation,
  { current, holdCurrent }: PredictedHeat,
): readonly { readonly factor: number; readonly share: number }[] {
  const either = (factor: number) => [
    { factor, share: 0.5 },
    { factor: 1 / factor, share: 0.5 },
  ];
  switch (explanation) {
    case "as_predicted":
      return [{ factor: 1, share: 1 }];
    case "peak_for_rms":
      return either(Math.SQRT2);
    case "hold_current":
      return [{ factor: (holdCurrent ?? current) / current, share: 1 }];
    case "sense_resistor":
      return either(2);
    case "other_winding":
      return spread(WINDING_RANGE).flatMap((factor) =>
        either(factor).map((one) => ({ ...one, share: one.share / FACTOR_STEPS })),
      );
    case "less_airflow":
      return spread(AIRFLOW_RANGE).map((factor) => ({ factor, share: 1 / FACTOR_STEPS }));
  }
}

/** Factors evenly apart in their logarithm, each in the middle of its step. */
function spread([from, to]: readonly [number, number]): number[] {
  const step = Math.log(to / from) / FACTOR_STEPS;
  return Array.from({ length: FACTOR_STEPS }, (_, index) => from * Math.exp((index + 0.5) * step));
}

function statesOf(explanation: Explanation, predicted: PredictedHeat): State[] {
  const nuisances = nuisanceGrid(predicted.spread);
  return factorsOf(explanation, predicted).flatMap(({ factor, share }) =>
    nuisances.map(({ scale, share: of }) => ({
      ...stateAt(explanation, { predicted, factor, scale }),
      prior: share * of,
      factor,
    })),
  );
}

/** A log-normal factor on a grid of its standard deviations, with normal shares that add up to 1. */
function nuisanceGrid(deviation: number): readonly { readonly scale: number; readonly share: number }[] {
  const places = Array.from(
    { length: NUISANCE_STEPS },
    (_, index) => NUISANCE_REACH * ((2 * index) / (NUISANCE_STEPS - 1) - 1),
  );
  const weights = places.map((place) => Math.exp(-(place ** 2) / 2));
  const total = weights.reduce((sum, one) => sum + one, 0);
  return places.map((place, index) => ({
    scale: Math.exp(deviation * place),
    share: (weights[index] ?? 0) / total,
  }));
}

const OF_CURRENT: readonly Explanation[] = ["peak_for_rms", "hold_current", "sense_resistor"];

interface At {
  readonly predicted: PredictedHeat;
  readonly factor: number;
  /** On all thermal resistances. */
  readonly scale: number;
}

function stateAt(
  explanation: Explanation,
  { predicted, factor, scale }: At,
): Omit<State, "prior" | "factor"> {
  const ofCurrent = OF_CURRENT.includes(explanation);
  const air = explanation === "less_airflow" ? factor : 1;
  const { caseResistance } = predicted;
  // Only the path from the case to the air changes; that from the winding to the case is inside the motor.
  const winding =
    caseResistance === null
      ? predicted.windingResistance * air
      : predicted.windingResistance + caseResistance * (air - 1);
  return {
    current: predicted.current * (ofCurrent ? factor : 1),
    resistance: predicted.resistanceAt20 * (explanation === "other_winding" ? factor : 1),
    winding: winding * scale,
    case: caseResistance === null ? null : caseResistance * air * scale,
  };
}

/** Temperature of a place, °C; null where the motor never settles or the place cannot be reckoned. */
function temperatureAt(state: State, { place, ambient }: Omit<HeatMeasurement, "celsius">): number | null {
  const settled = windingSteadyState({
    current: state.current,
    resistanceAt20: state.resistance,
    thermalResistance: state.winding,
    ambient,
  });
  if (settled === null) return null;
  if (place === "winding") return settled.temperature;
  return state.case === null ? null : ambient + state.case * settled.power;
}

function logLikelihood(state: State, measurements: readonly HeatMeasurement[]): number {
  return measurements.reduce((sum, measured) => {
    const expected = temperatureAt(state, measured);
    if (expected === null) return -Infinity;
    return sum - ((measured.celsius - expected) / PROBE_UNCERTAINTY) ** 2 / 2;
  }, 0);
}

function mostTelling(
  weighed: readonly Weighed[],
  measurements: readonly HeatMeasurement[],
): Fingerprint["telling"] {
  const ambient = measurements[0]?.ambient;
  if (ambient === undefined) return null;
  const measured = new Set<string>(measurements.map(({ place }) => place));
  const offers = TELLING_MEASUREMENTS.filter((one) => !measured.has(one)).flatMap((measurement) => {
    const expected = weighed.flatMap((one) => expectedOf(one, measurement, ambient) ?? []);
    return expected.length === weighed.length ? [{ measurement, expected }] : [];
  });
  const scored = offers.map((offer) => ({ ...offer, score: separation(weighed, offer.expected) }));
  const [best] = scored.sort((one, other) => other.score - one.score);
  if (!best) return null;
  const expected = weighed.flatMap(({ explanation }, index) => {
    const own = best.expected[index];
    return own ? [{ explanation, ...own }] : [];
  });
  return { measurement: best.measurement, expected };
}

/** What an explanation expects of a measurement; null where it cannot be reckoned in any of its states. */
function expectedOf({ states }: Weighed, measurement: TellingMeasurement, ambient: number): Expected | null {
  const values = states.flatMap(({ state, share }) => {
    const value = valueOf(state, measurement, ambient);
    return value === null ? [] : [{ value, share }];
  });
  const total = values.reduce((sum, { share }) => sum + share, 0);
  if (!(total > 0)) return null;
  const mean = values.reduce((sum, { value, share }) => sum + share * value, 0) / total;
  const variance = values.reduce((sum, { value, share }) => sum + share * (value - mean) ** 2, 0) / total;
  const noise =
    measurement === "winding_current"
      ? CURRENT_SPREAD * mean
      : measurement === "cold_resistance"
        ? RESISTANCE_SPREAD * mean
        : PROBE_UNCERTAINTY;
  return { mean, deviation: Math.hypot(Math.sqrt(variance), noise) };
}

function valueOf(state: State, measurement: TellingMeasurement, ambient: number): number | null {
  if (measurement === "winding_current") return state.current;
  if (measurement === "cold_resistance") return state.resistance;
  return temperatureAt(state, { place: measurement, ambient });
}

/** Σ of p·q·(1 − Bhattacharyya coefficient) over pairs of explanations: 0 where the measurement tells nothing apart. */
function separation(weighed: readonly Weighed[], expected: readonly Expected[]): number {
  let score = 0;
  weighed.forEach((one, index) =>
    weighed.slice(index + 1).forEach((other, offset) => {
      const [a, b] = [expected[index], expected[index + 1 + offset]];
      if (a && b) score += one.odds * other.odds * (1 - overlap(a, b));
    }),
  );
  return score;
}

/** Bhattacharyya coefficient of two normal distributions. */
function overlap(a: Expected, b: Expected): number {
  const variance = a.deviation ** 2 + b.deviation ** 2;
  return (
    Math.sqrt((2 * a.deviation * b.deviation) / variance) *
    Math.exp(-((a.mean - b.mean) ** 2) / (4 * variance))
  );
}
