import type { KeyRule, KeyTable } from "@/lib/domain/key-table";
import { parameterDefinition } from "@/lib/domain/parameters";
import type { Layer } from "@/lib/domain/readings";
import type { AxisShape } from "./types";

/** What a key feeds. `axis` as the assembly spells it; null for the machine, or with `fault` where the axis is not known. */
export interface Target {
  readonly rule: KeyRule;
  readonly axis: string | null;
  /** Why the rule cannot be used: it names no axis though it needs one, or one that the machine does not have. */
  readonly fault: "axis-missing" | "axis-unknown" | null;
}

/** Rules by key in lower case. */
export interface CompiledTable {
  readonly keys: ReadonlyMap<string, readonly Target[]>;
  /** `KEY.{axis}` rules by `key.0`, `key.1` ...; they count for list elements only. */
  readonly elements: ReadonlyMap<string, readonly Target[]>;
  /** Keys whose elements some rule names, with `true` where one does so by `{axis}`. */
  readonly lists: ReadonlyMap<string, boolean>;
  /** Rules with `{axis}` as the texts after it by the text before it, to recognise axes that the machine does not have. */
  readonly patterns: ReadonlyMap<string, ReadonlySet<string>>;
}

const AXIS = "{axis}";
const AXIS_ELEMENT = `.${AXIS}`;

/** Prepares a key table for look-ups. Rules that name another layer than the one read are left out. */
export function compileTable({
  keyTable,
  axes,
  layer,
}: {
  keyTable: KeyTable;
  axes: readonly AxisShape[];
  layer?: Layer | undefined;
}): CompiledTable {
  const keys = new Map<string, Target[]>();
  const elements = new Map<string, Target[]>();
  const lists = new Map<string, boolean>();
  const patterns = new Map<string, Set<string>>();
  for (const rule of keyTable.rules) {
    if (rule.layer && layer && rule.layer !== layer) continue;
    const key = rule.key.toLowerCase();
    notePattern(patterns, key);
    for (const [name, target] of expand(rule, key, axes)) add(keys, name, target);
    for (const [name, target] of expandElements(rule, key, axes)) add(elements, name, target);
    noteList(lists, key);
  }
  return { keys, elements, lists, patterns };
}

function add(map: Map<string, Target[]>, key: string, target: Target): void {
  const targets = map.get(key);
  if (!targets) map.set(key, [target]);
  else if (!targets.some((other) => sameTarget(other, target))) targets.push(target);
}

function sameTarget(one: Target, other: Target): boolean {
  return one.axis === other.axis && one.rule.parameter === other.rule.parameter && !one.fault && !other.fault;
}

function notePattern(patterns: Map<string, Set<string>>, key: string): void {
  const at = key.indexOf(AXIS);
  if (at < 0) return;
  const before = key.slice(0, at);
  const after = key.slice(at + AXIS.length);
  const known = patterns.get(before);
  if (known) known.add(after);
  else patterns.set(before, new Set([after]));
}

function expand(rule: KeyRule, key: string, axes: readonly AxisShape[]): [string, Target][] {
  if (parameterDefinition(rule.parameter).scope === "machine")
    return [[key, { rule, axis: null, fault: null }]];
  if (!key.includes(AXIS)) return [[key, namedTarget(rule, axes)]];
  return axes.map(({ axis }) => [key.replaceAll(AXIS, axis.toLowerCase()), { rule, axis, fault: null }]);
}

/** The axis that the rule names; without one, the axis of a machine that has but one. */
function namedTarget(rule: KeyRule, axes: readonly AxisShape[]): Target {
  const wanted = rule.axis?.toLowerCase();
  if (wanted === undefined) {
    const [only] = axes.length === 1 ? axes : [];
    return only ? { rule, axis: only.axis, fault: null } : { rule, axis: null, fault: "axis-missing" };
  }
  const found = axes.find(({ axis }) => axis.toLowerCase() === wanted);
  return found ? { rule, axis: found.axis, fault: null } : { rule, axis: null, fault: "axis-unknown" };
}

function expandElements(rule: KeyRule, key: string, axes: readonly AxisShape[]): [string, Target][] {
  const base = axisListOf(key);
  if (base === null) return [];
  return axes.map(({ axis }, index) => [`${base}.${index}`, { rule, axis, fault: null }]);
}

/** The list key of a rule whose last segment is `{axis}` alone; null for any other rule. */
function axisListOf(key: string): string | null {
  if (!key.endsWith(AXIS_ELEMENT)) return null;
  const base = key.slice(0, -AXIS_ELEMENT.length);
  return base === "" || base.includes(AXIS) ? null : base;
}

function noteList(lists: Map<string, boolean>, key: string): void {
  const byAxis = axisListOf(key);
  if (byAxis !== null) lists.set(byAxis, true);
  const base = /^(.+)\.\d+$/.exec(key)?.[1];
  if (base !== undefined && !lists.has(base)) lists.set(base, false);
}
