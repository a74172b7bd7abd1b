import type { DriveTrain } from "@/lib/domain/assembly";

/** Motor turns for one output turn when the drive train does not say; a direct drive. */
export const DEFAULT_RATIO = 1;

/**
 * Travel r of the axis for one radian of the motor shaft: m/rad on a linear axis, rad/rad on a rotary one.
 * Belt pitch·teeth/(2π·ratio); screw lead/(2π·ratio); rack module·teeth/(2·ratio); rotary 1/ratio.
 * Null where the kind or one of its dimensions is not known. Source: geometry.
 */
export function radiusPerRadian(driveTrain: DriveTrain): number | null {
  const output = outputRadius(driveTrain);
  return output === null ? null : output / (driveTrain.ratio ?? DEFAULT_RATIO);
}

/**
 * Travel for one motor turn, 2π·r: m on a linear axis, rad of the output on a rotary one; r by `radiusPerRadian`, null
 * where that is not known. Source: geometry.
 */
export function travelPerMotorTurn(driveTrain: DriveTrain): number | null {
  const radius = radiusPerRadian(driveTrain);
  return radius === null ? null : radius * 2 * Math.PI;
}

/**
 * Fields of the drive train that `radiusPerRadian` lacks; empty where it can be computed. The ratio is never among them,
 * a direct drive has 1. Source: the dimensions in the geometry of each kind.
 */
export function missingGeometry(driveTrain: DriveTrain): (keyof DriveTrain)[] {
  if (driveTrain.kind === undefined) return ["kind"];
  return GEOMETRY[driveTrain.kind].filter((field) => driveTrain[field] === undefined);
}

/**
 * Full steps of a motor in one turn: 360/step angle, the angle in deg, more than 0.
 * 200 for 1.8 deg. Source: definition of the step angle.
 */
export function fullStepsPerTurn(stepAngleDeg: number): number {
  return 360 / stepAngleDeg;
}

/** Rotor teeth Nr = 90/step angle (deg) of a two-phase hybrid motor: 50 for 1.8 deg. Source: four full steps a tooth. */
export function rotorTeeth(stepAngleDeg: number): number {
  return 90 / stepAngleDeg;
}

/**
 * Step pulses for one unit of travel: full steps a turn · microsteps / travel a turn.
 * `travelPerTurn` in any length unit (mm gives 1/mm, deg gives 1/deg), more than 0. Source: geometry.
 */
export function stepsPerTravel(input: {
  readonly stepAngleDeg: number;
  readonly microsteps: number;
  readonly travelPerTurn: number;
}): number {
  return (fullStepsPerTurn(input.stepAngleDeg) * input.microsteps) / input.travelPerTurn;
}

const GEOMETRY = {
  belt: ["pitch_mm", "teeth"],
  screw: ["lead_mm"],
  rack: ["module_mm", "teeth"],
  rotary: [],
} as const;

/** Travel for one radian of the output shaft: m, or 1 for a rotary axis. */
function outputRadius({ kind, pitch_mm, teeth, lead_mm, module_mm }: DriveTrain): number | null {
  if (kind === "rotary") return 1;
  if (kind === "belt" && pitch_mm !== undefined && teeth !== undefined)
    return (pitch_mm * 1e-3 * teeth) / (2 * Math.PI);
  if (kind === "screw" && lead_mm !== undefined) return (lead_mm * 1e-3) / (2 * Math.PI);
  if (kind === "rack" && module_mm !== undefined && teeth !== undefined)
    return (module_mm * 1e-3 * teeth) / 2;
  return null;
}
