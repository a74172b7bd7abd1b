import { diagnosticList, type DiagnosticList } from "@/lib/parsers/diagnostic-list";
import { parameterDefinition, type ParameterName } from "@/lib/domain/parameters";
import type { KeyTable } from "@/lib/domain/key-table";
import type { Layer } from "@/lib/domain/readings";
import { plural } from "@/lib/domain/sentences";
import type { Span } from "@/lib/domain/span";
import type { UnitContext } from "@/lib/domain/units";
import type { Scalar } from "@/lib/parsers/scalar";
import type { Document, Entry } from "@/lib/parsers/types";
import { axesOfTexts } from "./axes-of-texts";
import { compileTable, type CompiledTable, type Target } from "./compile";
import { readParameter, type Reading } from "./read-value";
import type { AxisShape } from "./types";

export interface ResolveInput {
  readonly documents: readonly Document[];
  readonly keyTable: KeyTable;
  /** In the machine's order; none: those that the texts speak of (`axesOfTexts`). */
  readonly axes: readonly AxisShape[];
  /** Layer that the texts were read from; rules of another layer do not apply. */
  readonly layer?: Layer | undefined;
}

/** A place in a text that a rule makes a parameter of. */
export interface Place {
  /** Index of its document. */
  readonly file: number;
  readonly document: Document;
  readonly entry: Entry;
  /** Index in the entry's list; null for the whole value. */
  readonly element: number | null;
  readonly key: string;
  readonly span: Span;
  readonly raw: string;
  readonly value: Scalar;
  readonly target: Target;
}

export interface Resolved {
  readonly place: Place;
  readonly reading: Reading;
}

export interface Resolution {
  /** What counts, by `parameterKey`. */
  readonly values: ReadonlyMap<string, Resolved>;
  /** Every enabled place of each parameter, counting or not. */
  readonly places: ReadonlyMap<string, readonly Place[]>;
  /** Enabled places that no rule names. */
  readonly unmapped: readonly UnmappedPlace[];
  readonly diagnostics: readonly DiagnosticList[];
  /** Those given, or those that the texts speak of. */
  readonly axes: readonly AxisShape[];
  /** Unit context of an axis (any case); of the machine for null. */
  readonly contextOf: (axis: string | null) => UnitContext;
}

export interface UnmappedPlace {
  readonly file: number;
  readonly entry: Entry;
  readonly element: number | null;
  readonly key: string;
}

export function parameterKey(axis: string | null, parameter: ParameterName): string {
  return `${axis?.toLowerCase() ?? ""}\u0000${parameter}`;
}

/** Finds which value of the texts counts for each parameter. */
export function resolve(given: ResolveInput): Resolution {
  const input = given.axes.length > 0 ? given : { ...given, axes: axesOfTexts(given) };
  const table = compileTable(input);
  const found: Found = {
    table,
    places: new Map(),
    unmapped: [],
    diagnostics: input.documents.map(() => diagnosticList()),
    axes: input.axes,
  };
  input.documents.forEach((document, file) => {
    for (const entry of document.entries)
      if (!entry.disabled && !entry.shadowed) collect(found, { document, file, entry });
  });
  reportUnknownAxes(found);
  const contexts = new Map<string, UnitContext>();
  const contextOf = (axis: string | null): UnitContext =>
    contexts.get(axis?.toLowerCase() ?? "") ?? { kind: "linear" };
  for (const shape of input.axes) contexts.set(shape.axis.toLowerCase(), bareContext(shape));
  const values = new Map<string, Resolved>();
  settle(found, values, contextOf, (parameter) => BASE_OF_UNITS.has(parameter));
  for (const shape of input.axes) contexts.set(shape.axis.toLowerCase(), fullContext(shape, values));
  settle(found, values, contextOf, (parameter) => !BASE_OF_UNITS.has(parameter));
  return {
    axes: input.axes,
    values,
    places: found.places,
    unmapped: found.unmapped,
    diagnostics: found.diagnostics,
    contextOf,
  };
}

/** Parameters that the conversion of step-based units rests on. */
const BASE_OF_UNITS: ReadonlySet<ParameterName> = new Set(["steps_per_mm", "microsteps"]);

interface Found {
  readonly table: CompiledTable;
  readonly places: Map<string, Place[]>;
  readonly unmapped: UnmappedPlace[];
  readonly diagnostics: readonly DiagnosticList[];
  readonly axes: readonly AxisShape[];
}

interface At {
  readonly document: Document;
  readonly file: number;
  readonly entry: Entry;
}

function collect(found: Found, at: At): void {
  const { entry, file } = at;
  const key = entry.key.toLowerCase();
  const targets = found.table.keys.get(key);
  if (entry.value.kind === "list") return collectList(found, at, targets);
  if (!targets) {
    found.unmapped.push({ file, entry, element: null, key: entry.key });
    return;
  }
  const { document } = at;
  const { valueSpan: span, raw, value } = entry;
  for (const target of targets)
    addPlace(found, { document, file, entry, element: null, key: entry.key, span, raw, value, target });
}

function collectList(found: Found, at: At, whole: readonly Target[] | undefined): void {
  const { entry, file } = at;
  const key = entry.key.toLowerCase();
  if (entry.value.kind !== "list") return;
  const { items } = entry.value;
  if (!found.table.lists.has(key)) {
    if (whole) reportWholeList(found, at, items.length);
    else found.unmapped.push({ file, entry, element: null, key: entry.key });
    return;
  }
  items.forEach(({ span, raw, value }, element) => {
    const name = `${key}.${element}`;
    const targets = [...(found.table.keys.get(name) ?? []), ...(found.table.elements.get(name) ?? [])];
    const elementKey = `${entry.key}.${element}`;
    if (targets.length === 0) found.unmapped.push({ file, entry, element, key: elementKey });
    for (const target of targets)
      addPlace(found, { ...at, element, key: elementKey, span, raw, value, target });
  });
  if (found.table.lists.get(key) && items.length !== found.axes.length) reportLength(found, at, items.length);
}

function reportWholeList(found: Found, { entry, file }: At, length: number): void {
  const message = `“${entry.key}” on line ${entry.valueSpan.line} is a list of ${length}, and the key table takes it for one value. It is kept and not used; name its elements in the key table: “${entry.key}.0” or “${entry.key}.{axis}”.`;
  found.diagnostics[file]?.add("list-length", "warning", entry.valueSpan, message);
}

function reportLength(found: Found, { entry, file }: At, length: number): void {
  const message = `“${entry.key}” on line ${entry.valueSpan.line} has ${plural(length, "element")}, and the machine has ${plural(found.axes.length, "axis", "axes")}. The elements count for the axes in their order; check that none is missing.`;
  found.diagnostics[file]?.add("list-length", "warning", entry.valueSpan, message);
}

function addPlace(found: Found, place: Place): void {
  const { target } = place;
  if (target.fault) return reportFault(found, place);
  if (parameterDefinition(target.rule.parameter).scope === "axis" && target.axis === null) return;
  const key = parameterKey(target.axis, target.rule.parameter);
  const places = found.places.get(key);
  if (!places) found.places.set(key, [place]);
  else if (!isSamePlace(places[places.length - 1], place)) places.push(place);
}

/** Two rules can make the same parameter of one place; they are tried one after the other. */
function isSamePlace(one: Place | undefined, other: Place): boolean {
  return one?.entry === other.entry && one.file === other.file && one.element === other.element;
}

function reportFault(found: Found, { target, key, span, file }: Place): void {
  const { parameter, axis } = target.rule;
  const { label } = parameterDefinition(parameter);
  const what =
    target.fault === "axis-missing"
      ? `The key table makes “${key}” on line ${span.line} the ${label.toLowerCase()} of an axis without saying which.`
      : `The key table makes “${key}” on line ${span.line} the ${label.toLowerCase()} of an axis “${axis}”, which this machine does not have.`;
  found.diagnostics[file]?.add(
    "axis-unknown",
    "warning",
    span,
    `${what} It is kept and not used; name one of the machine's axes in the key table.`,
  );
}

/** So many unmapped keys are looked at for axes that the machine does not have. */
const MOST_UNKNOWN = 500;
const AXIS_NAME = /^[a-z]\d?$/;
const LONGEST_AXIS_NAME = 2;

/** One sentence for each short axis name that the key table's patterns find in the text and the machine lacks. */
function reportUnknownAxes({ table, unmapped, axes, diagnostics }: Found): void {
  const known = new Set(axes.map(({ axis }) => axis.toLowerCase()));
  const seen = new Map<string, { place: UnmappedPlace; count: number }>();
  if (known.size === 0) return;
  for (const place of unmapped.slice(0, MOST_UNKNOWN)) {
    const name = axisByPattern(place.entry.key.toLowerCase(), table);
    if (name === null || known.has(name)) continue;
    const before = seen.get(name);
    seen.set(name, { place: before?.place ?? place, count: (before?.count ?? 0) + 1 });
  }
  for (const [name, { place, count }] of seen) {
    const { line } = place.entry.keySpan;
    const message = `From line ${line} on ${plural(count, "key is", "keys are")} for an axis “${name}”, which this machine does not have. They are kept and not used.`;
    diagnostics[place.file]?.add("axis-unknown", "warning", place.entry.keySpan, message);
  }
}

function axisByPattern(key: string, { patterns }: CompiledTable): string | null {
  for (const [before, afters] of patterns) {
    if (!key.startsWith(before)) continue;
    for (let length = 1; length <= LONGEST_AXIS_NAME; length++) {
      const end = before.length + length;
      const name = key.slice(before.length, end);
      if (AXIS_NAME.test(name) && afters.has(key.slice(end))) return name;
    }
  }
  return null;
}

function bareContext({ kind, travelPerTurn }: AxisShape): UnitContext {
  return { kind, travelPerTurn };
}

/** Steps per metre or radian: the text's own scale, else full steps · microsteps ÷ travel of a turn. */
function fullContext(shape: AxisShape, values: ReadonlyMap<string, Resolved>): UnitContext {
  const { axis, kind, travelPerTurn, fullStepsPerTurn } = shape;
  const scale = values.get(parameterKey(axis, "steps_per_mm"))?.reading.value;
  const microsteps = values.get(parameterKey(axis, "microsteps"))?.reading.value;
  const own = scale === undefined ? undefined : scale * (kind === "rotary" ? 180 / Math.PI : 1000);
  const expected =
    fullStepsPerTurn !== undefined && microsteps !== undefined && travelPerTurn
      ? (fullStepsPerTurn * microsteps) / travelPerTurn
      : undefined;
  return { kind, travelPerTurn, stepsPerUnit: own ?? expected };
}

type ContextOf = (axis: string | null) => UnitContext;

function settle(
  found: Found,
  values: Map<string, Resolved>,
  contextOf: ContextOf,
  wanted: (parameter: ParameterName) => boolean,
): void {
  for (const [key, places] of found.places) {
    const first = places[0];
    if (!first || !wanted(first.target.rule.parameter)) continue;
    const winner = choose(found, places, contextOf);
    if (!winner) continue;
    const reading = read(winner, contextOf);
    if (reading.ok) values.set(key, { place: winner, reading });
    else report(found, winner, reading.code, reading.reason);
  }
}

function read(place: Place, contextOf: ContextOf) {
  const { value, raw, document, target } = place;
  const context = contextOf(target.axis);
  return readParameter({ value, raw, format: document.format, rule: target.rule, context });
}

function report(
  found: Found,
  place: Place,
  code: Parameters<DiagnosticList["add"]>[0],
  reason: string,
): void {
  const message = `“${place.key}” on line ${place.span.line} ${reason}. The text is kept; the value is not used.`;
  found.diagnostics[place.file]?.add(code, "error", place.span, message);
}

/** The place that counts: the last unconditional one; else a conditional one, if all of them say the same. */
function choose(found: Found, places: readonly Place[], contextOf: ContextOf): Place | null {
  const always = places.filter(({ entry }) => entry.conditions.length === 0);
  const winner = always[always.length - 1] ?? places[places.length - 1];
  if (!winner) return null;
  for (const place of always)
    if (place !== winner && place.file === winner.file && !sameReading(place, winner, contextOf))
      reportOverruled(found, place, winner);
  const conditional = places.filter(({ entry }) => entry.conditions.length > 0);
  if (conditional.length === 0) return winner;
  const differing = conditional.filter((place) => place !== winner && !sameReading(place, winner, contextOf));
  if (always.length > 0) {
    for (const place of differing) reportConditional(found, place, `line ${winner.span.line} counts`);
    return winner;
  }
  if (differing.length > 0) {
    reportConditional(found, conditional[0] ?? winner, "no value counts, since the branches differ");
    return null;
  }
  if (!coversAll(conditional)) reportConditional(found, winner, "it is taken to hold");
  return winner;
}

/** Whether an `#else` is among the branches, so that one of them holds in any case. */
function coversAll(places: readonly Place[]): boolean {
  return places.some(({ entry }) => entry.conditions[entry.conditions.length - 1]?.startsWith("#else"));
}

function sameReading(one: Place, other: Place, contextOf: ContextOf): boolean {
  const a = read(one, contextOf);
  const b = read(other, contextOf);
  if (!a.ok || !b.ok) return one.raw === other.raw;
  return a.unit === b.unit && a.basis === b.basis && Math.abs(a.value - b.value) <= 1e-12 * Math.abs(b.value);
}

function reportOverruled(found: Found, place: Place, winner: Place): void {
  const { label } = parameterDefinition(place.target.rule.parameter);
  const message = `“${place.key}” on line ${place.span.line} and “${winner.key}” on line ${winner.span.line} both set the ${label.toLowerCase()}, and the later one counts. Both are kept; delete the one that is not wanted.`;
  found.diagnostics[place.file]?.add("duplicate-key", "warning", place.span, message);
}

function reportConditional(found: Found, { entry, key, span, file }: Place, outcome: string): void {
  const condition = entry.conditions[entry.conditions.length - 1] ?? "";
  const message = `“${key}” on line ${span.line} holds only under “${condition}”; ${outcome}. Everything is kept; take the condition away, or check the text that the compiler sees.`;
  found.diagnostics[file]?.add("conditional-value", "warning", span, message);
}
