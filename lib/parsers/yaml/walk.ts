import {
  isAlias,
  isMap,
  isScalar,
  isSeq,
  Scalar as YamlScalar,
  type Document,
  type Pair,
  type YAMLMap,
  type YAMLSeq,
} from "yaml";
import { isLineEnd } from "../chars";
import { readScalar, type Scalar } from "../scalar";
import { MOST_DEPTH, type NameAt, type ScalarAt, type Section, type TreeBuilder } from "../tree";

/** So many values are read through aliases; a text that multiplies itself further is refused there. */
const MOST_ALIASED = 10_000;

/** A key as it stands, for the disabled keys beside it. */
export interface KeyPlace {
  readonly start: number;
  readonly section: Section;
}

export interface Walk {
  readonly build: TreeBuilder;
  readonly text: string;
  readonly keys: KeyPlace[];
  /** What each anchor marks, as far as the text has been read. */
  readonly anchors: Map<string, unknown>;
  /** Marked values that are being read just now; an alias of one of them would never end. */
  readonly active: Set<unknown>;
  aliased: number;
  told: boolean;
}

/** Where a value goes: under a name of a section, or as a whole into it. */
interface Target {
  readonly section: Section;
  readonly name: NameAt | null;
  readonly depth: number;
  /** Inside an alias: where that stands. Its keys are not those of this place. */
  readonly alias: NameAt | null;
}

export function walkDocument(walk: Walk, { contents }: Document, section: Section): void {
  walkNode(walk, contents, { section, name: null, depth: 0, alias: null });
}

function walkNode(walk: Walk, node: unknown, target: Target): void {
  if (isAlias(node)) return walkAlias(walk, node, target);
  const marked = (isScalar(node) || isMap(node) || isSeq(node)) && node.anchor ? node.anchor : null;
  if (marked !== null && !target.alias) walk.anchors.set(marked, node);
  if (target.depth > MOST_DEPTH) return tellDeep(walk, target);
  if (target.alias && !mayGoOn(walk, target.alias)) return;
  walk.active.add(node);
  if (isMap(node)) walkMap(walk, node, target);
  else if (isSeq(node)) walkList(walk, node, target);
  else if (isScalar(node)) walkScalar(walk, node, target);
  walk.active.delete(node);
}

function tellDeep({ build }: Walk, { name, alias }: Target): void {
  const at = alias ?? name;
  if (at) build.tooDeep(at.start, at.end);
}

/** Counts a value read through an alias, and says once when there are too many. */
function mayGoOn(walk: Walk, { start, end }: NameAt): boolean {
  walk.aliased++;
  if (walk.aliased <= MOST_ALIASED) return true;
  if (!walk.told) {
    const span = walk.build.lines.span(start, end);
    const message = `The alias on line ${span.line}, column ${span.column} multiplies the text beyond ${MOST_ALIASED} values. From there on aliases are kept and not followed; write the values out.`;
    walk.build.diagnostics.add("alias", "error", span, message);
  }
  walk.told = true;
  return false;
}

function walkAlias(
  walk: Walk,
  alias: { source: string; range?: readonly number[] | null | undefined },
  target: Target,
): void {
  const start = alias.range?.[0] ?? 0;
  const place: NameAt = { name: alias.source, start, end: start + alias.source.length + 1 };
  const marked = walk.anchors.get(alias.source);
  if (marked !== undefined && !walk.active.has(marked)) {
    const name = target.name && { ...target.name };
    return walkNode(walk, marked, { ...target, name, depth: target.depth + 1, alias: target.alias ?? place });
  }
  const why =
    marked === undefined ? "has no anchor before it" : "stands inside the very value that it repeats";
  const span = walk.build.lines.span(place.start, place.end);
  const message = `“*${alias.source}” on line ${span.line}, column ${span.column} ${why}. It is kept and not used; write the value out.`;
  walk.build.diagnostics.add("alias", "warning", span, message);
}

function walkMap(walk: Walk, map: YAMLMap, target: Target): void {
  const section = target.name ? target.section.child(target.name.name) : target.section;
  const inner = { ...target, section, depth: target.depth + 1 };
  for (const pair of map.items) walkPair(walk, pair, inner);
  for (const { key, value } of map.items) if (nameOf(key) === MERGE) walkMerged(walk, value, inner);
}

const MERGE = "<<";

function nameOf(key: unknown): string | null {
  if (!isScalar(key)) return null;
  return typeof key.value === "string" ? key.value : (key.source ?? String(key.value));
}

function walkPair(walk: Walk, { key, value }: Pair, target: Target): void {
  const name = nameOf(key);
  const range = isScalar(key) ? key.range : null;
  if (name === MERGE && (isAlias(value) || isSeq(value))) return;
  if (name === null || !range) {
    const at = rangeOf(key) ?? rangeOf(value);
    if (at && !target.alias) walk.build.unread(at.start, at.end, "a key is no plain text.");
    return;
  }
  if (isScalar(key) && key.anchor && !target.alias) walk.anchors.set(key.anchor, key);
  const place = target.alias
    ? { ...target.alias, name }
    : { name, start: range[0], end: trimmed(walk.text, range[0], range[1]) };
  if (!target.alias) walk.keys.push({ start: place.start, section: target.section });
  const subtree = walk.build.open(target.section, place);
  walkNode(walk, value, { ...target, name: place });
  walk.build.close(subtree);
}

function rangeOf(node: unknown): { start: number; end: number } | null {
  if (!isScalar(node) && !isMap(node) && !isSeq(node) && !isAlias(node)) return null;
  return node.range ? { start: node.range[0], end: node.range[1] } : null;
}

/** `<<: *base`: the names of another map that this one does not have itself. YAML 1.2 leaves that to the reader. */
function walkMerged(walk: Walk, value: unknown, target: Target): void {
  const aliases = isSeq(value) ? value.items : [value];
  for (const alias of aliases) {
    const map = isAlias(alias) ? walk.anchors.get(alias.source) : alias;
    const range = rangeOf(alias);
    if (!isMap(map) || !range || walk.active.has(map)) continue;
    const place = target.alias ?? { ...range, name: MERGE };
    tellMerge(walk, place);
    walk.active.add(map);
    for (const pair of map.items) {
      const name = nameOf(pair.key);
      if (name === null || target.section.counting.has(name)) continue;
      if (mayGoOn(walk, place)) walkPair(walk, pair, { ...target, alias: place });
    }
    walk.active.delete(map);
  }
}

function tellMerge({ build }: Walk, { start, end }: NameAt): void {
  const span = build.lines.span(start, end);
  const message = `Line ${span.line} takes the keys of another map in by “<<”. They are read so here; YAML 1.2 does not define it, so check that the machine's reader does the same.`;
  build.diagnostics.add("alias", "note", span, message);
}

function walkList(walk: Walk, list: YAMLSeq, target: Target): void {
  const { name, section } = target;
  const items = list.items.map((item) => (isScalar(item) && !item.anchor ? scalarAt(walk.text, item) : null));
  const plain = items.filter((item): item is ScalarAt => item !== null);
  if (name && plain.length === items.length && list.range) {
    const end = list.flow
      ? list.range[1]
      : Math.max(list.range[0], ...plain.slice(-1).map((item) => item.end));
    walk.build.list(section, name, { start: list.range[0], end, items: plain });
    return;
  }
  const inner = name ? section.child(name.name) : section;
  list.items.forEach((item, index) => {
    const at = rangeOf(item) ?? name ?? { start: 0, end: 0 };
    const place = target.alias
      ? { ...target.alias, name: String(index) }
      : { start: at.start, end: at.end, name: String(index) };
    walkNode(walk, item, { ...target, section: inner, name: place, depth: target.depth + 1 });
  });
}

function walkScalar({ build, text }: Walk, node: YamlScalar, { section, name }: Target): void {
  if (name) build.scalar(section, name, scalarAt(text, node));
}

function scalarAt(text: string, node: YamlScalar): ScalarAt {
  const start = node.range?.[0] ?? 0;
  const end = trimmed(text, start, node.range?.[1] ?? start);
  return { start, end, value: valueOf(text, node, { start, end }) };
}

/** A text over several lines ends before its last line end. */
function trimmed(text: string, start: number, end: number): number {
  let i = end;
  while (i > start && isLineEnd(text.charCodeAt(i - 1))) i--;
  return i;
}

/** By the core schema (YAML 1.2.2, 10.3); a plain number with a unit behind it, a text to YAML, is read with its unit. */
function valueOf(
  text: string,
  { value, type }: YamlScalar,
  { start, end }: { start: number; end: number },
): Scalar {
  if (typeof value === "boolean") return { kind: "boolean", value };
  if (typeof value === "number" && Number.isFinite(value)) return { kind: "number", value, unit: null };
  if (value === null) return { kind: "none" };
  if (typeof value !== "string") return { kind: "text", value: text.slice(start, end) };
  const plain = type === YamlScalar.PLAIN ? readScalar(text, start, end, { c: false }) : null;
  return plain?.kind === "number" && plain.unit !== null && !/^0o/.test(value)
    ? plain
    : { kind: "text", value };
}
