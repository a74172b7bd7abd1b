import { readdirSync, readFileSync } from "node:fs";
import { describe, expect, it } from "vitest";
import { decodeBytes } from "@/lib/parsers/encoding";
import { parseText } from "@/lib/parsers/parse-text";
import { recogniseFormat } from "@/lib/parsers/recognise";
import { stringify } from "@/lib/parsers/stringify";
import { FORMATS, type Format } from "@/lib/parsers/types";

/** Mutated texts for each format; `npm run fuzz` makes 100,000. */
const COUNT = Number(process.env["KEEPSTEP_FUZZ"] ?? 2000);
const SEED = Number(process.env["KEEPSTEP_FUZZ_SEED"] ?? 20_261_201);
const LONGEST = 4000;

const PIECES = [
  ..."\"'`[]{}()<>=:;#/\\*&!|%@,.+-~?$ \t\n\r",
  "\r\n",
  "\\u12",
  "\\\n",
  '"""',
  "'''",
  "- ",
  "? ",
  ": ",
  "<<: *a\n",
  "&a ",
  "*a",
  "---\n",
  "!!str ",
  "[[",
  "__proto__",
  "constructor",
  "prototype",
  "export ",
  "#define ",
  "1e999",
  "0x",
  "\ufeff",
  "\u0000",
  "\u0002",
  "\u0018",
  "\u001f",
  "\ud800",
  "\u2028",
];

/** A sequence of numbers below a limit that is the same in every run (a linear congruence modulo 2³²). */
function sequence(seed: number): (below: number) => number {
  let state = seed >>> 0;
  return (below) => {
    state = (Math.imul(state, 1_664_525) + 1_013_904_223) >>> 0;
    return Math.floor((state / 2 ** 32) * below);
  };
}

function corpusOf(format: Format): string[] {
  const folder = new URL(`../../corpus/${format}/`, import.meta.url);
  return readdirSync(folder)
    .filter((name) => !name.endsWith(".expected.json"))
    .flatMap((name) => {
      const decoded = decodeBytes(new Uint8Array(readFileSync(new URL(name, folder))));
      return decoded.ok ? [decoded.text] : [];
    });
}

function mutated(text: string, { other, next }: { other: string; next: (below: number) => number }): string {
  let now = text;
  for (let turn = 1 + next(6); turn > 0; turn--) {
    const from = next(now.length + 1);
    const to = Math.min(now.length, from + next(40));
    const stretch = now.slice(from, to);
    const put = [
      PIECES[next(PIECES.length)] ?? "",
      "",
      stretch + stretch,
      other.slice(next(other.length)).slice(0, 60),
    ];
    now = now.slice(0, from) + (put[next(put.length)] ?? "") + now.slice(to);
  }
  return now.slice(0, LONGEST);
}

/** What is wrong with the reading of a text; null for nothing. */
function wrongWith(text: string, format: Format): string | null {
  try {
    const document = parseText({ path: "a", text, format });
    if (stringify(document) !== text) return "does not come back";
    if (document.entries.some(({ id }, index) => id !== index)) return "numbers its entries wrongly";
    if (document.entries.some(({ raw, valueSpan }) => text.slice(valueSpan.start, valueSpan.end) !== raw))
      return "has a span that is not its value's";
    recogniseFormat({ path: "a", text });
    return null;
  } catch (error) {
    return `throws ${String(error)}`;
  }
}

describe.each(FORMATS)("mutated texts of the format %s", (format) => {
  it(`are read without a throw and come back, ${COUNT} of them`, { timeout: 600_000 }, () => {
    const next = sequence(SEED);
    const corpus = corpusOf(format);
    const everything = FORMATS.flatMap(corpusOf);
    for (let i = 0; i < COUNT; i++) {
      const other = everything[next(everything.length)] ?? "";
      const text = mutated(corpus[next(corpus.length)] ?? "", { other, next });
      const wrong = wrongWith(text, format);
      if (wrong !== null) expect.fail(`${JSON.stringify(text)} ${wrong}`);
    }
    expect(Object.keys(Object.prototype)).toEqual([]);
    expect(({} as Record<string, unknown>)["polluted"]).toBeUndefined();
  });
});
