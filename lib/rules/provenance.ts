import { parameterDefinition } from "@/lib/domain/parameters";
import type { ParameterName } from "@/lib/domain/parameters";
import type { ParameterValue } from "@/lib/domain/values";
import { formatNumber } from "@/lib/domain/units";
import { exceeds } from "./assessment";
import { CURRENT_AGREEMENT, disagreement, textCurrent } from "./quantities/current";
import { setPointCurrent, setPointParameter } from "./quantities/set-point-current";
import type { CurrentParameter } from "./quantities/set-point-current";
import { show, showPercent, showRms } from "./show";
import type { AxisView, CurrentProvenance, ProvenanceStep } from "./types";

/** Spread of the driver's reference and of its sense resistor, shares of 1. Source: TRINAMIC TMC2209 Rev. 1.03 (±5 %); 1 % resistor series. */
const DRIVER_SPREAD = 0.05;
const RESISTOR_SPREAD = 0.01;

/** How the run and the hold current come about, from the number typed to the rms current in the winding. */
export function currentProvenance(axis: AxisView): CurrentProvenance[] {
  const names: CurrentParameter[] = ["run_current", "hold_current"];
  return names.filter((name) => isSaid(axis, name)).map((name) => provenanceOf(axis, name));
}

/** A run current belongs to every axis; a hold current only where the text says something of it. */
function isSaid(axis: AxisView, name: CurrentParameter): boolean {
  return name === "run_current" || statedParameters(axis, name).length > 0;
}

function statedParameters(axis: AxisView, name: CurrentParameter): ParameterValue[] {
  const setPointName = setPointParameter(axis, name) ?? setPointCurrent(axis, name)?.parameter;
  return [name, setPointName].flatMap((parameter) => (parameter && axis.parameter(parameter)) ?? []);
}

function provenanceOf(axis: AxisView, name: CurrentParameter): CurrentProvenance {
  const current = axis.quantity(name === "run_current" ? "winding_current_rms" : "hold_current_rms");
  const steps = [
    ...typedSteps(axis, name),
    ...hardwareSteps(axis, name),
    ...comparison(axis, name),
    ...(current.ok ? [{ label: "In the winding", text: showRms(current.value), from: "computed" }] : []),
  ];
  return {
    axis: axis.axis,
    parameter: name,
    steps,
    rms: current.ok ? current.value : null,
    tolerance: current.ok ? tolerance(axis, name) : null,
    missing: current.ok ? [] : current.needs,
  };
}

function placeOf({ source }: ParameterValue): string {
  return `${source.path} line ${source.line}`;
}

/** The numbers as typed, and for a current whether it is a peak or an rms value. */
function typedSteps(axis: AxisView, name: CurrentParameter): ProvenanceStep[] {
  return statedParameters(axis, name).flatMap((stated) => {
    const { label } = parameterDefinition(stated.parameter);
    const typed = `${formatNumber(stated.typed.value, 6)}${stated.typed.unit ? ` ${stated.typed.unit}` : ""}`;
    const number = { label, text: typed, from: placeOf(stated) };
    return stated.parameter === name ? [number, basisStep(axis, stated)] : [number];
  });
}

function basisStep(axis: AxisView, stated: ParameterValue): ProvenanceStep {
  if (stated.unit === "%") {
    const run = axis.quantity("winding_current_rms");
    return {
      label: "Share of",
      text: run.ok ? `run current, ${showRms(run.value)}` : "run current",
      from: "computed",
    };
  }
  if (stated.basis === null) return { label: "Basis", text: "not said", from: "nobody" };
  return { label: "Basis", text: stated.basis, from: "text or key table" };
}

/** The machine's own hardware, where the text sets the current through it. */
function hardwareSteps(axis: AxisView, name: CurrentParameter): ProvenanceStep[] {
  const setPoint = setPointCurrent(axis, name);
  if (setPoint === null) return [];
  const from = "hardware";
  if (!setPoint.ok) return [{ label: "Set-point", text: "not known", from: "nobody" }];
  const sense = axis.hardware.driver?.set_point?.sense_resistance_ohm;
  const resistor =
    sense === undefined
      ? []
      : [{ label: "Sense resistance", text: sense === 0 ? "none" : show(sense, "Ω"), from }];
  return [...resistor, { label: "Set-point", text: setPoint.formula(), from }];
}

function comparison(axis: AxisView, name: CurrentParameter): ProvenanceStep[] {
  const text = textCurrent(axis, name);
  const setPoint = setPointCurrent(axis, name);
  if (!text?.ok || !setPoint?.ok) return [];
  const apart = disagreement(text.value, setPoint.value);
  const agrees = !exceeds(apart, CURRENT_AGREEMENT);
  return [
    {
      label: "Current and set-point",
      text: `${showPercent(apart)} apart: ${agrees ? "they agree" : "neither is used"}`,
      from: "computed",
    },
  ];
}

/**
 * Spread of the current, share of 1: driver, resistor and the last digit typed together. Null for a current given
 * directly: how exactly such a driver keeps it nobody has said.
 */
function tolerance(axis: AxisView, name: CurrentParameter): number | null {
  const method = axis.hardware.driver?.set_point?.method;
  if (method === undefined || method === "direct") return null;
  const resistor = method === "transconductance" ? 0 : RESISTOR_SPREAD;
  const spread = DRIVER_SPREAD + resistor + typingSpread(leading(axis, name));
  return Number.isFinite(spread) ? spread : null;
}

function leading(axis: AxisView, name: CurrentParameter): ParameterValue | undefined {
  return statedParameters(axis, name)[0];
}

/** Register steps are exact; any other number is good to half of its last digit. */
function typingSpread(stated: ParameterValue | undefined): number {
  if (!stated || stated.typed.value === 0 || isRegisterStep(stated.parameter)) return 0;
  const decimals = /\.(\d+)/.exec(stated.source.raw)?.[1]?.length ?? 0;
  return (0.5 * 10 ** -decimals) / Math.abs(stated.typed.value);
}

function isRegisterStep(parameter: ParameterName): boolean {
  return parameterDefinition(parameter).dimension === "count";
}
