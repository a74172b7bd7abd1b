import { levelRank } from "@/lib/domain/levels";
import type { Level } from "@/lib/domain/levels";
import type { ParameterName } from "@/lib/domain/parameters";
import { fromRms } from "@/lib/physics/current-conventions";
import { LEAST_REFERENCE_VOLTAGE } from "@/lib/physics/set-point";
import { exceeds, judged, judgeUpper, upperSign } from "./assessment";
import type { Assessment, Judged } from "./assessment";
import { currentParameters, lower, set } from "./candidates";
import { axisRule } from "./check";
import type { Candidate } from "./clearing";
import { axisPath, fromText, gather, given, missing, setPoint, unusable } from "./data";
import { CURRENT_AGREEMENT, disagreement, textCurrent } from "./quantities/current";
import { setPointCurrent, setPointParameter, SET_POINT_READS } from "./quantities/set-point-current";
import type { CurrentParameter } from "./quantities/set-point-current";
import { formatNumber } from "@/lib/domain/units";
import { plain, show, showRms } from "./show";
import type { AxisView, Datum, Missing } from "./types";

/** A text's sense resistance may differ from the machine's by this share: the tolerance of the resistor. */
const SENSE_AGREEMENT = 0.01;

type Part = Judged | Missing;

function methodOf(axis: AxisView) {
  return axis.hardware.driver?.set_point?.method;
}

/** The register step of the run current: below half of the scale microsteps are coarse, above its end there is nothing. */
function scalePart(axis: AxisView, parameter: "current_scale" | "hold_scale"): Part | null {
  if (methodOf(axis) !== "digital_scale" || !axis.parameter(parameter)) return null;
  const parts = gather({ scale: fromText(axis, parameter), steps: setPoint(axis, "steps") });
  if (!parts.ok) return parts;
  const { scale, steps } = parts.values;
  const verdict = judgeUpper({ value: scale, limit: steps - 1, near: steps - 1, unit: "" });
  const coarse = parameter === "current_scale" && scale < steps / 2;
  const level = verdict.level === "within" && coarse ? "near" : verdict.level;
  const name = parameter === "current_scale" ? "current scale" : "hold scale";
  return judged(
    { ...verdict, level, nearLimit: null },
    {
      assumed: parts.assumed,
      sentence: () => `The ${name} stands at ${plain(scale)} of ${plain(steps - 1)}${SCALE_WORDS[level]}`,
      formula: () => `${plain(scale)} ${upperSign(verdict)} ${plain(steps)} − 1`,
    },
  );
}

const SCALE_WORDS = {
  over: ": the register ends there.",
  near: ", less than half: the sense resistor is too small for this current, and microsteps are coarse.",
  within: ".",
} as const;

/** The text's current beside what its set-point gives on the machine's own hardware. */
function agreementPart(axis: AxisView, name: CurrentParameter): Part | null {
  const text = textCurrent(axis, name);
  const fromSetPoint = setPointCurrent(axis, name);
  if (fromSetPoint === null) return null;
  if (!fromSetPoint.ok) return fromSetPoint;
  if (text === null) return onlySetPoint(axis, name);
  if (!text.ok) return text;
  const apart = disagreement(text.value, fromSetPoint.value);
  const verdict = judgeUpper({ value: apart, limit: CURRENT_AGREEMENT, near: CURRENT_AGREEMENT, unit: "" });
  const what = name === "run_current" ? "run current" : "hold current";
  return judged(
    { ...verdict, value: Number.isFinite(apart) ? apart : null },
    {
      assumed: fromSetPoint.assumed,
      sentence: () =>
        verdict.level === "over"
          ? `The text states a ${what} of ${showRms(text.value)}, but what it sets gives ${showRms(fromSetPoint.value)}. Neither is used until they agree.`
          : `The ${what} of ${showRms(text.value)} agrees with what the text sets, ${showRms(fromSetPoint.value)}.`,
      formula: () =>
        `|${text.formula()} / (${fromSetPoint.formula()}) − 1| = ${formatNumber(apart, 2)} ${upperSign(verdict)} ${CURRENT_AGREEMENT}`,
    },
  );
}

/** A set-point alone contradicts nothing. */
function onlySetPoint(axis: AxisView, name: CurrentParameter): Part | null {
  const found = setPointCurrent(axis, name);
  if (name === "hold_current" || !found?.ok) return null;
  return {
    ok: true,
    level: "within",
    value: found.value,
    limit: null,
    nearLimit: null,
    limitSense: null,
    margin: null,
    unit: "A",
    assumed: found.assumed,
    sentence: () => `What the text sets gives ${showRms(found.value)}; it states no other current.`,
    formula: found.formula,
  };
}

/**
 * What is missing where the text says nothing that could be held against its current. A register step is the very value
 * of this check, so a driver that has one cannot be checked without it; beside a reference voltage or a direct current
 * that the text does not repeat there is nothing to compare, and the check has no meaning.
 */
function nothingToCompare(axis: AxisView): Missing | null {
  const method = methodOf(axis);
  if (method === undefined) return missing(axisPath(axis, "driver.set_point.method"));
  if (method === "digital_scale") return missing(axisPath(axis, "current_scale"));
  return axis.parameter("run_current") ? null : missing(axisPath(axis, "run_current"));
}

/** Share by which the current in the winding differs from what the firmware reckons, given its own sense resistance. */
function currentRatio(axis: AxisView, stated: number): Datum {
  const method = methodOf(axis);
  if (method === "transconductance") return given(1);
  const internal = setPoint(axis, "internal_resistance_ohm");
  const parts = gather({
    sense: setPoint(axis, "sense_resistance_ohm"),
    internal:
      method === "digital_scale" ? internal : given(internal.ok && method === "direct" ? internal.value : 0),
  });
  if (!parts.ok) return parts;
  const own = parts.values.sense + parts.values.internal;
  if (own === 0)
    return unusable(
      "The text reckons with a sense resistance, but the driver is recorded without a sense resistor.",
      axisPath(axis, "driver.set_point.sense_resistance_ohm"),
    );
  return given((stated + parts.values.internal) / own);
}

/** The sense resistance that the text reckons with beside the machine's own, which counts. */
function sensePart(axis: AxisView): Part | null {
  const found = axis.parameter("sense_resistance");
  if (!found) return null;
  const machine = setPoint(axis, "sense_resistance_ohm");
  // Both say that there is no resistor, and there is nothing to compare.
  if (found.value === 0 && machine.ok && machine.value === 0) return null;
  const stated = fromText(axis, "sense_resistance", "positive");
  const parts = gather({
    stated,
    own: machine,
    ratio: stated.ok ? currentRatio(axis, stated.value) : stated,
  });
  if (!parts.ok) return parts;
  const { stated: reckoned, own, ratio } = parts.values;
  const apart = Math.abs(ratio - 1);
  const verdict = judgeUpper({ value: apart, limit: CURRENT_AGREEMENT, near: SENSE_AGREEMENT, unit: "" });
  const differs = exceeds(Math.abs(reckoned / own - 1), SENSE_AGREEMENT);
  const level = verdict.level === "over" ? "over" : differs ? "near" : "within";
  return judged(
    { ...verdict, level },
    {
      assumed: parts.assumed,
      sentence: () =>
        level === "within"
          ? `The text reckons with the sense resistance that the machine has, ${show(own, "Ω")}.`
          : `The text reckons with a sense resistance of ${show(reckoned, "Ω")}, the machine has ${own === 0 ? "no sense resistor" : show(own, "Ω")}${carriedWords(axis, ratio)}`,
      formula: () =>
        `|${plain(ratio)} − 1| = ${formatNumber(apart, 2)} ${upperSign(verdict)} ${CURRENT_AGREEMENT} in current, from ${show(reckoned, "Ω")} beside ${show(own, "Ω")}`,
    },
  );
}

/** What the winding then really carries. */
function carriedWords(axis: AxisView, ratio: number): string {
  const text = textCurrent(axis, "run_current");
  const fromSetPoint = setPointCurrent(axis, "run_current");
  if (fromSetPoint?.ok === true)
    return `: the winding carries ${showRms(fromSetPoint.value)}, where the firmware reckons ${showRms(fromSetPoint.value / ratio)}.`;
  if (text?.ok === true)
    return `: the winding then carries ${showRms(text.value * ratio)} in place of ${showRms(text.value)}.`;
  return `: the winding then carries ${plain(ratio)} times the current that the firmware reckons.`;
}

/** The gravest part leads; what else is the matter follows in words, so that it is not hidden behind it. */
function assess(axis: AxisView): Assessment {
  const parts = [
    scalePart(axis, "current_scale"),
    agreementPart(axis, "run_current"),
    sensePart(axis),
    scalePart(axis, "hold_scale"),
    agreementPart(axis, "hold_current"),
  ].filter((part) => part !== null);
  const [first, ...rest] = [...parts].sort((one, other) => rank(one) - rank(other));
  if (!first) return nothingToCompare(axis);
  if (!first.ok) return joined(parts);
  const others = rest.filter((part) => part.ok && part.level !== "within");
  const all = [first, ...others];
  const low = lowReference(axis);
  if (low === null) return { ...first, sentence: () => all.map(sentenceOf).join(" ") };
  return {
    ...first,
    // Value and limit stay those of the leading part, and say nothing of where this caution begins.
    ...(first.level === "within" && { level: "near", nearLimit: null }),
    sentence: () => [...all.map(sentenceOf), lowWords(low)].join(" "),
  };
}

/** The reference voltage of the text, V, where the driver takes its current from it and it is too low; else null. */
function lowReference(axis: AxisView): number | null {
  if (setPointParameter(axis, "run_current") !== "reference_voltage") return null;
  const voltage = fromText(axis, "reference_voltage");
  return voltage.ok && exceeds(LEAST_REFERENCE_VOLTAGE, voltage.value) ? voltage.value : null;
}

function lowWords(voltage: number): string {
  return `A reference voltage of ${show(voltage, "V")} is below ${show(LEAST_REFERENCE_VOLTAGE, "V")}: the driver's offsets and noise weigh heavily there, and the current is uncertain; a larger sense resistor or a smaller gain lifts it.`;
}

function rank(part: Part): number {
  const level: Level = part.ok ? part.level : "cannot";
  return levelRank(level);
}

function sentenceOf(part: Part): string {
  return part.ok ? part.sentence() : part.reason;
}

/** Everything that is missing of the parts together. */
function joined(parts: readonly Part[]): Missing {
  const lack = gather(Object.fromEntries(parts.map((part, index) => [index, part.ok ? given(0) : part])));
  return lack.ok ? missing() : lack;
}

/** Agreement is reached by lowering the greater of the two currents; the resistance by writing the machine's own. */
function candidates(axis: AxisView): Candidate[] {
  const own = setPoint(axis, "sense_resistance_ohm");
  const steps = setPoint(axis, "steps");
  const scales: ParameterName[] = ["current_scale", "hold_scale"];
  return [
    ...agreeing(axis, "run_current"),
    ...agreeing(axis, "hold_current"),
    ...(own.ok ? set(axis, "sense_resistance", own.value) : []),
    ...(steps.ok ? scales.flatMap((scale) => lower(axis, scale)) : []),
  ];
}

function agreeing(axis: AxisView, name: CurrentParameter): Candidate[] {
  const text = textCurrent(axis, name);
  const found = setPointCurrent(axis, name);
  const stated = axis.parameter(name);
  if (!text?.ok || !found?.ok || !stated) return [];
  const matching = stated.unit === "%" ? null : fromRms(found.value, stated.basis ?? "rms");
  const toSetPoint = matching === null ? [] : set(axis, name, matching);
  if (text.value > found.value) return toSetPoint;
  const reference: Candidate[] = [];
  const parameter = axis.parameter(found.parameter);
  if (parameter && found.value > 0 && found.parameter === "reference_voltage")
    reference.push(...set(axis, found.parameter, (parameter.value * text.value) / found.value));
  return [...reference, ...lower(axis, found.parameter), ...toSetPoint];
}

export const SET_POINT = axisRule({
  id: "set-point",
  title: "Current set-point",
  compares:
    "The register step with its scale; the text's current with what its set-point gives on the machine's own hardware; the text's sense resistance with the machine's own; its reference voltage with the least that drivers work well with.",
  formula: "CS ≤ N − 1; |I_text/I_set − 1| ≤ 7 %; |Rs,text/Rs − 1| ≤ 1 %; V_ref ≥ 0.5 V",
  source:
    "Driver data sheets (upper half of the scale for fine microsteps; reference voltage not below about 0.5 V, from memory); 7 % = 5 % driver + 1 % resistor + rounding",
  needs: [
    "run_current",
    "hold_current",
    "reference_voltage",
    "current_scale",
    "hold_scale",
    "sense_resistance",
    ...SET_POINT_READS,
  ],
  margin:
    "near below half of the scale, where the sense resistance differs by more than 1 %, or where the reference voltage is below 0.5 V; over above full scale, or where currents differ by more than 7 %",
  caution: null,
  parameters: (axis) => [
    ...new Set<ParameterName>([
      ...currentParameters(axis, "run_current"),
      "sense_resistance",
      ...currentParameters(axis, "hold_current"),
    ]),
  ],
  candidates,
  assess,
});
