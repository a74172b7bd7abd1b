import type { AxisKind } from "@/lib/domain/axis-kind";
import type { Level } from "@/lib/domain/levels";
import { missingSentence } from "@/lib/rules/missing-words";
import { travel } from "@/lib/rules/quantities/motion";
import { TORQUE_MARGIN } from "@/lib/rules/torque-margin";
import type { AxisView, RuleContext } from "@/lib/rules/types";
import { axisDrive, highestAcceleration, wantedMargin } from "./axis-drive";
import type { AxisDrive } from "./axis-drive";
import { roundUp, samplePlaces } from "./plot-range";

/** Where the text works an axis: the highest speed that it reaches, and its acceleration. */
export interface OperatingPoint {
  /** m/s (rad/s), reached within the travel. */
  readonly speed: number;
  /** m/s (rad/s), as the text sets it. */
  readonly setSpeed: number;
  /** m/s² (rad/s²) */
  readonly acceleration: number;
  /** Torque margin there, share of 1; null where nothing is required of the motor. */
  readonly margin: number | null;
  /** What the policy wants there, share of 1. */
  readonly wanted: number;
  readonly level: Level;
}

/** One side of a map: before a change, or after it. */
export interface OperatingSide {
  readonly ok: true;
  /** Highest acceleration that leaves the policy's margin, at each speed of the map, m/s² (rad/s²). */
  readonly boundary: readonly number[];
  /** The same with no margin at all: beyond it steps are lost. */
  readonly pullOut: readonly number[];
  /** Voltage-limit speed, m/s (rad/s). */
  readonly limitSpeed: number;
  readonly marginBelow: number;
  readonly marginAbove: number;
  /** m (rad); null where it is not known. */
  readonly travel: number | null;
  /** Null where the text lacks speed or acceleration; `pointMissing` says which. */
  readonly point: OperatingPoint | null;
  readonly pointMissing: string;
  readonly assumed: readonly string[];
}

export interface NoSide {
  readonly ok: false;
  /** What is missing, in words. */
  readonly sentence: string;
}

/** Speed × acceleration of one axis, with the region that keeps the policy's torque margin. */
export interface OperatingMap {
  readonly axis: string;
  readonly kind: AxisKind;
  /** m/s (rad/s), rising from 0. */
  readonly speeds: readonly number[];
  /** Ends of the scales, m/s and m/s² (rad/s, rad/s²). */
  readonly speedEnd: number;
  readonly accelerationEnd: number;
  /** Null where there is nothing before. */
  readonly was: OperatingSide | NoSide | null;
  readonly toBe: OperatingSide | NoSide;
}

const PLACES = 160;

interface Sketch {
  readonly drive: AxisDrive;
  readonly point: OperatingPoint | null;
  readonly pointMissing: string;
  readonly travel: number | null;
}

/** The map of an axis as it is to be, with the side before it where there is one; both contexts must have the axis. */
export function operatingMap(input: {
  readonly axis: string;
  readonly was: RuleContext | null;
  readonly toBe: RuleContext;
}): OperatingMap {
  const after = axisOf(input.toBe, input.axis);
  const sketches = {
    was: input.was === null ? null : sketchIn(input.was, input.axis),
    toBe: sketchIn(input.toBe, input.axis),
  };
  const known = [sketches.was, sketches.toBe].flatMap((side) => (side && "drive" in side ? [side] : []));
  const speedEnd = endOfSpeeds(known);
  const speeds = samplePlaces(
    speedEnd,
    PLACES,
    known.map(({ drive }) => drive.limitSpeed),
  );
  const side = (sketch: Sketch | NoSide) => ("drive" in sketch ? drawn(sketch, speeds) : sketch);
  return {
    axis: after?.axis ?? input.axis,
    kind: after?.kind ?? "linear",
    speeds,
    speedEnd,
    accelerationEnd: endOfAccelerations(known),
    was: sketches.was && side(sketches.was),
    toBe: side(sketches.toBe),
  };
}

/** The view of an axis, its name without regard to case. */
export function axisOf({ axes }: RuleContext, axis: string): AxisView | undefined {
  return axes.find((view) => view.axis.toLowerCase() === axis.toLowerCase());
}

function sketchIn(context: RuleContext, axis: string): Sketch | NoSide {
  const view = axisOf(context, axis);
  if (!view) return { ok: false, sentence: `Nothing is known of the hardware of axis ${axis}.` };
  const drive = axisDrive(view);
  if (!drive.ok) return { ok: false, sentence: missingSentence(drive, view.axis) };
  const length = travel(view);
  return { drive, travel: length.ok ? length.value : null, ...pointOf(context, view, drive) };
}

function pointOf(
  context: RuleContext,
  view: AxisView,
  drive: AxisDrive,
): Pick<Sketch, "point" | "pointMissing"> {
  const speed = view.quantity("peak_speed");
  const acceleration = view.parameter("acceleration");
  const [verdict] = TORQUE_MARGIN.judge({ ...context, axes: [view] });
  if (!verdict) return { point: null, pointMissing: NO_POINT };
  const { assessment } = verdict;
  if (!assessment.ok) return { point: null, pointMissing: missingSentence(assessment, view.axis) };
  if (!speed.ok || !acceleration) return { point: null, pointMissing: NO_POINT };
  const point = {
    speed: speed.value,
    setSpeed: view.parameter("max_speed")?.value ?? speed.value,
    acceleration: acceleration.value,
    margin: assessment.value,
    wanted: wantedMargin(drive, speed.value),
    level: assessment.level,
  };
  return { point, pointMissing: "" };
}

const NO_POINT = "Not in the text: the speed or the acceleration.";

function endOfSpeeds(sides: readonly Sketch[]): number {
  const points = sides.flatMap(({ point }) => (point ? [point.speed, 0.9 * point.setSpeed] : []));
  const limits = sides.map(({ drive }) => drive.limitSpeed);
  const used = 1.35 * Math.max(0, ...points);
  const limit = 1.25 * Math.max(0, ...limits);
  // The voltage-limit speed belongs in the picture unless it lies far off the speeds in use.
  return roundUp(used === 0 ? 2 * limit : Math.max(used, Math.min(limit, 2.5 * used)));
}

function endOfAccelerations(sides: readonly Sketch[]): number {
  const used = 1.3 * Math.max(0, ...sides.flatMap(({ point }) => (point ? [point.acceleration] : [])));
  const most = Math.max(
    0,
    ...sides.map(({ drive }) => highestAcceleration(drive, 0, drive.marginBelow) ?? 0),
  );
  return roundUp(used === 0 ? 1.15 * most : Math.max(used, Math.min(1.15 * most, 4 * used)));
}

function drawn({ drive, ...rest }: Sketch, speeds: readonly number[]): OperatingSide {
  const { limitSpeed, marginBelow, marginAbove, assumed } = drive;
  // Without inertia any acceleration will do, as far as the picture goes.
  const highest = (speed: number, margin: number) =>
    highestAcceleration(drive, speed, margin) ?? Number.MAX_VALUE;
  return {
    ok: true,
    boundary: speeds.map((speed) => highest(speed, wantedMargin(drive, speed))),
    pullOut: speeds.map((speed) => highest(speed, 0)),
    limitSpeed,
    marginBelow,
    marginAbove,
    assumed,
    ...rest,
  };
}

/** Whether a change moves anything on the map: the boundary, or the point. */
export function mapMoves({ was, toBe }: OperatingMap): boolean {
  if (was === null) return true;
  if (!was.ok || !toBe.ok) return was.ok !== toBe.ok;
  const samePoint =
    was.point?.speed === toBe.point?.speed && was.point?.acceleration === toBe.point?.acceleration;
  return !samePoint || was.boundary.some((value, index) => value !== toBe.boundary[index]);
}
