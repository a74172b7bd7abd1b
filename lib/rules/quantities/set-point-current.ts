import type { ParameterName } from "@/lib/domain/parameters";
import type { Basis } from "@/lib/domain/values";
import { toRms } from "@/lib/physics/current-conventions";
import {
  digitalScaleCurrent,
  referenceVoltageCurrent,
  transconductanceCurrent,
} from "@/lib/physics/set-point";
import {
  axisPath,
  computed,
  fromText,
  gather,
  merged,
  missing,
  motorCount,
  orDefault,
  setPoint,
  unusable,
} from "../data";
import type { Gathered } from "../data";
import { plain, show, showPeak, showRms } from "../show";
import type { AxisView, Computed, Datum } from "../types";

export type CurrentParameter = "run_current" | "hold_current";

export const SET_POINT_READS = [
  "driver.set_point.method",
  "driver.set_point.gain",
  "driver.set_point.gain_a_per_v",
  "driver.set_point.basis",
  "driver.set_point.full_scale_v",
  "driver.set_point.internal_resistance_ohm",
  "driver.set_point.steps",
  "driver.set_point.overall_scale",
  "driver.set_point.sense_resistance_ohm",
  "axis.motor_count",
] as const;

/** The current that a set-point of the text gives, and which parameter of the text it is. */
export type SetPointCurrent = Computed & { readonly parameter: ParameterName };

/** Which parameter of the text is the set-point of this axis' driver; null where the method has none. */
export function setPointParameter(axis: AxisView, name: CurrentParameter): ParameterName | null {
  const method = axis.hardware.driver?.set_point?.method;
  if (method === "digital_scale") return name === "run_current" ? "current_scale" : "hold_scale";
  if (name === "hold_current") return null;
  if (method === "reference_voltage" || method === "transconductance") return "reference_voltage";
  return null;
}

/** A set-point that the text has although the driver's method is not known. */
function unexplainedSetPoint(axis: AxisView, name: CurrentParameter): ParameterName | undefined {
  if (axis.hardware.driver?.set_point?.method !== undefined) return undefined;
  const names: ParameterName[] =
    name === "run_current" ? ["reference_voltage", "current_scale"] : ["hold_scale"];
  return names.find((candidate) => axis.parameter(candidate));
}

/** Current in one winding, A rms, from the text's set-point and the machine's own hardware; null where the text has none. */
export function setPointCurrent(axis: AxisView, name: CurrentParameter): SetPointCurrent | null {
  const unexplained = unexplainedSetPoint(axis, name);
  if (unexplained) return { ...missing(axisPath(axis, "driver.set_point.method")), parameter: unexplained };
  const parameter = setPointParameter(axis, name);
  if (parameter === null || !axis.parameter(parameter)) return null;
  const set = fromText(axis, parameter);
  const method = axis.hardware.driver?.set_point?.method;
  if (method === "digital_scale") return fromScale(axis, parameter, set);
  return method === "transconductance" ? fromTransconductance(axis, set) : fromReference(axis, set);
}

function fromReference(axis: AxisView, set: Datum): SetPointCurrent {
  const parts = gather({
    set,
    gain: setPoint(axis, "gain"),
    sense: setPoint(axis, "sense_resistance_ohm"),
  });
  const basis = axis.hardware.driver?.set_point?.basis;
  if (!parts.ok || basis === undefined) return lacking(axis, parts, basis);
  const { set: voltage, gain, sense } = parts.values;
  if (sense === 0) return noResistor(axis, "reference_voltage");
  const current = referenceVoltageCurrent({ referenceVoltage: voltage, gain, senseResistance: sense });
  return result(axis, {
    current,
    basis,
    parameter: "reference_voltage",
    assumed: parts.assumed,
    words: () => `${show(voltage, "V")} / (${plain(gain)} · ${show(sense, "Ω")})`,
  });
}

function fromTransconductance(axis: AxisView, set: Datum): SetPointCurrent {
  const parts = gather({ set, gain: setPoint(axis, "gain_a_per_v") });
  const basis = axis.hardware.driver?.set_point?.basis;
  if (!parts.ok || basis === undefined) return lacking(axis, parts, basis);
  const { set: voltage, gain } = parts.values;
  const current = transconductanceCurrent({ referenceVoltage: voltage, amperesPerVolt: gain });
  return result(axis, {
    current,
    basis,
    parameter: "reference_voltage",
    assumed: parts.assumed,
    words: () => `${plain(gain)} A/V · ${show(voltage, "V")}`,
  });
}

function fromScale(axis: AxisView, parameter: ParameterName, set: Datum): SetPointCurrent {
  const parts = gather({
    set,
    steps: setPoint(axis, "steps"),
    overall: orDefault(setPoint(axis, "overall_scale"), 1),
    fullScale: setPoint(axis, "full_scale_v"),
    sense: setPoint(axis, "sense_resistance_ohm"),
    internal: setPoint(axis, "internal_resistance_ohm"),
  });
  if (!parts.ok) return { ...parts, parameter };
  const { set: scale, steps, overall, fullScale, sense, internal } = parts.values;
  if (sense + internal === 0) return noResistor(axis, parameter);
  const current = digitalScaleCurrent({
    scale,
    steps,
    overallScale: overall,
    fullScaleVoltage: fullScale,
    senseResistance: sense,
    internalResistance: internal,
  });
  const factor = overall === 1 ? "" : `${plain(overall)} · `;
  return result(axis, {
    current,
    basis: "peak",
    parameter,
    assumed: parts.assumed,
    words: () =>
      `${factor}(${plain(scale)} + 1) / ${plain(steps)} · ${show(fullScale, "V")} / (${show(sense, "Ω")} + ${show(internal, "Ω")})`,
  });
}

/** A set-point is a voltage over a resistance: where that is recorded as 0, it says no current. */
function noResistor(axis: AxisView, parameter: ParameterName): SetPointCurrent {
  const reason = "The driver is recorded without a sense resistor, so that its set-point gives no current.";
  return { ...unusable(reason, axisPath(axis, "driver.set_point.sense_resistance_ohm")), parameter };
}

function lacking(axis: AxisView, parts: Gathered<object>, basis: Basis | undefined): SetPointCurrent {
  const needs = basis === undefined ? [axisPath(axis, "driver.set_point.basis")] : [];
  const lack = parts.ok ? missing() : parts;
  return { ...lack, needs: merged(lack.needs, needs), parameter: "reference_voltage" };
}

interface Derivation {
  readonly current: number;
  readonly basis: Basis;
  readonly parameter: ParameterName;
  readonly assumed: readonly string[];
  readonly words: () => string;
}

function result(axis: AxisView, { current, basis, parameter, assumed, words }: Derivation): SetPointCurrent {
  const rms = toRms(current, basis);
  const formula = () =>
    basis === "peak"
      ? `${words()} = ${showPeak(current)}; / √2 = ${showRms(rms)}`
      : `${words()} = ${showRms(rms)}`;
  return { ...computed(rms, merged(assumed, motorCount(axis).assumed), formula), parameter };
}
