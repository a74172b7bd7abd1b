import type { Span } from "@/lib/domain/span";
import { diagnosticList } from "./diagnostic-list";
import { LineIndex } from "./line-index";
import type { Scalar } from "./scalar";
import type { Entry, ListItem, ParsedValue } from "./types";

/** A key table's key has at most so many characters; a longer path of sections is cut, so that keys stay small. */
const LONGEST_PATH = 200;

/** Tables in tables, lists in lists: so deep a text is read; what lies deeper is kept and reported. */
export const MOST_DEPTH = 32;

const ALWAYS: readonly string[] = [];

/** A value as its format spells it: offsets into the text and what they say. */
export interface ScalarAt {
  readonly start: number;
  readonly end: number;
  readonly value: Scalar;
}

/** A table, object or map of a text: the names on the way to it, and which of its own names count. */
export class Section {
  readonly prefix: string;
  readonly counting = new Map<string, Subtree>();

  constructor(readonly path: readonly string[]) {
    this.prefix = path.join(".").slice(0, LONGEST_PATH);
  }

  child(name: string): Section {
    return new Section([...this.path, name.slice(0, LONGEST_PATH)]);
  }
}

/** The entries that one name of a section brings; `to` is exclusive. */
interface Subtree {
  readonly keyStart: number;
  readonly from: number;
  to: number;
}

/** An entry of a nested text: offsets into it; spans are made when asked for. */
export class TreeEntry implements Entry {
  id = 0;
  disabled = false;
  shadowed = false;
  comment: string | null = null;
  conditions: readonly string[] = ALWAYS;
  private commentStart = -1;
  private commentEnd = -1;

  constructor(
    private readonly lines: LineIndex,
    private readonly text: string,
    private readonly section: Section,
    readonly at: {
      readonly name: string;
      readonly keyStart: number;
      readonly keyEnd: number;
      readonly start: number;
      readonly end: number;
      readonly value: ParsedValue;
    },
  ) {}

  get value(): ParsedValue {
    return this.at.value;
  }

  get key(): string {
    return this.section.prefix === "" ? this.at.name : `${this.section.prefix}.${this.at.name}`;
  }

  get path(): readonly string[] {
    return [...this.section.path, this.at.name];
  }

  get raw(): string {
    return this.text.slice(this.at.start, this.at.end);
  }

  get keySpan(): Span {
    return this.lines.span(this.at.keyStart, this.at.keyEnd);
  }

  get valueSpan(): Span {
    return this.lines.span(this.at.start, this.at.end);
  }

  get commentSpan(): Span | null {
    return this.commentStart < 0 ? null : this.lines.span(this.commentStart, this.commentEnd);
  }

  /** The first comment behind an entry on its line is its own. */
  setComment(start: number, end: number, said: string): void {
    if (this.commentStart >= 0) return;
    this.commentStart = start;
    this.commentEnd = end;
    this.comment = said;
  }
}

/** Where a name stands that brings a value. */
export interface NameAt {
  readonly name: string;
  readonly start: number;
  readonly end: number;
}

/** Collects the entries of a nested text in its order. */
export class TreeBuilder {
  readonly lines: LineIndex;
  readonly entries: TreeEntry[] = [];
  readonly diagnostics = diagnosticList();
  readonly root = new Section([]);

  constructor(readonly text: string) {
    this.lines = new LineIndex(text);
  }

  scalar(section: Section, name: NameAt, at: ScalarAt): TreeEntry {
    return this.add(section, name, at);
  }

  /** A list of plain values is one entry; `start` and `end` include its brackets. */
  list(
    section: Section,
    name: NameAt,
    list: { readonly start: number; readonly end: number; readonly items: readonly ScalarAt[] },
  ): TreeEntry {
    const items = list.items.map((item): ListItem => {
      const { start, end, value } = item;
      return { raw: this.text.slice(start, end), span: this.lines.span(start, end), value };
    });
    return this.add(section, name, { start: list.start, end: list.end, value: { kind: "list", items } });
  }

  private add(
    section: Section,
    { name, start: keyStart, end: keyEnd }: NameAt,
    { start, end, value }: { readonly start: number; readonly end: number; readonly value: ParsedValue },
  ): TreeEntry {
    const entry = new TreeEntry(this.lines, this.text, section, {
      name,
      keyStart,
      keyEnd,
      start,
      end,
      value,
    });
    entry.id = this.entries.length;
    this.entries.push(entry);
    return entry;
  }

  /** Begins what a name brings; an earlier thing of that name in the section no longer counts, and that is said. */
  open(section: Section, { name, start }: NameAt): Subtree {
    const before = section.counting.get(name);
    const subtree = { keyStart: start, from: this.entries.length, to: this.entries.length };
    section.counting.set(name, subtree);
    if (before) this.shadow(before, { name, start, section });
    return subtree;
  }

  close(subtree: Subtree): void {
    subtree.to = this.entries.length;
  }

  /** Puts entries that were found late, such as those in comments, where they stand in the text. */
  inOrder(): void {
    this.entries.sort((a, b) => a.at.keyStart - b.at.keyStart || a.id - b.id);
    this.entries.forEach((entry, id) => (entry.id = id));
  }

  private shadow(
    before: Subtree,
    { name, start, section }: { readonly name: string; readonly start: number; readonly section: Section },
  ): void {
    for (let i = before.from; i < before.to; i++) {
      const entry = this.entries[i];
      if (entry && !entry.disabled) entry.shadowed = true;
    }
    const key = section.prefix === "" ? name : `${section.prefix}.${name}`;
    const span = this.lines.span(before.keyStart, before.keyStart + 1);
    const message = `“${key}” on line ${span.line} stands again on line ${this.lines.line(start)}, and the later value counts. Both are kept; delete the one that is not wanted.`;
    this.diagnostics.add("duplicate-key", "warning", span, message);
  }

  /** Something that does not fit the format: kept, not used, and said so. */
  unread(start: number, end: number, what: string): void {
    const span = this.lines.span(start, end);
    const message = `Line ${span.line}, column ${span.column}: ${what} It is kept as it is and not used.`;
    this.diagnostics.add("unreadable-line", "warning", span, message);
  }

  tooDeep(start: number, end: number): void {
    const span = this.lines.span(start, end);
    const message = `From line ${span.line}, column ${span.column} on the text nests deeper than ${MOST_DEPTH} levels. What lies deeper is kept and not used; a configuration needs fewer levels.`;
    this.diagnostics.add("too-deep", "warning", span, message);
  }
}
