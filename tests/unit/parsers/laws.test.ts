import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { editDocument } from "@/lib/parsers/edit-document";
import { inspectText } from "@/lib/parsers/inspect";
import { parseText } from "@/lib/parsers/parse-text";
import { recogniseFormat } from "@/lib/parsers/recognise";
import { stringify } from "@/lib/parsers/stringify";
import { FORMATS, type Document, type Edit, type Entry, type Format } from "@/lib/parsers/types";
import { TEXTS, VALUES } from "./arbitrary-formats";
import { asModel, garbage, lineAndColumn, RUNS, TIMEOUT } from "./arbitrary-texts";

function parse(text: string, format: Format): Document {
  return parseText({ path: "some.conf", text, format });
}

function spansOf(entry: Entry) {
  const items = entry.value.kind === "list" ? entry.value.items.map((item) => item.span) : [];
  return [entry.keySpan, entry.valueSpan, ...(entry.commentSpan ? [entry.commentSpan] : []), ...items];
}

/** Whether each piece begins where the last one ended, from the first character to the last. */
function tiles({ pieces, text }: Document): boolean {
  let at = 0;
  for (let i = 0; i < pieces.length; i += 3) {
    if (pieces[i + 1] !== at || pieces[i + 2]! <= at) return false;
    at = pieces[i + 2]!;
  }
  return at === text.length;
}

/** The first span of a document whose line or column is not the one counted the slow way. */
function misplaced({ entries, text }: Document) {
  return entries.flatMap(spansOf).find((span) => {
    const { line, column } = lineAndColumn(text, span.start);
    return span.line !== line || span.column !== column;
  });
}

describe.each(FORMATS)("texts of the format %s", { timeout: TIMEOUT }, (format) => {
  it("come back byte for byte", () => {
    fc.assert(
      fc.property(TEXTS[format], ({ text }) => {
        const document = parse(text, format);
        expect(stringify(document)).toBe(text);
        expect(tiles(document)).toBe(true);
      }),
      RUNS,
    );
  });

  it("come back byte for byte when they are large", () => {
    fc.assert(
      fc.property(TEXTS[format], fc.integer({ min: 100, max: 400 }), ({ text }, times) => {
        const large = `${text}\n`.repeat(times);
        const document = parse(large, format);
        expect(stringify(document) === large && tiles(document)).toBe(true);
      }),
      { numRuns: 20 },
    );
  });

  it("give the keys, values and comments that were put in, in their order", () => {
    fc.assert(
      fc.property(TEXTS[format], ({ text, entries }) => {
        expect(asModel(parse(text, format)).map(withoutState(format))).toEqual(
          entries.map(withoutState(format)),
        );
      }),
      RUNS,
    );
  });

  it("have spans that cut out what the entry says, with the line and column of their start", () => {
    fc.assert(
      fc.property(TEXTS[format], ({ text }) => {
        const document = parse(text, format);
        for (const { valueSpan, raw } of document.entries)
          expect(text.slice(valueSpan.start, valueSpan.end)).toBe(raw);
        expect(misplaced(document)).toBeUndefined();
      }),
      RUNS,
    );
  });

  it("change in the edited span only, and read as edited", () => {
    fc.assert(
      fc.property(TEXTS[format], VALUES[format], fc.nat(), (model, raw, pick) => {
        const document = parse(model.text, format);
        const entry = document.entries[pick % Math.max(1, document.entries.length)];
        if (!entry) return;
        expectEdited(document, { entry: entry.id, element: null, raw });
      }),
      RUNS,
    );
  });

  it("change in the edited element only", () => {
    fc.assert(
      fc.property(TEXTS[format], fc.integer({ min: 0, max: 9999 }), fc.nat(), (model, number, pick) => {
        const document = parse(model.text, format);
        const lists = document.entries.filter(
          (entry) => entry.value.kind === "list" && entry.value.items.length > 0,
        );
        const entry = lists[pick % Math.max(1, lists.length)];
        if (entry?.value.kind !== "list") return;
        expectEdited(document, {
          entry: entry.id,
          element: pick % entry.value.items.length,
          raw: String(number),
        });
      }),
      RUNS,
    );
  });

  it("change in all edited spans at once as they would one after the other", () => {
    fc.assert(
      fc.property(TEXTS[format], fc.array(VALUES[format], { minLength: 1, maxLength: 5 }), (model, raws) => {
        const document = parse(model.text, format);
        const edits = raws
          .slice(0, document.entries.length)
          .map((raw, entry) => ({ entry, element: null, raw }));
        const together = editDocument(document, edits);
        const oneByOne = edits.reduce((current, edit) => editDocument(current, [edit]).document, document);
        expect(together.document.text).toBe(oneByOne.text);
      }),
      RUNS,
    );
  });

  it("come back byte for byte whatever they hold, without a throw", () => {
    fc.assert(
      fc.property(
        fc.oneof(garbage, fc.string({ unit: "binary" }), fc.string({ unit: "grapheme" })),
        (text) => {
          const document = parse(text, format);
          expect(stringify(document)).toBe(text);
          expect(tiles(document)).toBe(true);
          expect(document.entries.map(({ id }) => id)).toEqual(document.entries.map((_, index) => index));
          for (const entry of document.entries)
            for (const span of spansOf(entry))
              expect({ line: span.line, column: span.column }).toEqual(lineAndColumn(text, span.start));
          inspectText(text);
          recogniseFormat({ path: "a", text });
        },
      ),
      RUNS,
    );
  });

  it("take no edit that would read as anything but one value", () => {
    fc.assert(
      fc.property(TEXTS[format], garbage, fc.nat(), (model, raw, pick) => {
        const document = parse(model.text, format);
        const entry = document.entries[pick % Math.max(1, document.entries.length)];
        if (!entry) return;
        const { document: after, refused } = editDocument(document, [
          { entry: entry.id, element: null, raw },
        ]);
        if (refused.length > 0) expect(after.text).toBe(model.text);
        else expect(after.entries[entry.id]?.raw).toBe(raw.trim());
        expect(after.entries.length).toBe(document.entries.length);
      }),
      RUNS,
    );
  });
});

/** The model of a header does not follow conditions, which can disable an entry. */
function withoutState(format: Format) {
  return ({ disabled, ...entry }: ReturnType<typeof asModel>[number]) =>
    format === "defines" ? entry : { ...entry, disabled };
}

function expectEdited(document: Document, edit: Edit): void {
  const entry = document.entries[edit.entry]!;
  const { value } = entry;
  const span =
    edit.element === null || value.kind !== "list" ? entry.valueSpan : value.items[edit.element]!.span;
  const { document: after, refused } = editDocument(document, [edit]);
  if (refused.length > 0) {
    expect(after.text).toBe(document.text);
    expect(mayRefuse(document, edit)).toBe(true);
    return;
  }
  expect(after.text).toBe(document.text.slice(0, span.start) + edit.raw + document.text.slice(span.end));
  const next = after.entries[edit.entry]!;
  const read =
    edit.element === null || next.value.kind !== "list" ? next.raw : next.value.items[edit.element]!.raw;
  expect(read).toBe(edit.raw);
}

/**
 * A key in a comment, where some values would read as prose, a value on several lines in a line comment, or one in the
 * place of a list with dashes, which stands on lines of its own.
 */
function mayRefuse(document: Document, { entry, raw }: Edit): boolean {
  const { disabled, raw: was } = document.entries[entry]!;
  return disabled || raw.includes("\n") || (document.format === "yaml" && was.startsWith("- "));
}
