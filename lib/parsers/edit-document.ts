import { isLineEnd } from "./chars";
import { parseText } from "./parse-text";
import type { Document, Edit, Entry, Format } from "./types";

export interface RefusedEdit {
  readonly edit: Edit;
  readonly reason: string;
}

export interface EditResult {
  readonly document: Document;
  readonly refused: readonly RefusedEdit[];
}

interface Splice {
  readonly edit: Edit;
  readonly start: number;
  readonly end: number;
}

/**
 * Writes new values into a document. Only the spans of those values change; everything else stays byte for
 * byte. An edit that the format would read as anything but that one value is refused with a reason.
 */
export function editDocument(document: Document, edits: readonly Edit[]): EditResult {
  const refused: RefusedEdit[] = [];
  const splices: Splice[] = [];
  for (const edit of edits) {
    const placed = place(document, edit);
    if (typeof placed === "string") refused.push({ edit, reason: placed });
    else splices.push(placed);
  }
  splices.sort((a, b) => a.start - b.start);
  const apart = dropOverlaps(splices, refused);
  return { document: applyAll(document, apart, refused), refused };
}

function place(document: Document, edit: Edit): Splice | string {
  const entry = document.entries[edit.entry];
  if (!entry) return "The text has no such key.";
  const span = edit.element === null ? entry.valueSpan : elementSpan(entry, edit.element);
  if (!span) return `“${entry.key}” on line ${entry.keySpan.line} has no element ${edit.element}.`;
  if (!readsAlone(document.format, edit))
    return `“${edit.raw}” cannot stand as one value on line ${span.line}; the text is left as it was.`;
  return { edit, start: span.start, end: span.end };
}

function elementSpan(entry: Entry, element: number): Entry["valueSpan"] | null {
  return entry.value.kind === "list" ? (entry.value.items[element]?.span ?? null) : null;
}

/** A text of each format that holds nothing but the one key “k” with a value, and one whose value is a list. */
const ALONE: Record<
  Format,
  { readonly value: (raw: string) => string; readonly element: (raw: string) => string }
> = {
  lines: { value: (raw) => `k = ${raw}`, element: (raw) => `k = {${raw},0}` },
  defines: { value: (raw) => `#define k ${raw}`, element: (raw) => `#define k {${raw},0}` },
  json: { value: (raw) => `{"k": ${raw}}`, element: (raw) => `{"k": [${raw},0]}` },
  toml: { value: (raw) => `k = ${raw}`, element: (raw) => `k = [${raw},0]` },
  properties: { value: (raw) => `k=${raw}`, element: (raw) => `k=[${raw},0]` },
  env: { value: (raw) => `k=${raw}`, element: (raw) => `k=${raw}` },
  csv: { value: (raw) => `key,value\nk,${raw}`, element: (raw) => `k,${raw}` },
  yaml: { value: (raw) => `k: ${raw}`, element: (raw) => `k:\n- ${raw}\n- 0` },
};

/** A value of these formats ends with its line. */
const ONE_LINE: readonly Format[] = ["lines"];

/** Whether the format reads the new spelling, on a line of its own, as one value and nothing else. */
function readsAlone(format: Format, { raw, element }: Edit): boolean {
  if (ONE_LINE.includes(format) && [...raw].some((char) => isLineEnd(char.charCodeAt(0)))) return false;
  const text = element === null ? ALONE[format].value(raw) : ALONE[format].element(raw);
  const { entries, diagnostics } = parseText({ path: "", text, format });
  const [only] = entries;
  if (!only || entries.length > 1 || diagnostics.length > 0 || only.comment !== null) return false;
  if (element === null) return only.raw === raw.trim();
  return (
    only.value.kind === "list" && only.value.items.length === 2 && only.value.items[0]?.raw === raw.trim()
  );
}

/** Of edits that touch the same stretch, keeps the one that begins first. */
function dropOverlaps(splices: readonly Splice[], refused: RefusedEdit[]): Splice[] {
  const kept: Splice[] = [];
  for (const splice of splices) {
    const last = kept[kept.length - 1];
    const same = last && last.edit.entry === splice.edit.entry && last.start === splice.start;
    const shared = last && last.start === splice.start && last.end === splice.end && !same;
    if (shared && last.edit.raw === splice.edit.raw && splice.end > splice.start) continue;
    if (last && (splice.start < last.end || same))
      refused.push({ edit: splice.edit, reason: "Another edit already changes this value." });
    else kept.push(splice);
  }
  return kept;
}

/** Applies all splices; where the outcome reads otherwise than meant, halves them to find the one at fault. */
function applyAll(document: Document, splices: readonly Splice[], refused: RefusedEdit[]): Document {
  const [first] = splices;
  if (!first) return document;
  const next = parseText({
    path: document.path,
    text: spliced(document.text, splices),
    format: document.format,
  });
  if (readsAsMeant(document, next, splices)) return next;
  if (splices.length === 1) {
    const reason = `“${first.edit.raw}” would change how the rest of the text is read; the text is left as it was.`;
    refused.push({ edit: first.edit, reason });
    return document;
  }
  const middle = splices.length >> 1;
  const front = applyAll(document, splices.slice(0, middle), refused);
  const moved = front.text.length - document.text.length;
  const back = splices.slice(middle).map((s) => ({ ...s, start: s.start + moved, end: s.end + moved }));
  return applyAll(front, back, refused);
}

function spliced(text: string, splices: readonly Splice[]): string {
  const parts: string[] = [];
  let at = 0;
  for (const { edit, start, end } of splices) {
    parts.push(text.slice(at, start), edit.raw);
    at = end;
  }
  parts.push(text.slice(at));
  return parts.join("");
}

function readsAsMeant(before: Document, after: Document, splices: readonly Splice[]): boolean {
  if (after.entries.length !== before.entries.length) return false;
  const touched = new Map<number, Map<number | null, string>>();
  for (const { edit } of splices) {
    const place = placeOf(before, edit.entry);
    const raws = touched.get(place) ?? new Map<number | null, string>();
    touched.set(place, raws.set(edit.element, edit.raw.trim()));
  }
  return before.entries.every((entry, id) => {
    const next = after.entries[id];
    return next !== undefined && sameBut(entry, next, touched.get(placeOf(before, id)));
  });
}

/** Keys that repeat one value by an alias have one place and change together; a missing value is its key's own. */
function placeOf({ format, entries }: Document, id: number): number {
  if (format !== "yaml") return id;
  const entry = entries[id];
  return entry && entry.raw !== "" ? entry.valueSpan.start : -1 - id;
}

/** Same key in the same state, with the values as edited and the rest unchanged. */
function sameBut(was: Entry, is: Entry, raws: ReadonlyMap<number | null, string> | undefined): boolean {
  if (is.key !== was.key || is.disabled !== was.disabled || is.shadowed !== was.shadowed) return false;
  if (is.comment !== was.comment) return false;
  if (!raws) return is.raw === was.raw;
  if (raws.has(null)) return is.raw === raws.get(null);
  if (was.value.kind !== "list" || is.value.kind !== "list") return false;
  const { items } = is.value;
  if (items.length !== was.value.items.length) return false;
  return was.value.items.every((item, index) => items[index]?.raw === (raws.get(index) ?? item.raw));
}
