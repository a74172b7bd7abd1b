import { motorSchema } from "@/lib/domain/assembly";
import { fieldNotes } from "@/lib/domain/field-notes";
import { joinWords } from "@/lib/domain/sentences";
import { axisPath, bothMissing, gather, given, hardware, merged, motorCount, unusable } from "../data";
import type { AxisView, Datum, Known, Missing, RuleContext } from "../types";
import { ratingRms } from "./current";
import { GEOMETRY_READS, radius } from "./geometry";
import { INERTIA_READS, shaftInertia } from "./load";
import { driven, DRIVEN_READS } from "./torque";
import type { Driven } from "./torque";

/*
 * What motor_count means for two axes on crossed belts: each axis counts the same shared motors, so that an axis that
 * moves alone is carried by all of them. Two axes never share fewer than two motors; where each counts one, each has
 * counted one of the two, and the checks of one axis let that motor carry it alone (the harder case). More than two are an
 * even number, half of them on either belt. Sums over the motors of a machine count shared ones once. Kinetic energy and
 * shaft power are sums over axes all the same: half of the motors turn with v1 + v2 and half with v1 − v2, and
 * (v1 + v2)² + (v1 − v2)² = 2·v1² + 2·v2². Source: kinematics of crossed belts.
 */

export type Pair = readonly [AxisView, AxisView];

/** Axes that name each other, or one the other, in the order of the machine. */
export function coupledPairs({ axes }: Pick<RuleContext, "axes">): Pair[] {
  return axes.flatMap((one, index) =>
    axes
      .slice(index + 1)
      .flatMap((other): Pair[] =>
        names(one.hardware, other.axis) || names(other.hardware, one.axis) ? [[one, other]] : [],
      ),
  );
}

type Named = AxisView["hardware"];

function names({ coupled_with = [] }: Named, axis: string): boolean {
  return coupled_with.some((name) => name.toLowerCase() === axis.toLowerCase());
}

/** Axes of the machine whose motors move together with those of this one, whichever of them says so. */
function partners({ axis, hardware: own, assembly }: AxisView): string[] {
  return assembly.axes
    .filter((other) => other.axis !== axis && (names(own, other.axis) || names(other, axis)))
    .map((other) => other.axis);
}

/** Names of all axes that this one is coupled with, also of those that the machine does not have. */
export function coupledNames(axis: AxisView): string[] {
  const known = partners(axis);
  const stated = axis.hardware.coupled_with ?? [];
  const unknown = stated.filter((name) => !known.some((other) => other.toLowerCase() === name.toLowerCase()));
  return [...known, ...unknown];
}

/** Motors of an axis for a sum over the machine, where those that axes share are to count once. */
export function motorsInSum(axis: AxisView): Known {
  const { value, assumed } = motorCount(axis);
  return given(Math.max(1, value / (1 + partners(axis).length)), assumed);
}

/** Motors that turn when this axis moves; at least two where it shares them. */
export function motorsTurning(axis: AxisView): Known {
  const { value, assumed } = motorCount(axis);
  return given(partners(axis).length > 0 ? Math.max(2, value) : value, assumed);
}

/** Motors that two axes share, all together. */
export function sharedMotors([one, other]: Pair): Datum {
  const [first, second] = [motorCount(one), motorCount(other)];
  const paths = [axisPath(one, "motor_count"), axisPath(other, "motor_count")];
  if (first.value !== second.value)
    return unusable(
      `Axes ${one.axis} and ${other.axis} share their motors, but one counts ${first.value} of them and the other ${second.value}.`,
      ...paths,
    );
  if (first.value > 1 && first.value % 2 === 1)
    return unusable(
      `Axes ${one.axis} and ${other.axis} share their motors, which are an even number, not ${first.value}.`,
      ...paths,
    );
  return given(Math.max(2, first.value), merged(first.assumed, second.assumed));
}

const SAME_MOTOR = [
  "resistance_ohm",
  "inductance_mh",
  "holding_torque_nm",
  "rotor_inertia_gcm2",
  "step_angle_deg",
] as const;

/** Two numbers that differ by less than this share are the same: the last bits are noise of the arithmetic. */
const NOISE = 1e-9;

function differ(one: Datum, other: Datum): boolean {
  return one.ok && other.ok && Math.abs(one.value - other.value) > NOISE * Math.abs(one.value);
}

/** Why the two axes cannot have the same motors and belts; null where nothing speaks against it. */
function disagreement(pair: Pair): Missing | null {
  const [one, other] = pair;
  const fields = SAME_MOTOR.filter((field) =>
    differ(hardware(one, "motor", field), hardware(other, "motor", field)),
  );
  const rated = differ(ratingRms(one, "motor"), ratingRms(other, "motor"))
    ? ["rated_current_a" as const]
    : [];
  const found = [
    unlike(pair, {
      words: [...rated, ...fields].map((field) => label(field)),
      fields: [...rated, ...fields].map((field) => `motor.${field}`),
    }),
    one.kind === other.kind && !differ(radius(one), radius(other))
      ? null
      : unlike(pair, { words: ["travel for one turn"], fields: geometryFields(pair) }),
  ].flatMap((lack) => lack ?? []);
  return found.length === 0 ? null : found.reduce(bothMissing);
}

function unlike(
  [one, other]: Pair,
  { words, fields }: { readonly words: readonly string[]; readonly fields: readonly string[] },
): Missing | null {
  if (words.length === 0) return null;
  return unusable(
    `Axes ${one.axis} and ${other.axis} share their motors, but differ in ${joinWords(words)}.`,
    ...fields.flatMap((field) => [axisPath(one, field), axisPath(other, field)]),
  );
}

function label(field: keyof typeof motorSchema.shape): string {
  const words = fieldNotes.get(motorSchema.shape[field])?.label ?? field;
  return words.charAt(0).toLowerCase() + words.slice(1);
}

function geometryFields([one, other]: Pair): string[] {
  const raw = ({ hardware: { drive_train } }: AxisView, field: string) =>
    ({ ...drive_train })[field.replace("drive_train.", "") as keyof NonNullable<typeof drive_train>];
  return GEOMETRY_READS.filter((field) => raw(one, field) !== raw(other, field));
}

/** The motors and belts of two axes on crossed belts. */
export interface SharedDrive {
  readonly ok: true;
  /** One motor as either axis drives it: they may differ in current and in the winding's temperature. */
  readonly motors: readonly [Driven, Driven];
  /** All of them. */
  readonly count: number;
  /** m/rad */
  readonly radius: number;
  /** The lesser of both, share of 1. */
  readonly efficiency: number;
  /** Rotor and what sits on its shaft, the greater of both, kg·m². */
  readonly shaft: number;
  readonly assumed: readonly string[];
}

export const SHARED_READS = [
  ...DRIVEN_READS,
  ...INERTIA_READS,
  "drive_train.efficiency",
  "axis.coupled_with",
  "driver.feedback",
] as const;

/** Needs the data of both axes: the same motors are to be driven by both, and neither is taken on trust. */
export function sharedDrive(pair: Pair): SharedDrive | Missing {
  const unequal = disagreement(pair);
  const [first, second] = [driven(pair[0]), driven(pair[1])];
  const parts = gather({
    count: sharedMotors(pair),
    efficiency: hardware(pair[0], "drive_train", "efficiency"),
    otherEfficiency: hardware(pair[1], "drive_train", "efficiency"),
    shaft: shaftInertia(pair[0]),
    otherShaft: shaftInertia(pair[1]),
  });
  const lacks = [unequal, first, second, parts].flatMap((part) => (part === null || part.ok ? [] : [part]));
  if (lacks.length > 0) return lacks.reduce(bothMissing);
  if (!first.ok) return first;
  if (!second.ok) return second;
  if (!parts.ok) return parts;
  const { count, efficiency, otherEfficiency, shaft, otherShaft } = parts.values;
  return {
    ok: true,
    motors: [first, second],
    count,
    radius: first.radius,
    efficiency: Math.min(efficiency, otherEfficiency),
    shaft: Math.max(shaft, otherShaft),
    assumed: [first.assumed, second.assumed, parts.assumed].reduce(merged),
  };
}
