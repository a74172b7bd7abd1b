import { afterEach, describe, expect, it, vi } from "vitest";
import { mapDocuments } from "@/lib/keytable/map-documents";
import { inspectText } from "@/lib/parsers/inspect";
import { parseText } from "@/lib/parsers/parse-text";
import { FORMATS, type Format } from "@/lib/parsers/types";

/**
 * Texts that would make a careless lexer look ahead again and again. Steps are counted, not timed: every character
 * that is looked at is a step, a search counts the distance it covers.
 */
const HOSTILE: Record<string, (size: number) => string> = {
  "open quotes": (size) => `k = ${'\\" '.repeat(size)}`,
  "both quotes open": (size) => `k = ${" \\\" '".repeat(size)}`,
  "open brackets": (size) => `k = ${"[".repeat(size)}`,
  "open brackets before a comma": (size) => `k = a${" (,".repeat(size)}`,
  "nested parentheses": (size) => `k = ${"(".repeat(size)}1${")".repeat(size)}`,
  "one long list": (size) => `k = ${"1, ".repeat(size)}`,
  "text without commas": (size) => "k = some text\n".repeat(size),
  "one word and a mark far away": (size) => `${"word ".repeat(size)}=`,
  "open comments": (size) => "/*\n".repeat(size),
  "comments in a value": (size) => `#define K ${"/* */ 1 ".repeat(size)}`,
  "open strings in headers": (size) => `#define K ${'\\" '.repeat(size)}`,
  "spliced lines": (size) => `#define K ${"\\\n".repeat(size)}1`,
  "nested conditions": (size) => "#if A\n#define K 1\n".repeat(size),
  "alternatives of one condition": (size) => `#if A\n${"#elif B\n#define K 1\n".repeat(size)}#endif\n`,
  "conditional defines taken back": (size) =>
    "#if A\n#define K 1\n#endif\n#if B\n#undef K\n#endif\n".repeat(size),
  "one key again and again": (size) => "k = 1\n".repeat(size),
  "a long section name": (size) => `[${"a".repeat(size)}]\n${"k = 1\n".repeat(size)}`,
  "sections again and again": (size) => "[a.b]\nc.d = 1\n".repeat(size),
  "commented-out keys": (size) => `${"# k 1\n".repeat(size)}k 1\n`,
  "commented-out defines": (size) => `/*\n${" * #define K 1\n".repeat(size)}*/`,
  "nested objects": (size) => '{"a":'.repeat(size),
  "nested objects that close": (size) => `${'{"a":'.repeat(size)}1${"}".repeat(size)}`,
  "objects side by side": (size) => `{"a":[${'{"b":1},'.repeat(size)}1]}`,
  "one member again and again": (size) => `{${'"a":{"b":1},'.repeat(size)}"a":1}`,
  "comments that are no members": (size) => `{${'// "a": b\n'.repeat(size)}}`,
  "closed brackets": (size) => "]}".repeat(size),
  "lists in lists": (size) => "- ".repeat(size),
  "aliases of aliases": (size) => `a: &a [1]\n${"b: [*a, *a]\n".repeat(size)}`,
  "anchors without an end": (size) => "a: &a [*a, *a]\n".repeat(size),
  "keys indented ever deeper": (size) =>
    Array.from({ length: Math.ceil(Math.sqrt(size)) }, (_, depth) => `${" ".repeat(depth)}a:\n`).join(""),
  "comments beside keys": (size) => "a: 1 # b\n# c: 1\n".repeat(size),
  "arrays of tables": (size) => "[[a.b]]\nc = 1\n".repeat(size),
  "dotted keys": (size) => `${"a.".repeat(size)}b = 1`,
  "open texts over several lines": (size) => 'k = """\n'.repeat(size),
  "zero-width spaces": (size) => "\u200b".repeat(size),
  "carriage returns": (size) => "\r".repeat(size),
};

/** Characters looked at while `work` runs. */
function stepsOf(work: () => void): number {
  let steps = 0;
  const { charCodeAt, indexOf, includes, startsWith } = String.prototype;
  const spies = [
    vi.spyOn(String.prototype, "charCodeAt").mockImplementation(function (this: string, at) {
      steps++;
      return charCodeAt.call(this, at);
    }),
    vi.spyOn(String.prototype, "indexOf").mockImplementation(function (this: string, sought, from = 0) {
      const found = indexOf.call(this, sought, from);
      steps += (found < 0 ? this.length : found) - from + 1;
      return found;
    }),
    vi.spyOn(String.prototype, "includes").mockImplementation(function (this: string, sought, from) {
      steps += this.length;
      return includes.call(this, sought, from);
    }),
    vi.spyOn(String.prototype, "startsWith").mockImplementation(function (this: string, sought, from) {
      steps += sought.length;
      return startsWith.call(this, sought, from);
    }),
  ];
  try {
    work();
  } finally {
    for (const spy of spies) spy.mockRestore();
  }
  return steps;
}

const KEY_TABLE = { rules: [{ key: "K", parameter: "microsteps" as const, axis: "x" }] };
const AXES = [{ axis: "x", kind: "linear" as const }];

function read(text: string, format: Format): void {
  const document = parseText({ path: "a", text, format });
  inspectText(text);
  mapDocuments({ documents: [document], keyTable: KEY_TABLE, axes: AXES });
}

afterEach(() => vi.restoreAllMocks());

describe.each(FORMATS)("reading the format %s", (format) => {
  it.each(Object.entries(HOSTILE))("takes twice the steps for twice as much of: %s", (_, make) => {
    const small = stepsOf(() => read(make(400), format));
    const large = stepsOf(() => read(make(800), format));
    expect(large).toBeLessThan(2.3 * small);
  });

  it("looks at each character of a plain text a few times only", () => {
    const text = "accel_x = 3000 ; mm/s2\n#define A 1\n".repeat(200);
    expect(stepsOf(() => read(text, format))).toBeLessThan(40 * text.length);
  });
});
