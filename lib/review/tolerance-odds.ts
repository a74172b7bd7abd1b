import type { Assembly, AxisAssembly, Motor, SetPoint } from "@/lib/domain/assembly";
import type { LimitSense } from "@/lib/domain/findings";
import type { Level } from "@/lib/domain/levels";
import type { ParameterValue } from "@/lib/domain/values";
import { RULES } from "@/lib/rules/table";
import type { RuleInput, RuleVerdict } from "@/lib/rules/types";
import { ruleContext } from "@/lib/rules/view";
import { inRoom } from "./hottest-room";
import { seededRandom } from "./random";

/** Half widths: shares of 1, the ambient in K. */
export interface Spreads {
  /** Rated current and holding torque as the motor's label states them, each by itself. */
  readonly label: number;
  /** Winding resistance. */
  readonly resistance: number;
  /** Sense resistor. */
  readonly senseResistor: number;
  readonly supply: number;
  readonly ambientK: number;
}

/**
 * Winding resistance ±10 % as most data sheets print it, 1 % resistor series, supplies ±5 % as in the checks; label
 * ±10 % and room ±5 K are common practice, no source.
 */
export const USUAL_SPREADS: Spreads = {
  label: 0.1,
  resistance: 0.1,
  senseResistor: 0.01,
  supply: 0.05,
  ambientK: 5,
};

export interface OddsInput {
  readonly input: RuleInput;
  readonly axis: string;
  readonly spreads: Spreads;
  readonly samples: number;
  readonly seed: number;
}

export interface LimitOdds {
  readonly ruleId: string;
  /** Of the numbers as stated. */
  readonly level: Level;
  readonly value: number | null;
  readonly limit: number | null;
  readonly nearLimit: number | null;
  readonly limitSense: LimitSense;
  readonly unit: string;
  /** Share of the samples over the limit, with its standard error √(p(1 − p)/n). */
  readonly over: number;
  readonly standardError: number;
  /** Share near the limit or over it. */
  readonly nearOrOver: number;
  /** Between which 90 % of the values lie; null where a sample has no number, such as a motor that never settles. */
  readonly low: number | null;
  readonly high: number | null;
}

export interface OddsReport {
  readonly samples: number;
  /** The likeliest to be over first. */
  readonly limits: readonly LimitOdds[];
  /** Checks that cannot be made, with what they lack. */
  readonly cannot: readonly { readonly ruleId: string; readonly needs: readonly string[] }[];
}

/** What compares what the text says with itself or with the hardware's own data says nothing of a spread of these data. */
const BOOKKEEPING: readonly string[] = ["set-point", "steps-per-mm"];
const JUDGED = RULES.filter(({ id }) => !BOOKKEEPING.includes(id));
/** Samples between two reports of progress. */
const REPORT_EVERY = 50;

/**
 * The chance that each limit of one axis is crossed when its data are spread: `samples` draws, each datum rectangular
 * within its half width and independent of the others (JCGM 100:2008, 4.3.7), the same for the same seed. A sense
 * resistor that is greater makes the current smaller in proportion. The supply's own tolerance is taken out of the
 * samples, since it is drawn.
 */
export function toleranceOdds(
  asked: OddsInput,
  onProgress: (share: number) => void = () => undefined,
): OddsReport {
  const { input, axis, samples } = asked;
  const stated = verdictsOf(input, axis);
  const random = seededRandom(asked.seed);
  const counted = stated.flatMap(({ ruleId, verdict }) =>
    verdict.assessment.ok && verdict.assessment.limit !== null ? [newCount(ruleId, samples)] : [],
  );
  const byRule = new Map(counted.map((count) => [count.ruleId, count]));
  for (let index = 0; index < samples; index += 1) {
    const drawn = drawOne(asked, random);
    for (const { ruleId, verdict } of verdictsOf(drawn, axis)) {
      const count = byRule.get(ruleId);
      if (count) note(count, verdict, index);
    }
    if ((index + 1) % REPORT_EVERY === 0) onProgress((index + 1) / samples);
  }
  return {
    samples,
    limits: stated
      .flatMap(({ ruleId, verdict }) => oddsOf(verdict, byRule.get(ruleId), samples))
      .sort((one, other) => other.over - one.over || other.nearOrOver - one.nearOrOver),
    cannot: stated.flatMap(({ ruleId, verdict: { assessment } }) =>
      assessment.ok ? [] : [{ ruleId, needs: assessment.needs }],
    ),
  };
}

interface OfRule {
  readonly ruleId: string;
  readonly verdict: RuleVerdict;
}

function verdictsOf(input: RuleInput, axis: string): OfRule[] {
  const context = ruleContext(input);
  const own = context.axes.filter((view) => view.axis.toLowerCase() === axis.toLowerCase());
  return JUDGED.flatMap((rule) =>
    rule
      .judge({ ...context, axes: own })
      .filter((verdict) => verdict.axis !== null)
      .map((verdict) => ({ ruleId: rule.id, verdict })),
  );
}

interface Count {
  readonly ruleId: string;
  readonly values: Float64Array;
  over: number;
  nearOrOver: number;
}

function newCount(ruleId: string, samples: number): Count {
  return { ruleId, values: new Float64Array(samples), over: 0, nearOrOver: 0 };
}

function note(count: Count, { assessment }: RuleVerdict, index: number): void {
  count.values[index] = assessment.ok && assessment.value !== null ? assessment.value : NaN;
  if (!assessment.ok || assessment.level === "within") return;
  count.nearOrOver += 1;
  if (assessment.level === "over") count.over += 1;
}

function oddsOf({ assessment }: RuleVerdict, count: Count | undefined, samples: number): LimitOdds[] {
  if (!count || !assessment.ok) return [];
  const over = count.over / samples;
  const { level, value, limit, nearLimit, limitSense, unit } = assessment;
  return [
    {
      ruleId: count.ruleId,
      level,
      value,
      limit,
      nearLimit,
      limitSense,
      unit,
      over,
      standardError: Math.sqrt((over * (1 - over)) / samples),
      nearOrOver: count.nearOrOver / samples,
      ...middle(count.values),
    },
  ];
}

/** The 5th and the 95th of 100 parts of the values. */
function middle(values: Float64Array): { readonly low: number | null; readonly high: number | null } {
  const sorted = [...values].sort((one, other) => one - other);
  const at = (share: number): number | null => sorted[Math.round(share * (sorted.length - 1))] ?? null;
  if (sorted.some(Number.isNaN)) return { low: null, high: null };
  return { low: at(0.05), high: at(0.95) };
}

/** One draw of all data that are spread. */
function drawOne({ input, axis, spreads }: OddsInput, random: () => number): RuleInput {
  const factor = (halfWidth: number): number => 1 + halfWidth * (2 * random() - 1);
  const motor = {
    rated_current_a: factor(spreads.label),
    holding_torque_nm: factor(spreads.label),
    resistance_ohm: factor(spreads.resistance),
  };
  const sense = factor(spreads.senseResistor);
  const supply = factor(spreads.supply);
  const warmer = spreads.ambientK * (2 * random() - 1);
  const isOwn = (name: string | null): boolean => name?.toLowerCase() === axis.toLowerCase();
  const own = input.assembly.axes.find((one) => isOwn(one.axis));
  // A resistance of 0 says that there is no resistor whose tolerance could bear on the current.
  const senses = (own?.driver?.set_point?.sense_resistance_ohm ?? 0) > 0;
  const assembly = withSupply(input.assembly, supply, warmer);
  return {
    ...input,
    assembly: {
      ...assembly,
      axes: assembly.axes.map((one) => (isOwn(one.axis) ? drawnAxis(one, motor, sense) : one)),
    },
    parameters: senses
      ? input.parameters.map((one) => (isOwn(one.axis) ? drawnCurrent(one, sense) : one))
      : input.parameters,
  };
}

function withSupply(assembly: Assembly, factor: number, warmer: number): Assembly {
  const { supply, ambient_c: ambient } = assembly;
  const room = ambient === undefined ? assembly : inRoom(assembly, ambient + warmer);
  if (supply?.voltage_v === undefined) return room;
  return { ...room, supply: { ...supply, voltage_v: supply.voltage_v * factor, tolerance: 0 } };
}

type MotorFactors = Readonly<Record<"rated_current_a" | "holding_torque_nm" | "resistance_ohm", number>>;

function drawnAxis(axis: AxisAssembly, factors: MotorFactors, sense: number): AxisAssembly {
  const { motor, driver } = axis;
  return {
    ...axis,
    ...(motor ? { motor: drawnMotor(motor, factors) } : {}),
    ...(driver?.set_point ? { driver: { ...driver, set_point: drawnSense(driver.set_point, sense) } } : {}),
  };
}

function drawnMotor(motor: Motor, factors: MotorFactors): Motor {
  const { rated_current_a: rated, holding_torque_nm: torque, resistance_ohm: resistance } = motor;
  return {
    ...motor,
    ...(rated === undefined ? {} : { rated_current_a: rated * factors.rated_current_a }),
    ...(torque === undefined ? {} : { holding_torque_nm: torque * factors.holding_torque_nm }),
    ...(resistance === undefined ? {} : { resistance_ohm: resistance * factors.resistance_ohm }),
  };
}

function drawnSense(setPoint: SetPoint, factor: number): SetPoint {
  const { sense_resistance_ohm: sense } = setPoint;
  return sense === undefined ? setPoint : { ...setPoint, sense_resistance_ohm: sense * factor };
}

/** A current that the text states: the firmware reckons with the nominal resistor, the winding gets what the real one lets through. */
function drawnCurrent(one: ParameterValue, sense: number): ParameterValue {
  const isCurrent = one.parameter === "run_current" || one.parameter === "hold_current";
  return isCurrent && one.unit !== "%" ? { ...one, value: one.value / sense } : one;
}
