import type { KeyTable } from "@/lib/domain/key-table";
import type { Layer } from "@/lib/domain/readings";
import { canonicalUnit } from "@/lib/domain/units";
import type { Document, Entry } from "@/lib/parsers/types";
import type { AxisShape } from "./types";

const AXIS = "{axis}";
/** So many keys are looked at; a text with more is hardly a configuration. */
const MOST_KEYS = 5000;
/** Inside a word, as in `{axis}_max`, only a short name is taken for one, since any word could stand there. */
const SHORT_NAME = /^[a-z]\d?$/i;
const SEGMENT = /^[^.]+/;

/** A rule's key around its `{axis}`. */
interface Pattern {
  readonly before: string;
  readonly after: string;
  readonly unit: string | undefined;
}

export interface TextsAndTable {
  readonly documents: readonly Document[];
  readonly keyTable: KeyTable;
  readonly layer?: Layer | undefined;
}

/**
 * The axes that the texts themselves speak of, in the order in which the key table finds them: for a check without
 * hardware. An axis with a unit of angle among its keys is rotary, any other linear.
 */
export function axesOfTexts({ documents, keyTable, layer }: TextsAndTable): AxisShape[] {
  const patterns = patternsOf(keyTable, layer);
  const found = new Map<string, AxisShape>();
  for (const rule of keyTable.rules) if (rule.axis !== undefined) note(found, rule.axis, rule.unit);
  const entries = documents.flatMap((document) => document.entries.filter((entry) => !entry.disabled));
  for (const entry of entries.slice(0, MOST_KEYS))
    for (const pattern of patterns) {
      const name = nameIn(entry.key, pattern);
      if (name !== null) note(found, name, unitOf(entry) ?? pattern.unit);
    }
  return [...found.values()];
}

function patternsOf({ rules }: KeyTable, layer: Layer | undefined): Pattern[] {
  return rules.flatMap(({ key, unit, layer: own }) => {
    const at = key.toLowerCase().indexOf(AXIS);
    if (at < 0 || (own && layer && own !== layer)) return [];
    const [before, after] = [key.slice(0, at), key.slice(at + AXIS.length)];
    return [{ before: before.toLowerCase(), after: after.toLowerCase(), unit }];
  });
}

/** The axis name that stands in a key where the pattern has `{axis}`; null where the key does not fit. */
function nameIn(key: string, { before, after }: Pattern): string | null {
  if (!key.slice(0, before.length).toLowerCase().startsWith(before)) return null;
  const rest = key.slice(before.length);
  const whole = (before === "" || before.endsWith(".")) && (after === "" || after.startsWith("."));
  const length = whole ? (SEGMENT.exec(rest)?.[0].length ?? 0) : rest.length - after.length;
  const name = rest.slice(0, Math.max(0, length));
  if (name === "" || rest.slice(length).toLowerCase() !== after) return null;
  return whole || SHORT_NAME.test(name) ? name : null;
}

function unitOf({ value }: Entry): string | undefined {
  return value.kind === "number" ? (value.unit ?? undefined) : undefined;
}

function note(found: Map<string, AxisShape>, name: string, unit: string | undefined): void {
  const key = name.toLowerCase();
  const before = found.get(key) ?? { axis: name, kind: "linear" };
  found.set(key, isAngular(unit) ? { ...before, kind: "rotary" } : before);
}

function isAngular(unit: string | undefined): boolean {
  const name = unit === undefined ? null : canonicalUnit(unit);
  return name !== null && /deg|rad/.test(name);
}
