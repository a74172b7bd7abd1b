import { toRms } from "@/lib/physics/current-conventions";
import { exceeds } from "../assessment";
import { axisPath, computed, fromText, gather, hardware, missing, motorCount, unusable } from "../data";
import { show, showPeak, showRms } from "../show";
import type { AxisView, Computed } from "../types";
import type { QuantityDefinition } from "./definition";
import type { CurrentParameter } from "./set-point-current";
import { setPointCurrent, SET_POINT_READS } from "./set-point-current";

/** A text's current and its set-point may differ by this share: 5 % of the driver, 1 % of the resistor, rounding. */
export const CURRENT_AGREEMENT = 0.07;

/** Current in one winding, A rms, as the text states it; null where the text states none. */
export function textCurrent(axis: AxisView, name: CurrentParameter): Computed | null {
  const found = axis.parameter(name);
  if (!found) return null;
  if (found.unit === "%") return shareOfRun(axis, name);
  const current = fromText(axis, name);
  if (!current.ok) return current;
  const { basis } = found;
  if (basis === null) return missing(axisPath(axis, `${name}.basis`));
  const rms = toRms(current.value, basis);
  // Each motor has its own driver, so the number of motors says that this is the current of one winding.
  return computed(rms, motorCount(axis).assumed, () =>
    basis === "peak" ? `${showPeak(current.value)} / √2 = ${showRms(rms)}` : showRms(rms),
  );
}

function shareOfRun(axis: AxisView, name: CurrentParameter): Computed {
  if (name === "run_current")
    return unusable(
      "The run current is given in per cent, and of what is not said.",
      axisPath(axis, "run_current"),
    );
  const parts = gather({ share: fromText(axis, name), run: axis.quantity("winding_current_rms") });
  if (!parts.ok) return parts;
  const { share, run } = parts.values;
  const rms = (share / 100) * run;
  return computed(rms, parts.assumed, () => `${show(share, "%")} · ${showRms(run)} = ${showRms(rms)}`);
}

/** Share by which a text's current (A rms) differs from what its set-point gives; Infinity beside a set-point of 0. */
export function disagreement(text: number, setPoint: number): number {
  if (text === setPoint) return 0;
  return setPoint === 0 ? Infinity : Math.abs(text / setPoint - 1);
}

function resolvedCurrent(axis: AxisView, name: CurrentParameter): Computed {
  const text = textCurrent(axis, name);
  const setPoint = setPointCurrent(axis, name);
  if (text === null) return setPoint ?? missing(axisPath(axis, name));
  if (!text.ok || !setPoint?.ok) return text;
  if (!exceeds(disagreement(text.value, setPoint.value), CURRENT_AGREEMENT)) return text;
  return unusable(
    `The text states ${showRms(text.value)} but sets ${showRms(setPoint.value)}; neither is used.`,
    axisPath(axis, name),
    axisPath(axis, setPoint.parameter),
  );
}

export const WINDING_CURRENT: QuantityDefinition = {
  reads: ["run_current", "reference_voltage", "current_scale", ...SET_POINT_READS],
  from: [],
  compute: (axis) => resolvedCurrent(axis, "run_current"),
};

export const HOLD_CURRENT: QuantityDefinition = {
  reads: ["hold_current", "hold_scale", ...SET_POINT_READS],
  from: ["winding_current_rms"],
  compute: (axis) => resolvedCurrent(axis, "hold_current"),
};

/** What `ratingRms` of the motor reads. */
export const RATED_READS = [
  "motor.rated_current_a",
  "motor.rated_current_basis",
  "motor.rating_of",
  "motor.connection",
] as const;

/** What a winding's resistance and inductance rest on besides themselves. */
export const CONNECTION_READS = ["motor.rating_of", "motor.connection"] as const;

/** A catalog current as A rms, a motor's as its coils are connected; its basis is a datum of its own, since peak and rms differ by 41 %. */
export function ratingRms(axis: AxisView, part: "motor" | "driver"): Computed {
  const { motor, driver } = axis.hardware;
  const field = part === "motor" ? "motor.rated_current" : "driver.max_current";
  const stated =
    part === "motor" ? hardware(axis, "motor", "rated_current_a") : hardware(axis, "driver", "max_current_a");
  const basis = part === "motor" ? motor?.rated_current_basis : driver?.max_current_basis;
  if (!stated.ok || basis === undefined)
    return missing(
      ...(stated.ok ? [] : stated.needs),
      ...(basis === undefined ? [axisPath(axis, `${field}_basis`)] : []),
    );
  const { value } = stated;
  const rms = toRms(value, basis);
  return computed(rms, [], () =>
    basis === "rms" ? showRms(value) : `${showPeak(value)} / √2 = ${showRms(rms)}`,
  );
}
