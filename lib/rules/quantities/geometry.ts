import {
  DEFAULT_RATIO,
  missingGeometry,
  radiusPerRadian,
  stepsPerTravel,
  travelPerMotorTurn,
} from "@/lib/physics/drive-train";
import {
  axisPath,
  computed,
  fromText,
  gather,
  given,
  hardware,
  missing,
  orDefault,
  senseless,
} from "../data";
import { plain, showScale } from "../show";
import type { AxisView, Datum } from "../types";
import type { QuantityDefinition } from "./definition";

export const GEOMETRY_READS = [
  "drive_train.kind",
  "drive_train.pitch_mm",
  "drive_train.teeth",
  "drive_train.lead_mm",
  "drive_train.module_mm",
  "drive_train.ratio",
] as const;

/** 1/mm in 1/m, or 1/deg in 1/rad. */
export function stepsPerInsideUnit(axis: AxisView, scale: number): number {
  return axis.kind === "rotary" ? (scale * 180) / Math.PI : scale * 1000;
}

export function scaleUnit(axis: AxisView): string {
  return axis.kind === "rotary" ? "1/deg" : "1/mm";
}

export function lengthUnit(axis: AxisView): string {
  return axis.kind === "rotary" ? "rad" : "m";
}

export function accelerationUnit(axis: AxisView): string {
  return `${lengthUnit(axis)}/s²`;
}

export function jerkUnit(axis: AxisView): string {
  return `${lengthUnit(axis)}/s³`;
}

export function speedUnit(axis: AxisView): string {
  return `${lengthUnit(axis)}/s`;
}

/** Travel r for one radian of the motor: m, or rad on a rotary axis. */
export function radius(axis: AxisView): Datum {
  return fromDriveTrain(axis, radiusPerRadian);
}

function fromDriveTrain(axis: AxisView, reckon: typeof radiusPerRadian): Datum {
  const driveTrain = axis.hardware.drive_train ?? {};
  const value = reckon(driveTrain);
  if (value === null)
    return missing(...missingGeometry(driveTrain).map((field) => axisPath(axis, `drive_train.${field}`)));
  return given(value, orDefault(hardware(axis, "drive_train", "ratio"), DEFAULT_RATIO).assumed);
}

/** Travel for one motor turn in the unit of the scale: mm, or deg on a rotary axis. */
function travelPerTurn(axis: AxisView): Datum {
  const travel = fromDriveTrain(axis, travelPerMotorTurn);
  if (!travel.ok) return travel;
  const { value, assumed } = travel;
  return given(axis.kind === "rotary" ? (value * 180) / Math.PI : value * 1000, assumed);
}

export const EXPECTED_SCALE: QuantityDefinition = {
  reads: ["motor.step_angle_deg", "microsteps", ...GEOMETRY_READS],
  from: [],
  compute: (axis) => {
    const parts = gather({
      stepAngleDeg: hardware(axis, "motor", "step_angle_deg"),
      microsteps: fromText(axis, "microsteps", "positive"),
      travelPerTurn: travelPerTurn(axis),
    });
    if (!parts.ok) return parts;
    const { stepAngleDeg, microsteps, travelPerTurn: travel } = parts.values;
    const scale = stepsPerTravel({ stepAngleDeg, microsteps, travelPerTurn: travel });
    const unit = axis.kind === "rotary" ? "deg" : "mm";
    return computed(
      scale,
      parts.assumed,
      () =>
        `360° / ${plain(stepAngleDeg)}° · ${plain(microsteps)} / ${plain(travel)} ${unit} = ${showScale(scale, scaleUnit(axis))}`,
    );
  },
};

/** Size of the text's scale, 1/mm or 1/deg; its sign is the direction and nothing else. */
export function textScale(axis: AxisView): Datum {
  const found = axis.parameter("steps_per_mm");
  if (!found) return missing(axisPath(axis, "steps_per_mm"));
  if (found.value === 0) return senseless(axis, found, "positive");
  return given(Math.abs(found.value));
}

/** Whether the text counts its steps the other way. */
export function isScaleReversed(axis: AxisView): boolean {
  return (axis.parameter("steps_per_mm")?.value ?? 0) < 0;
}

/** The scale that the step rate rests on: the text's, else the geometry's. */
export function scaleInUse(axis: AxisView): Datum {
  return axis.parameter("steps_per_mm") ? textScale(axis) : axis.quantity("steps_per_mm_expected");
}
