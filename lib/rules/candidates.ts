import type { ParameterName } from "@/lib/domain/parameters";
import type { Candidate } from "./clearing";
import { hardware, setPoint } from "./data";
import { ratingRms } from "./quantities/current";
import { setPointParameter } from "./quantities/set-point-current";
import type { CurrentParameter } from "./quantities/set-point-current";
import type { AxisView } from "./types";

/** The parameters of the text that say a current: the current itself, and the set-point of the driver's method. */
export function currentParameters(axis: AxisView, name: CurrentParameter): ParameterName[] {
  const setPointName = setPointParameter(axis, name);
  const names = [name, ...(setPointName === null ? [] : [setPointName])];
  const stated = names.filter((candidate) => axis.parameter(candidate));
  return stated.length > 0 ? stated : [name];
}

export function lower(view: AxisView, ...names: readonly ParameterName[]): Candidate[] {
  return names.map((parameter) => ({ view, parameter, aim: { kind: "lower" } }));
}

/** Lowering the run current, however the text says it. */
export function lowerCurrent(axis: AxisView): Candidate[] {
  return lower(axis, ...currentParameters(axis, "run_current"));
}

/**
 * Raising a current, as far as motor and driver allow: above the motor's rating torque does not grow, above the
 * driver's maximum the driver gives out.
 */
export function raiseCurrent(view: AxisView, name: CurrentParameter): Candidate[] {
  const quantity = name === "run_current" ? "winding_current_rms" : "hold_current_rms";
  const present = view.quantity(quantity);
  const rated = ratingRms(view, "motor");
  if (!present.ok || !rated.ok) return [];
  const driver = ratingRms(view, "driver");
  const most = driver.ok ? Math.min(rated.value, driver.value) : rated.value;
  return currentParameters(view, name).flatMap((parameter) => {
    const reach = reachOf(view, { parameter, present: present.value, most });
    return reach === null ? [] : [{ view, parameter, aim: { kind: "raise", most: reach } }];
  });
}

/** Value of a parameter at which the current, now `present`, would be `most` (both A rms); null where that cannot be said. */
function reachOf(
  view: AxisView,
  { parameter, present, most }: { parameter: ParameterName; present: number; most: number },
): number | null {
  const stated = view.parameter(parameter);
  if (!stated) return null;
  if (parameter === "current_scale" || parameter === "hold_scale") {
    const steps = setPoint(view, "steps");
    const wanted = present > 0 ? ((stated.value + 1) * most) / present - 1 : null;
    return steps.ok && wanted !== null ? Math.min(steps.value - 1, wanted) : null;
  }
  if (stated.unit === "%") return 100;
  if (present > 0) return (stated.value * most) / present;
  return stated.basis === "peak" ? most * Math.SQRT2 : most;
}

/** Setting a parameter that the text has to one exact value, SI. */
export function set(view: AxisView, parameter: ParameterName, to: number): Candidate[] {
  return view.parameter(parameter) ? [{ view, parameter, aim: { kind: "set", to } }] : [];
}

/** The driver's shortest high part of a step pulse, s; null where not known. */
export function shortestPulse(axis: AxisView): number | null {
  const found = hardware(axis, "driver", "min_pulse_high_us");
  return found.ok ? found.value * 1e-6 : null;
}
