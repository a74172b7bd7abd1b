import { needsBasis, parameterDefinition, parameterRank, type ParameterName } from "@/lib/domain/parameters";
import { joinWords } from "@/lib/domain/sentences";
import { canonicalUnit, insideUnit, unitDimension, unitFactor, type Dimension } from "@/lib/domain/units";
import type { Basis } from "@/lib/domain/values";
import type { ParsedValue } from "@/lib/parsers/types";
import { CONCEPTS, isNeutral, PHRASES_OF, UNIT_ENDINGS, type Phrase } from "./name-words";
import { NameSplitter } from "./split-name";
import type { AxisShape, Suggestion } from "./types";

export interface SuggestInput {
  readonly key: string;
  readonly raw: string;
  readonly value: ParsedValue;
  readonly comment: string | null;
  readonly axes: readonly AxisShape[];
}

const MOST = 3;
const LEAST_SCORE = 0.35;
const LONGEST_COMMENT = 200;

/** What a key without a rule may be, best first, from its name, unit, comment and the size of its value. At most three. */
export function suggestParameters(input: SuggestInput): Suggestion[] {
  return suggester(input.axes)(input);
}

/** Suggestions for many keys of one machine; remembers the words that their names share. */
export function suggester(axes: readonly AxisShape[]): (input: SuggestInput) => Suggestion[] {
  const axisNames = axes.map(({ axis }) => axis.toLowerCase());
  const splitter = new NameSplitter(axisNames);
  return (input) => {
    const words = splitter.split(input.key);
    return words.some((word) => CONCEPTS.has(word)) ? rank(readName(words, axisNames, input), input) : [];
  };
}

/** What speaks for a parameter. */
interface Evidence {
  readonly phrase: Phrase;
  readonly clue: Clue;
  readonly size: SizeEvidence;
  readonly axis: AxisShape | null;
  readonly score: number;
}

function rank(name: Name, input: SuggestInput): Suggestion[] {
  const best = new Map<ParameterName, Evidence>();
  for (const concept of name.concepts.keys())
    for (const phrase of PHRASES_OF.get(concept) ?? []) {
      const evidence = weigh(phrase, name, input);
      const before = best.get(phrase.parameter);
      if (evidence && evidence.score >= LEAST_SCORE && (before?.score ?? 0) < evidence.score)
        best.set(phrase.parameter, evidence);
    }
  const ranked = [...best.values()].sort(byScore).slice(0, MOST);
  return ranked.map((evidence) => toSuggestion(evidence, name));
}

/** Best first; of equal ones in the order of the parameter list. */
function byScore(a: Evidence, b: Evidence): number {
  return b.score - a.score || parameterRank(a.phrase.parameter) - parameterRank(b.phrase.parameter);
}

function toSuggestion({ phrase, clue, size, axis, score }: Evidence, name: Name): Suggestion {
  const reasons = [nameReason(phrase, name), clue.reason, size.reason].filter((reason) => reason !== null);
  const sentence = `${joinWords(reasons)}.`;
  return {
    parameter: phrase.parameter,
    axis: axis?.axis ?? null,
    unit: clue.unit,
    basis: needsBasis(phrase.parameter) ? name.basis : null,
    score,
    reason: sentence.charAt(0).toUpperCase() + sentence.slice(1),
  };
}

interface Name {
  /** Each concept with the word that says it. */
  readonly concepts: ReadonlyMap<string, string>;
  /** Words that no concept, axis or unit explains. */
  readonly unexplained: number;
  readonly axis: AxisShape | null;
  readonly unit: UnitClue | null;
  readonly basis: Basis | null;
}

interface UnitClue {
  readonly unit: string;
  readonly from: string;
}

function readName(words: readonly string[], axisNames: readonly string[], input: SuggestInput): Name {
  const concepts = new Map<string, string>();
  let unexplained = 0;
  for (const word of words) {
    const says = CONCEPTS.get(word);
    if (says) for (const concept of says) concepts.set(concept, word);
    else if (!isNeutral(word) && !axisNames.includes(word) && !UNIT_WORDS.has(word)) unexplained++;
  }
  const unit = unitClue(words, input);
  return { concepts, unexplained, axis: axisOf(words, input), unit, basis: basisOf(concepts, input) };
}

/** The basis that the name or the comment says. */
function basisOf(concepts: ReadonlyMap<string, string>, { comment }: SuggestInput): Basis | null {
  const said = comment === null ? "" : comment.slice(0, LONGEST_COMMENT).toLowerCase();
  if (concepts.has("rms") || /\brms\b/.test(said)) return "rms";
  return concepts.has("peak") || /\bpeak\b/.test(said) ? "peak" : null;
}

const UNIT_WORDS: ReadonlySet<string> = new Set(UNIT_ENDINGS.flatMap(([ending]) => ending));

/** The axis that a word names, else the only axis there is. */
function axisOf(words: readonly string[], { axes }: SuggestInput): AxisShape | null {
  const named = axes.filter(({ axis }) => words.includes(axis.toLowerCase()));
  if (named.length === 1) return named[0] ?? null;
  return axes.length === 1 ? (axes[0] ?? null) : null;
}

/** The unit that the value, the name or the comment states, in this order. */
function unitClue(words: readonly string[], { value, comment }: SuggestInput): UnitClue | null {
  const written = firstNumber(value)?.unit ?? null;
  const own = written === null ? null : canonicalUnit(written.replace(/[\s_]*(rms|peak|pk)$/i, ""));
  if (own !== null) return { unit: own, from: `the value has the unit ${own}` };
  const ending = UNIT_ENDINGS.find(([tail]) =>
    tail.every((word, i) => words[words.length - tail.length + i] === word),
  );
  if (ending) return { unit: ending[1], from: `the name ends in “${ending[0].join(" ")}”` };
  const said = commentUnit(comment);
  return said === null ? null : { unit: said, from: `the comment says “${said}”` };
}

function commentUnit(comment: string | null): string | null {
  if (comment === null) return null;
  for (const word of comment.slice(0, LONGEST_COMMENT).split(/[\s()[\],;:]+/)) {
    const unit = /^[A-Za-z]$/.test(word) ? null : canonicalUnit(word);
    if (unit !== null) return unit;
  }
  return null;
}

function firstNumber(value: ParsedValue): { value: number; unit: string | null } | null {
  if (value.kind === "number") return value;
  if (value.kind !== "list") return null;
  const item = value.items[0]?.value;
  return item?.kind === "number" ? item : null;
}

function weigh(phrase: Phrase, name: Name, input: SuggestInput): Evidence | null {
  if (!phrase.concepts.every((concept) => name.concepts.has(concept))) return null;
  if (phrase.unless.some((concept) => name.concepts.has(concept))) return null;
  const { scope, dimension } = parameterDefinition(phrase.parameter);
  if (!valueFits(input.value, dimension)) return null;
  const clue = clueFor(phrase.parameter, name, input);
  if (clue === null) return null;
  const size = sizeEvidence(phrase.parameter, clue.unit, input.value);
  const axis = scope === "axis" ? name.axis : null;
  const placed = axis !== null || scope === "machine";
  return { phrase, clue, size, axis, score: score({ phrase, name, clue, size: size.weight, placed }) };
}

function score(evidence: { phrase: Phrase; name: Name; clue: Clue; size: number; placed: boolean }): number {
  const { phrase, name, clue, size, placed } = evidence;
  const unsaid = Math.min(0.2, 0.04 * name.unexplained);
  const sum = phrase.score + (clue.reason === null ? 0 : 0.08) + size + (placed ? 0.04 : -0.04) - unsaid;
  return Math.round(100 * Math.max(0, Math.min(0.98, sum))) / 100;
}

function nameReason(phrase: Phrase, name: Name): string {
  const words = [...new Set(phrase.concepts.map((concept) => `“${name.concepts.get(concept)}”`))];
  return `the name says ${joinWords(words)}`;
}

/** A number for what is measured, yes or no for what is switched. */
function valueFits(value: ParsedValue, dimension: Dimension): boolean {
  const one = value.kind === "list" ? value.items[0]?.value : value;
  if (!one) return false;
  if (dimension !== "boolean") return one.kind === "number";
  if (one.kind === "number") return one.unit === null && (one.value === 0 || one.value === 1);
  return one.kind === "boolean" || one.kind === "none";
}

interface Clue {
  readonly unit: string | null;
  readonly reason: string | null;
}

/** The unit for a parameter; null where what the text says of units speaks against it. */
function clueFor(parameter: ParameterName, { unit, axis }: Name, { value }: SuggestInput): Clue | null {
  const { dimension } = parameterDefinition(parameter);
  const kind = axis?.kind ?? "linear";
  if (dimension === "boolean" || dimension === "count")
    return firstNumber(value)?.unit ? null : { unit: null, reason: null };
  if (dimension === "scale") return { unit: insideUnit("scale", kind), reason: null };
  if (unit === null) return { unit: unitBySize(parameter, value), reason: null };
  const share = parameter === "hold_current" && unit.unit === "%";
  if (share || unitDimension(unit.unit) === dimension) return { unit: unit.unit, reason: unit.from };
  return firstNumber(value)?.unit ? null : { unit: unitBySize(parameter, value), reason: null };
}

/** Currents are typed in A or mA, and no stepper motor of these machines takes 50 A (common practice, no source). */
function unitBySize(parameter: ParameterName, value: ParsedValue): string | null {
  const number = firstNumber(value)?.value;
  if (!needsBasis(parameter) || number === undefined) return null;
  return number >= 50 ? "mA" : number <= 15 ? "A" : null;
}

/** Usual sizes in the inside unit (common practice, no source). */
const USUAL: Partial<Record<ParameterName, readonly [number, number]>> = {
  run_current: [0.05, 12],
  hold_current: [0.01, 12],
  reference_voltage: [0.05, 5],
  current_scale: [0, 255],
  hold_scale: [0, 255],
  sense_resistance: [0.01, 1],
  microsteps: [1, 256],
  steps_per_mm: [1, 20000],
  max_speed: [1e-4, 20],
  acceleration: [1e-3, 200],
  jerk: [0.5, 1e5],
  corner_speed: [1e-5, 0.1],
  corner_deviation: [1e-6, 1e-3],
  pulse_width: [1e-8, 1e-3],
  direction_setup: [1e-9, 1e-3],
  supply_voltage: [5, 120],
  max_step_rate: [1e3, 2e7],
};

interface SizeEvidence {
  readonly weight: number;
  readonly reason: string | null;
}

function sizeEvidence(parameter: ParameterName, unit: string | null, value: ParsedValue): SizeEvidence {
  const usual = USUAL[parameter];
  const number = firstNumber(value)?.value;
  if (!usual || number === undefined || unit === "%") return { weight: 0, reason: null };
  const inside = insideValue(parameter, unit, number);
  if (inside === null) return { weight: 0, reason: null };
  const fits = Math.abs(inside) >= usual[0] && Math.abs(inside) <= usual[1];
  return fits
    ? { weight: 0.05, reason: "its size is usual" }
    : { weight: -0.2, reason: "its size is unusual" };
}

/** A speed, length or time without a unit is held against mm and µs, its commonest ones, for its size only. */
const COMMONEST: Partial<Record<Dimension, number>> = {
  speed: 1e-3,
  acceleration: 1e-3,
  jerk: 1e-3,
  length: 1e-3,
  time: 1e-6,
};

function insideValue(parameter: ParameterName, unit: string | null, number: number): number | null {
  const { dimension } = parameterDefinition(parameter);
  if (unit === null) return number * (COMMONEST[dimension] ?? 1);
  const kind = unit === "1/deg" || unit.startsWith("deg") ? "rotary" : "linear";
  const conversion = unitFactor(unit, dimension, { kind });
  return conversion.ok ? number * conversion.value : null;
}
