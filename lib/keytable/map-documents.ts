import { parameterRank } from "@/lib/domain/parameters";
import type { ParameterValue } from "@/lib/domain/values";
import { resolve, type Resolved, type ResolveInput, type UnmappedPlace } from "./resolve";
import { suggester } from "./suggest";
import type { AxisShape, Mapping, Suggestion, UnmappedKey } from "./types";

type Suggest = ReturnType<typeof suggester>;

/** So many unmapped keys get suggestions; a text with more is hardly a configuration. */
const MOST_SUGGESTED = 1000;

/**
 * Reads the parameters out of the documents of one configuration, in SI units (1/mm or 1/deg for the scale,
 * per cent for a hold current in %). Later files win over earlier ones. What cannot be read is a diagnostic;
 * enabled keys without a rule are listed with suggestions.
 */
export function mapDocuments(input: ResolveInput): Mapping {
  const { axes, values, unmapped, diagnostics } = resolve(input);
  const suggest = suggester(axes);
  return {
    parameters: inOrder([...values.values()].map(toValue), axes),
    unmapped: unmapped.map((place, index) =>
      toUnmapped(place, { ...input, axes }, index < MOST_SUGGESTED ? suggest : null),
    ),
    diagnostics: diagnostics.map((list) => list.all()),
  };
}

/** By axis as the machine has them, the machine's own last, each in the order of the parameter list. */
function inOrder(values: ParameterValue[], axes: readonly AxisShape[]): ParameterValue[] {
  const ranks = new Map(axes.map(({ axis }, index) => [axis, index]));
  const rank = ({ axis }: ParameterValue) => (axis === null ? axes.length : (ranks.get(axis) ?? 0));
  return values.sort((a, b) => rank(a) - rank(b) || parameterRank(a.parameter) - parameterRank(b.parameter));
}

function toValue({ place, reading }: Resolved): ParameterValue {
  const { span, document, raw, key, target } = place;
  return {
    axis: target.axis,
    parameter: target.rule.parameter,
    value: reading.value,
    unit: reading.unit,
    basis: reading.basis,
    typed: reading.typed,
    source: {
      path: document.path,
      line: span.line,
      column: span.column,
      start: span.start,
      end: span.end,
      raw,
      key,
    },
  };
}

/** The suggestions are an own property that is worked out when first read: many a reader of a report needs none. */
function toUnmapped(
  { file, entry, element, key }: UnmappedPlace,
  { documents, axes }: ResolveInput,
  suggest: Suggest | null,
): UnmappedKey {
  const item = element !== null && entry.value.kind === "list" ? entry.value.items[element] : undefined;
  const raw = item?.raw ?? entry.raw;
  const value = item?.value ?? entry.value;
  let found: readonly Suggestion[] | null = suggest ? null : [];
  return {
    path: documents[file]?.path ?? "",
    line: (item?.span ?? entry.keySpan).line,
    key,
    raw,
    get suggestions() {
      return (found ??= suggest?.({ key, raw, value, comment: entry.comment, axes }) ?? []);
    },
  };
}
