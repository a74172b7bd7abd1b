import { needsBasis, parameterDefinition } from "@/lib/domain/parameters";
import { canonicalUnit, unitFactor, type UnitContext } from "@/lib/domain/units";
import type { Basis } from "@/lib/domain/values";
import { editDocument } from "@/lib/parsers/edit-document";
import type { Edit } from "@/lib/parsers/types";
import {
  parameterKey,
  resolve,
  type Place,
  type Resolution,
  type Resolved,
  type ResolveInput,
} from "./resolve";
import { spellValue } from "./spell-value";
import type { ParameterEdit, WriteResult } from "./types";

export interface WriteInput extends ResolveInput {
  readonly edits: readonly ParameterEdit[];
}

type Applied = WriteResult["applied"][number];
type Refused = WriteResult["refused"][number];

/** A value in its inside unit (per cent for a hold current in %), with its basis. */
interface Wanted {
  readonly value: number;
  readonly unit: string;
  readonly basis: Basis | null;
}

type Outcome<T> = ({ readonly ok: true } & T) | { readonly ok: false; readonly reason: string };

interface Planned {
  readonly edit: ParameterEdit;
  readonly place: Place;
  readonly raw: string;
}

const SQRT2 = Math.SQRT2;

/**
 * Writes wanted values into the texts, in the unit, basis and spelling that stand there; nothing else changes.
 * What has no place is refused with a reason. Two edits of one place must agree.
 */
export function writeParameters(input: WriteInput): WriteResult {
  const resolution = withNewScales(input);
  const refused: Refused[] = [];
  const planned: Planned[] = [];
  const taken = new Map<string, Planned>();
  for (const edit of input.edits) {
    const plan = planEdit(edit, { resolution, edits: input.edits });
    const reason = plan.ok ? conflict(plan.planned, taken) : plan.reason;
    if (plan.ok && reason === null) planned.push(plan.planned);
    else refused.push({ axis: edit.axis, parameter: edit.parameter, reason: reason ?? "" });
  }
  return carryOut(input, { planned, refused, resolution });
}

/** The texts read with the wanted scales and microsteps, since speeds in steps/s are to hold with those. */
function withNewScales({ documents, keyTable, axes, layer, edits }: WriteInput): Resolution {
  const resolution = resolve({ documents, keyTable, axes, layer });
  const wanted = new Map(edits.map((edit) => [parameterKey(edit.axis, edit.parameter), edit]));
  const contextOf = (axis: string | null): UnitContext => {
    const context = resolution.contextOf(axis);
    const scale = wanted.get(parameterKey(axis, "steps_per_mm"));
    if (scale) {
      const factor = unitFactor(scale.unit, "scale", context);
      const perUnit = context.kind === "rotary" ? 180 / Math.PI : 1000;
      return factor.ok ? { ...context, stepsPerUnit: scale.value * factor.value * perUnit } : context;
    }
    const microsteps = wanted.get(parameterKey(axis, "microsteps"));
    const was = resolution.values.get(parameterKey(axis, "microsteps"))?.reading.value;
    const ownScale = resolution.values.has(parameterKey(axis, "steps_per_mm"));
    if (!microsteps || !was || ownScale || !context.stepsPerUnit) return context;
    return { ...context, stepsPerUnit: (context.stepsPerUnit * microsteps.value) / was };
  };
  return { ...resolution, contextOf };
}

interface PlanContext {
  readonly resolution: Resolution;
  readonly edits: readonly ParameterEdit[];
}

function planEdit(edit: ParameterEdit, context: PlanContext): Outcome<{ planned: Planned }> {
  const { resolution } = context;
  const standing = resolution.values.get(parameterKey(edit.axis, edit.parameter));
  if (!standing) return { ok: false, reason: whyAbsent(edit, resolution) };
  const { place } = standing;
  if (place.entry.conditions.length > 0)
    return {
      ok: false,
      reason: `${at(place)} stands under “${place.entry.conditions.at(-1)}”; edit the text itself.`,
    };
  const typed = typedValue(edit, standing, context);
  if (!typed.ok) return typed;
  const raw = spellValue(place, typed.value);
  if (raw === null)
    return { ok: false, reason: `${at(place)} has no number that could be changed; edit the text itself.` };
  return { ok: true, planned: { edit, place, raw } };
}

function at({ key, span }: Place): string {
  return `“${key}” on line ${span.line}`;
}

function whyAbsent(edit: ParameterEdit, { places }: Resolution): string {
  const { label } = parameterDefinition(edit.parameter);
  const [place] = places.get(parameterKey(edit.axis, edit.parameter)) ?? [];
  const of = edit.axis === null ? "" : ` of ${edit.axis}`;
  if (!place)
    return `The text has no key for the ${label.toLowerCase()}${of}; add it to the text or the key table.`;
  return `${at(place)} gives no value that counts for the ${label.toLowerCase()}${of}; edit the text itself.`;
}

/** The number to type at a place for a wanted value: converted to the place's basis and unit. */
function typedValue(
  edit: ParameterEdit,
  standing: Resolved,
  context: PlanContext,
): Outcome<{ value: number }> {
  const wanted = insideValue(edit, context.resolution.contextOf(edit.axis));
  if (!wanted.ok) return wanted;
  const fitted = fitBasis(wanted, standing, context, edit);
  if (!fitted.ok) return fitted;
  const { dimension } = parameterDefinition(edit.parameter);
  const { unit } = standing.reading.typed;
  if (dimension === "boolean" || dimension === "count" || unit === null || unit === "%") return fitted;
  const factor = unitFactor(unit, dimension, context.resolution.contextOf(edit.axis));
  return factor.ok ? { ok: true, value: fitted.value / factor.value } : { ok: false, reason: factor.reason };
}

/** A wanted value in its inside unit. */
function insideValue(edit: ParameterEdit, context: UnitContext): Outcome<Wanted> {
  const { dimension } = parameterDefinition(edit.parameter);
  const basis = edit.basis ?? null;
  if (!Number.isFinite(edit.value)) return { ok: false, reason: "The wanted value is no number." };
  if (dimension === "boolean" || dimension === "count")
    return edit.unit.trim() === ""
      ? { ok: true, value: edit.value, unit: "", basis }
      : {
          ok: false,
          reason: `“${edit.unit}” does not fit; the value is a plain ${dimension === "count" ? "count" : "yes or no"}.`,
        };
  if (edit.parameter === "hold_current" && canonicalUnit(edit.unit) === "%")
    return { ok: true, value: edit.value, unit: "%", basis: null };
  const factor = unitFactor(edit.unit, dimension, context);
  if (!factor.ok) return { ok: false, reason: factor.reason };
  return { ok: true, value: edit.value * factor.value, unit: edit.unit, basis };
}

/** Peak is √2 of rms; a hold current in % is of the run current. */
function fitBasis(
  wanted: Wanted,
  { reading, place }: Resolved,
  context: PlanContext,
  edit: ParameterEdit,
): Outcome<{ value: number }> {
  if (!needsBasis(edit.parameter)) return { ok: true, value: wanted.value };
  const toShare = reading.unit === "%";
  const fromShare = wanted.unit === "%";
  if (toShare && fromShare) return { ok: true, value: wanted.value };
  if (!toShare && !fromShare) return changeBasis(wanted, reading.basis, at(place));
  const run = runCurrent(edit.axis, context);
  if (!run.ok) return run;
  if (fromShare) {
    const current = { ...run, value: (run.value * wanted.value) / 100 };
    return changeBasis(current, reading.basis, at(place));
  }
  const same = changeBasis(wanted, run.basis, "the run current");
  if (!same.ok) return same;
  if (run.value === 0)
    return { ok: false, reason: "The run current is 0, so the hold current is no share of it." };
  return { ok: true, value: (100 * same.value) / run.value };
}

function changeBasis(wanted: Wanted, basis: Basis | null, where: string): Outcome<{ value: number }> {
  if (wanted.basis === basis) return { ok: true, value: wanted.value };
  if (basis === null)
    return {
      ok: false,
      reason: `Nobody has said whether ${where} is peak or rms; say it in the key table first.`,
    };
  if (wanted.basis === null) return { ok: false, reason: "Say whether the wanted current is peak or rms." };
  return { ok: true, value: basis === "peak" ? wanted.value * SQRT2 : wanted.value / SQRT2 };
}

/** The run current that will stand after the edits: the wanted one, else the text's. */
function runCurrent(axis: string | null, { resolution, edits }: PlanContext): Outcome<Wanted> {
  const key = parameterKey(axis, "run_current");
  const edit = edits.find((other) => parameterKey(other.axis, other.parameter) === key);
  if (edit) return insideValue(edit, resolution.contextOf(axis));
  const standing = resolution.values.get(key)?.reading;
  if (standing) return { ok: true, value: standing.value, unit: standing.unit, basis: standing.basis };
  return {
    ok: false,
    reason: "The hold current is a share of the run current, and the text has no run current.",
  };
}

/** Why a plan cannot stand beside an earlier one of the same place; null where it can. */
function conflict(plan: Planned, taken: Map<string, Planned>): string | null {
  const { place, raw } = plan;
  const key = `${place.file}:${place.span.start}`;
  const other = taken.get(key);
  if (!other) taken.set(key, plan);
  if (!other || other.raw === raw) return null;
  return `${at(place)} also sets ${describe(other.edit)}, for which another value is wanted.`;
}

function describe({ axis, parameter }: ParameterEdit): string {
  const label = parameterDefinition(parameter).label.toLowerCase();
  return axis === null ? `the ${label}` : `the ${label} of ${axis}`;
}

interface Plan {
  readonly planned: readonly Planned[];
  readonly refused: readonly Refused[];
  readonly resolution: Resolution;
}

function carryOut(input: WriteInput, { planned, refused, resolution }: Plan): WriteResult {
  const applied: Applied[] = [];
  const lost: Refused[] = [];
  const shared = sharedAxes(resolution);
  const texts = input.documents.map((document, file) => {
    const own = planned.filter(({ place }) => place.file === file);
    if (own.length === 0) return document.text;
    const result = editDocument(document, distinctEdits(own));
    const reasons = new Map(
      result.refused.map(({ edit, reason }) => [spot(edit.entry, edit.element), reason]),
    );
    for (const { edit, place } of own) {
      const reason = reasons.get(spot(place.entry.id, place.element));
      const { axis, parameter } = edit;
      if (reason !== undefined) lost.push({ axis, parameter, reason });
      else
        applied.push({
          axis,
          parameter,
          path: document.path,
          line: place.span.line,
          alsoAxes: others(place, shared),
        });
    }
    return result.document.text;
  });
  return { texts, applied, refused: [...refused, ...lost] };
}

function spot(entry: number, element: number | null): string {
  return `${entry}:${element ?? ""}`;
}

/** Two axes with the same wish for one place make one edit. */
function distinctEdits(planned: readonly Planned[]): Edit[] {
  const edits = new Map<string, Edit>();
  for (const { place, raw } of planned) {
    if (raw === place.raw) continue;
    edits.set(spot(place.entry.id, place.element), { entry: place.entry.id, element: place.element, raw });
  }
  return [...edits.values()];
}

/** Axes by the place that counts for their parameter. */
function sharedAxes({ values }: Resolution): ReadonlyMap<string, readonly string[]> {
  const axes = new Map<string, string[]>();
  for (const { place } of values.values()) {
    const { axis } = place.target;
    if (axis !== null) axes.set(sharedKey(place), [...(axes.get(sharedKey(place)) ?? []), axis]);
  }
  return axes;
}

function sharedKey(place: Place): string {
  return `${place.file}:${place.span.start}:${place.target.rule.parameter}`;
}

function others(place: Place, shared: ReadonlyMap<string, readonly string[]>): string[] {
  return (shared.get(sharedKey(place)) ?? []).filter((axis) => axis !== place.target.axis);
}
