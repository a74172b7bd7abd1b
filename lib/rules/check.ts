import type { Finding } from "@/lib/domain/findings";
import type { ParameterName } from "@/lib/domain/parameters";
import { joinWords, plural } from "@/lib/domain/sentences";
import type { ParameterValue } from "@/lib/domain/values";
import type { Assessment, Judged } from "./assessment";
import { clearingValue } from "./clearing";
import type { Candidate, Probe } from "./clearing";
import { missingSentence } from "./missing-words";
import { coupledNames } from "./quantities/shared-motors";
import { plain } from "./show";
import type { AxisView, Missing, Rule, RuleContext, RuleVerdict } from "./types";

interface CheckWords extends Omit<Rule, "evaluate" | "judge"> {
  /** The caution stands on every finding, not only where something is the matter. */
  readonly cautionAlways?: boolean;
}

/** A check of each axis by itself. */
export interface AxisCheck extends CheckWords {
  /** Parameters that the value rests on, the leading one first. */
  readonly parameters: (axis: AxisView) => readonly ParameterName[];
  readonly assess: (axis: AxisView) => Assessment;
  /** Parameters whose change may end `over`, the preferred one first; none where only hardware helps. */
  readonly candidates?: (axis: AxisView) => readonly Candidate[];
  /** Motors that move together with those of another axis bear on this check. */
  readonly coupled?: boolean;
}

/** A check of the whole machine. */
export interface MachineCheck extends CheckWords {
  readonly parameters: readonly ParameterName[];
  readonly assess: (context: RuleContext) => Assessment;
  readonly candidates: (context: RuleContext) => readonly Candidate[];
}

/** A row of the table from a check of each axis: one finding for each axis on which the check has a meaning. */
export function axisRule(check: AxisCheck): Rule {
  return {
    ...words(check),
    evaluate: ({ axes }) => axes.flatMap((axis) => axisFinding(check, axis)),
    judge: ({ axes }) => axes.flatMap((axis) => verdict(axis.axis, check.assess(axis))),
  };
}

/** A row of the table from a check of the machine. */
export function machineRule(check: MachineCheck): Rule {
  return {
    ...words(check),
    evaluate: (context) => machineFinding(check, context),
    judge: (context) => verdict(null, check.assess(context)),
  };
}

function verdict(axis: string | null, assessment: Assessment): RuleVerdict[] {
  return assessment === null ? [] : [{ axis, assessment }];
}

function words({ id, title, compares, formula, source, needs, margin, caution }: CheckWords) {
  return { id, title, compares, formula, source, needs: [...new Set(needs)].sort(), margin, caution };
}

function axisFinding(check: AxisCheck, axis: AxisView): Finding[] {
  const assessment = check.assess(axis);
  if (assessment === null) return [];
  const probe: Probe = ({ parameter }, value) => levelOf(check.assess(axis.withValue(parameter, value)));
  const names = check.parameters(axis);
  const stated = names.flatMap((name) => axis.parameter(name) ?? []);
  return [
    finding({
      check,
      assessment,
      axis: axis.axis,
      leading: names.slice(0, 1),
      stated,
      note: `${check.coupled === true ? coupledNote(axis) : ""}${refinedNote(check, axis)}`,
      clear: () => clearingValue(check.candidates?.(axis) ?? [], probe),
    }),
  ];
}

function machineFinding(check: MachineCheck, context: RuleContext): Finding[] {
  const assessment = check.assess(context);
  if (assessment === null) return [];
  const probe: Probe = ({ view, parameter }, value) =>
    levelOf(check.assess(context.withValue(view.axis, parameter, value)));
  return [
    finding({
      check,
      assessment,
      axis: null,
      leading: check.parameters.slice(0, 1),
      stated: check.parameters.flatMap((name) => context.axes.flatMap((axis) => axis.parameter(name) ?? [])),
      note: "",
      clear: () => clearingValue(check.candidates(context), probe),
    }),
  ];
}

function levelOf(assessment: Assessment) {
  if (assessment === null) return "within";
  return assessment.ok ? assessment.level : "cannot";
}

/** Crossed belts and the like: what a move of both axes at once asks of one motor is not what one axis alone asks. */
function coupledNote(axis: AxisView): string {
  const others = coupledNames(axis);
  if (others.length === 0) return "";
  const named = `${others.length === 1 ? "axis" : "axes"} ${joinWords(others)}`;
  return ` Its motors move together with those of ${named}: when they move at once, one motor turns with the sum of their speeds and carries its part of every load.`;
}

/** A thermal resistance that is this machine's own, where the check rests on it; the catalog's value is never hidden. */
function refinedNote({ needs }: CheckWords, { hardware: { refined = [] } }: AxisView): string {
  const told = refined.filter(({ field }) => needs.includes(`motor.${field}`));
  return told
    .map(
      ({ field, value, high, catalog, readings }) =>
        ` Its thermal resistance from ${field.startsWith("case") ? "case" : "winding"} to ambient is refined from ${plural(readings, "temperature")} measured on this machine; the catalog says ${plain(catalog)} K/W. The check takes the upper end of the 95 % interval, ${plain(high)} K/W, in place of its middle, ${plain(value)} K/W.`,
    )
    .join("");
}

interface Parts {
  readonly check: CheckWords;
  readonly assessment: Judged | Missing;
  readonly axis: string | null;
  /** The parameter to name even where the text does not have it. */
  readonly leading: readonly ParameterName[];
  readonly stated: readonly ParameterValue[];
  readonly note: string;
  readonly clear: () => Finding["clearingValue"];
}

function finding(parts: Parts): Finding {
  return parts.assessment.ok
    ? judgedFinding(parts, parts.assessment)
    : cannotFinding(parts, parts.assessment);
}

function namesOf({ leading, stated }: Parts): ParameterName[] {
  return [...new Set([...leading, ...stated.map(({ parameter }) => parameter)])];
}

function judgedFinding(parts: Parts, judged: Judged): Finding {
  const { check, axis, stated, note, clear } = parts;
  const { level } = judged;
  // Written out field by field: spreads of such wide objects cost more than the physics.
  return {
    ruleId: check.id,
    level,
    axis,
    parameters: namesOf(parts),
    sentence: judged.sentence() + note,
    value: judged.value,
    limit: judged.limit,
    nearLimit: judged.nearLimit,
    limitSense: judged.limitSense,
    margin: judged.margin,
    unit: judged.unit,
    formula: judged.formula(),
    source: check.source,
    caution: level !== "within" || check.cautionAlways === true ? check.caution : null,
    spans: stated.map(({ source }) => source),
    clearingValue: level === "over" ? clear() : null,
    needs: [],
    assumed: judged.assumed,
  };
}

function cannotFinding(parts: Parts, lack: Missing): Finding {
  const { check, axis, stated } = parts;
  return {
    ruleId: check.id,
    level: "cannot",
    axis,
    parameters: namesOf(parts),
    sentence: missingSentence(lack, axis),
    value: null,
    limit: null,
    nearLimit: null,
    limitSense: null,
    margin: null,
    unit: "",
    formula: check.formula,
    source: check.source,
    caution: check.cautionAlways === true ? check.caution : null,
    spans: stated.map(({ source }) => source),
    clearingValue: null,
    needs: lack.needs,
    assumed: [],
  };
}
