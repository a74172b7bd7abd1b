import { readdirSync, readFileSync } from "node:fs";
import { describe, expect, it } from "vitest";
import { editDocument } from "@/lib/parsers/edit-document";
import { decodeBytes, encodeText } from "@/lib/parsers/encoding";
import { parseText } from "@/lib/parsers/parse-text";
import { stringify } from "@/lib/parsers/stringify";
import { FORMATS, type Document, type Entry, type ParsedValue } from "@/lib/parsers/types";

function folder(format: string): URL {
  return new URL(`../../corpus/${format}/`, import.meta.url);
}

function files(format: string): string[] {
  return readdirSync(folder(format)).filter((name) => !name.endsWith(".expected.json"));
}

function read(format: string, name: string) {
  const bytes = new Uint8Array(readFileSync(new URL(name, folder(format))));
  const decoded = decodeBytes(bytes);
  if (!decoded.ok) throw new Error(decoded.diagnostic.message);
  return { bytes, decoded, document: parseText({ path: name, text: decoded.text }) };
}

function short(value: ParsedValue): unknown {
  switch (value.kind) {
    case "number":
      return value.unit === null ? value.value : [value.value, value.unit];
    case "list":
      return value.items.map((item) => short(item.value));
    case "none":
      return null;
    default:
      return value.value;
  }
}

function row({ keySpan, key, value, comment, disabled, shadowed, conditions }: Entry) {
  return {
    line: keySpan.line,
    key,
    value: short(value),
    ...(comment === null ? {} : { comment }),
    ...(disabled ? { disabled } : {}),
    ...(shadowed ? { shadowed } : {}),
    ...(conditions.length === 0 ? {} : { conditions }),
  };
}

function summary({ format, entries, diagnostics }: Document) {
  return {
    format,
    entries: entries.map(row),
    diagnostics: diagnostics.map(({ code, span }) => [span?.line ?? null, code]),
  };
}

describe.each(FORMATS)("the corpus of %s", (format) => {
  it.each(files(format))("%s reads as written down beside it", (name) => {
    const expected: unknown = JSON.parse(
      readFileSync(new URL(`${name}.expected.json`, folder(format)), "utf8"),
    );
    expect(summary(read(format, name).document)).toEqual(expected);
  });

  it.each(files(format))("%s comes back byte for byte", (name) => {
    const { bytes, decoded, document } = read(format, name);
    expect(encodeText(stringify(document), decoded)).toEqual({ ok: true, bytes });
  });

  it.each(files(format))("%s takes a new number in each place of one, and back", (name) => {
    const { document } = read(format, name);
    for (const entry of document.entries.filter(({ value }) => value.kind === "number")) {
      const { start, end } = entry.valueSpan;
      const { document: edited, refused } = editDocument(document, [
        { entry: entry.id, element: null, raw: "4711" },
      ]);
      expect(refused).toEqual([]);
      expect(edited.text).toBe(`${document.text.slice(0, start)}4711${document.text.slice(end)}`);
      const back = editDocument(edited, [{ entry: entry.id, element: null, raw: entry.raw }]);
      expect(back.document.text).toBe(document.text);
    }
  });
});
