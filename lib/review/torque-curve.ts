import type { AxisKind } from "@/lib/domain/axis-kind";
import type { Level } from "@/lib/domain/levels";
import { expectedPullOut } from "@/lib/physics/pull-out";
import { jerkPeakSpeed, jerkRampAcceleration } from "@/lib/physics/profiles";
import { missingSentence } from "@/lib/rules/missing-words";
import { travel } from "@/lib/rules/quantities/motion";
import { weakestPlace } from "@/lib/rules/quantities/ramp";
import { RAMP_TORQUE_MARGIN } from "@/lib/rules/ramp-torque-margin";
import type { AxisView, RuleContext } from "@/lib/rules/types";
import { availableTorque, axisDrive, neededTorque, wantedMargin } from "./axis-drive";
import type { AxisDrive } from "./axis-drive";
import { axisOf } from "./operating-map";
import type { NoSide } from "./operating-map";
import { roundUp, samplePlaces } from "./plot-range";

/** The place of a ramp that has least to spare against the policy. */
export interface RampPlace {
  /** m/s (rad/s) */
  readonly speed: number;
  /** N·m at each motor. */
  readonly available: number;
  readonly required: number;
  /** Shares of 1. */
  readonly margin: number;
  readonly wanted: number;
  /** As the check of the ramp has it. */
  readonly level: Level;
}

/** One side of a torque curve: before a change, or after it. Torques in N·m at each motor, one for each speed. */
export interface TorqueSide {
  readonly ok: true;
  /** Conservative pull-out torque: verdicts rest on it. */
  readonly available: readonly number[];
  /** Expected pull-out torque, for the picture only. */
  readonly expected: readonly number[];
  /** What a move may ask with the policy's margin kept. */
  readonly allowed: readonly number[];
  /** What the ramp asks at each speed up to its peak; null beyond it. Empty where the text lacks the move. */
  readonly required: readonly (number | null)[];
  /** N·m of a steady run. */
  readonly load: number;
  /** m/s (rad/s) */
  readonly limitSpeed: number;
  /** Peak speed of the ramp, m/s (rad/s); null where the text lacks the move. */
  readonly peak: number | null;
  readonly weakest: RampPlace | null;
  /** Why there is no ramp. */
  readonly rampMissing: string;
  readonly assumed: readonly string[];
}

/** Torque over speed of one axis. */
export interface TorqueCurve {
  readonly axis: string;
  readonly kind: AxisKind;
  /** m/s (rad/s), rising from 0. */
  readonly speeds: readonly number[];
  readonly speedEnd: number;
  /** N·m */
  readonly torqueEnd: number;
  readonly was: TorqueSide | NoSide | null;
  readonly toBe: TorqueSide | NoSide;
}

const PLACES = 160;

interface Ramp {
  /** m/s (rad/s) */
  readonly peak: number;
  /** m/s² (rad/s²) at a speed of the ramp. */
  readonly accelerationAt: (speed: number) => number;
  readonly weakest: RampPlace | null;
}

interface Sketch {
  readonly drive: AxisDrive;
  readonly ramp: Ramp | null;
  readonly rampMissing: string;
}

/** The torque curve of an axis as it is to be, with the side before it where there is one. */
export function torqueCurve(input: {
  readonly axis: string;
  readonly was: RuleContext | null;
  readonly toBe: RuleContext;
}): TorqueCurve {
  const after = axisOf(input.toBe, input.axis);
  const sketches = {
    was: input.was === null ? null : sketchIn(input.was, input.axis),
    toBe: sketchIn(input.toBe, input.axis),
  };
  const known = [sketches.was, sketches.toBe].flatMap((side) => (side && "drive" in side ? [side] : []));
  const speedEnd = endOfSpeeds(known);
  const jumps = known.flatMap(({ drive, ramp }) => [drive.limitSpeed, ...(ramp ? [ramp.peak] : [])]);
  const speeds = samplePlaces(speedEnd, PLACES, jumps);
  const side = (sketch: Sketch | NoSide) => ("drive" in sketch ? drawn(sketch, speeds) : sketch);
  return {
    axis: after?.axis ?? input.axis,
    kind: after?.kind ?? "linear",
    speeds,
    speedEnd,
    torqueEnd: endOfTorques(known),
    was: sketches.was && side(sketches.was),
    toBe: side(sketches.toBe),
  };
}

function sketchIn(context: RuleContext, axis: string): Sketch | NoSide {
  const view = axisOf(context, axis);
  if (!view) return { ok: false, sentence: `Nothing is known of the hardware of axis ${axis}.` };
  const drive = axisDrive(view);
  if (!drive.ok) return { ok: false, sentence: missingSentence(drive, view.axis) };
  return { drive, ...rampOf(context, view) };
}

/** The ramp from rest to the peak speed, with the jerk of the text where it has one. */
function rampOf(context: RuleContext, view: AxisView): Pick<Sketch, "ramp" | "rampMissing"> {
  const weakest = weakestPlace(view);
  if (weakest && !weakest.ok) return { ramp: null, rampMissing: missingSentence(weakest, view.axis) };
  const top = view.quantity("peak_speed");
  const acceleration = view.parameter("acceleration")?.value;
  if (!top.ok || acceleration === undefined) return { ramp: null, rampMissing: "Nothing is required." };
  const [verdict] = RAMP_TORQUE_MARGIN.judge({ ...context, axes: [view] });
  const level = verdict?.assessment.ok === true ? verdict.assessment.level : "cannot";
  const ramp = course(view, top.value, acceleration);
  return { ramp: { ...ramp, weakest: weakest && { ...weakest, level } }, rampMissing: "" };
}

function course(view: AxisView, top: number, acceleration: number): Omit<Ramp, "weakest"> {
  const jerk = view.parameter("jerk")?.value ?? 0;
  if (!(jerk > 0)) return { peak: top, accelerationAt: () => acceleration };
  const length = travel(view);
  const peak = length.ok ? jerkPeakSpeed({ speed: top, acceleration, jerk, travel: length.value }) : top;
  return { peak, accelerationAt: (speed) => jerkRampAcceleration({ speed, peak, acceleration, jerk }) };
}

function endOfSpeeds(sides: readonly Sketch[]): number {
  const peak = 1.35 * Math.max(0, ...sides.map(({ ramp }) => ramp?.peak ?? 0));
  const limit = 1.6 * Math.max(0, ...sides.map(({ drive }) => drive.limitSpeed));
  return roundUp(Math.max(peak, peak === 0 ? limit : Math.min(limit, 4 * peak)));
}

function endOfTorques(sides: readonly Sketch[]): number {
  const most = sides.flatMap(({ drive, ramp }) => [
    availableTorque(drive, 0),
    ramp?.weakest?.required ?? 0,
    ramp ? neededTorque(drive, ramp.accelerationAt(ramp.peak / 2)) : 0,
  ]);
  return roundUp(1.1 * Math.max(0, ...most));
}

function drawn({ drive, ramp, rampMissing }: Sketch, speeds: readonly number[]): TorqueSide {
  const available = speeds.map((speed) => availableTorque(drive, speed));
  return {
    ok: true,
    available,
    expected: speeds.map((speed) => expectedPullOut(drive.motor, speed / drive.radius)),
    allowed: speeds.map((speed, index) => (available[index] ?? 0) / (1 + wantedMargin(drive, speed))),
    required: ramp
      ? speeds.map((speed) => (speed <= ramp.peak ? neededTorque(drive, ramp.accelerationAt(speed)) : null))
      : [],
    load: drive.load,
    limitSpeed: drive.limitSpeed,
    peak: ramp?.peak ?? null,
    weakest: ramp?.weakest ?? null,
    rampMissing,
    assumed: drive.assumed,
  };
}
