import type { Document, Entry } from "@/lib/parsers/types";
import type { MergeSide } from "./merge-types";

/** The value of an enabled key, or one element of its list, as one text has it. */
export interface ValuePlace {
  readonly key: string;
  readonly path: string;
  readonly line: number;
  readonly start: number;
  readonly end: number;
  readonly raw: string;
}

/** The same place in the three texts. */
export interface PlaceTrio {
  /** Key, occurrence from 0, element of its list: the same in all three. */
  readonly slot: Slot;
  /** Null where both sides added the key. */
  readonly base: ValuePlace | null;
  readonly ours: ValuePlace;
  readonly theirs: ValuePlace;
}

interface Slot {
  readonly key: string;
  readonly occurrence: number;
  readonly element: number | null;
  /** How often the key stands in the text. */
  readonly total: number;
}

export function slotName({ slot: { key, occurrence, element } }: PlaceTrio): string {
  return `${key}#${occurrence}${element === null ? "" : `.${element}`}`;
}

type Index = ReadonlyMap<string, readonly Entry[]>;

/** Enabled entries by key, in the order of the text. */
function indexOf(document: Document | null): Index {
  const index = new Map<string, Entry[]>();
  for (const entry of document?.entries ?? []) {
    if (entry.disabled) continue;
    const known = index.get(entry.key);
    if (known) known.push(entry);
    else index.set(entry.key, [entry]);
  }
  return index;
}

export type DocumentTrio = { readonly [side in MergeSide]: Document | null };

/**
 * Places that can be told apart by their key in all three texts, or in both sides where the base lacks the key. A key
 * that stands more often in one text than in another is left to the lines, and so is a value of several lines.
 */
export function pairPlaces(documents: DocumentTrio): PlaceTrio[] {
  const [base, ours, theirs] = [indexOf(documents.base), indexOf(documents.ours), indexOf(documents.theirs)];
  const found: PlaceTrio[] = [];
  for (const [key, own] of ours) {
    const [others, before] = [theirs.get(key) ?? [], base.get(key) ?? []];
    if (others.length !== own.length || ![0, own.length].includes(before.length)) continue;
    own.forEach((entry, occurrence) => {
      const other = others[occurrence];
      const was = before[occurrence] ?? null;
      if (other)
        found.push(
          ...pairEntries({
            documents,
            slot: { key, occurrence, element: null, total: own.length },
            was,
            entry,
            other,
          }),
        );
    });
  }
  return found.filter((trio) => !/[\r\n]/.test(`${trio.base?.raw ?? ""}${trio.ours.raw}${trio.theirs.raw}`));
}

interface EntryTrio {
  readonly documents: DocumentTrio;
  readonly slot: Slot;
  readonly was: Entry | null;
  readonly entry: Entry;
  readonly other: Entry;
}

function pairEntries({ documents, slot, was, entry, other }: EntryTrio): PlaceTrio[] {
  const elements = elementsOf([entry, other, ...(was ? [was] : [])]);
  const slots =
    elements === null ? [slot] : Array.from({ length: elements }, (_, element) => ({ ...slot, element }));
  return slots.flatMap((own) => {
    const ours = placeOf(documents.ours, entry, own.element);
    const theirs = placeOf(documents.theirs, other, own.element);
    const base = was && placeOf(documents.base, was, own.element);
    return ours && theirs ? [{ slot: own, base, ours, theirs }] : [];
  });
}

/** Number of elements where all are lists of one length. */
function elementsOf(entries: readonly Entry[]): number | null {
  const lengths = entries.map(({ value }) => (value.kind === "list" ? value.items.length : null));
  const [first] = lengths;
  return first !== undefined && lengths.every((length) => length === first) ? first : null;
}

function placeOf(document: Document | null, entry: Entry, element: number | null): ValuePlace | null {
  const item = element !== null && entry.value.kind === "list" ? entry.value.items[element] : null;
  if (!document || item === undefined) return null;
  const { start, end, line } = item?.span ?? entry.valueSpan;
  const key = element === null ? entry.key : `${entry.key}.${element}`;
  return { key, path: document.path, line, start, end, raw: document.text.slice(start, end) };
}

/** Where the slots of a text stand; null where a key does not stand as often as it should. */
export function findPlaces(
  document: Document,
  trios: readonly PlaceTrio[],
): ReadonlyMap<PlaceTrio, ValuePlace> | null {
  const index = indexOf(document);
  const found = new Map<PlaceTrio, ValuePlace>();
  for (const trio of trios) {
    const { key, occurrence, element, total } = trio.slot;
    const entries = index.get(key) ?? [];
    const entry = entries[occurrence];
    const place = entry && placeOf(document, entry, element);
    if (!place || entries.length !== total) return null;
    found.set(trio, place);
  }
  return found;
}

export interface Splice {
  readonly start: number;
  readonly end: number;
  readonly raw: string;
}

/** The text with other spellings at some places. */
export function splice(text: string, splices: readonly Splice[]): string {
  const parts: string[] = [];
  let at = 0;
  for (const { start, end, raw } of [...splices].sort((one, other) => one.start - other.start)) {
    if (start < at) continue;
    parts.push(text.slice(at, start), raw);
    at = end;
  }
  return [...parts, text.slice(at)].join("");
}
