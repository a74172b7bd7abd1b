import fc from "fast-check";
import type { Document } from "@/lib/parsers/types";

const LONG = process.env["KEEPSTEP_LONG"] === "1";
/** All ten thousand texts in the long run, a few hundred otherwise. */
export const RUNS = { numRuns: LONG ? 10_000 : 300 };
/** Milliseconds for one law. */
export const TIMEOUT = LONG ? 600_000 : 30_000;

/** What a generated text says, beside the text itself. */
export interface ModelEntry {
  readonly key: string;
  readonly raw: string;
  readonly disabled: boolean;
  readonly comment: string | null;
}

export interface ModelText {
  readonly text: string;
  readonly entries: readonly ModelEntry[];
}

export const blanks = fc.constantFrom("", " ", "  ", "\t", " \t ");
export const someBlanks = fc.constantFrom(" ", "  ", "\t", "    ");
export const lineEnds = fc.constantFrom("\n", "\r\n", "\r", "\n", "\n");
export const word = fc.stringMatching(/^[a-z][a-z0-9_]{0,7}$/);
const proseWord = fc.constantFrom("carriage", "belt", "spring", "screw", "cover", "plate");
export const prose = fc.array(proseWord, { minLength: 1, maxLength: 5 }).map((words) => words.join(" "));

const integer = fc.integer({ min: -99_999, max: 99_999 }).map(String);
const decimal = fc
  .tuple(fc.integer({ min: 0, max: 9999 }), fc.integer({ min: 0, max: 999 }))
  .map(([whole, rest]) => `${whole}.${rest}`);
const number = fc.oneof(
  integer,
  decimal,
  fc.integer({ min: 0, max: 65_535 }).map((value) => `0x${value.toString(16)}`),
  fc.integer({ min: -8, max: 8 }).map((exponent) => `1.25e${exponent}`),
);
const unit = fc.constantFrom("mA", " A", "mm/s", " mm/s^2", " %", "µs", " 1/mm");
const truth = fc.constantFrom("true", "No", "on", "OFF");
const quoted = fc
  .tuple(fc.constantFrom('"', "'"), fc.stringMatching(/^[a-z#;/ =,]{0,10}$/))
  .map(([quote, inner]) => `${quote}${inner}${quote}`);
const list = fc
  .tuple(
    fc.constantFrom(["", ""], ["[", "]"], ["{ ", " }"], ["(", ")"]),
    fc.array(number, { minLength: 2, maxLength: 5 }),
    fc.constantFrom(",", ", ", " , "),
  )
  .map(([[open, close], items, comma]) => `${open}${items.join(comma)}${close}`);
const plainText = fc.stringMatching(/^[a-z][a-z-]{0,9}( [a-z]{1,5})?$/);

/** A value of the line family, as typed. */
export const lineValue: fc.Arbitrary<string> = fc.oneof(
  number,
  fc.tuple(number, unit).map(([digits, name]) => digits + name),
  truth,
  quoted,
  list,
  plainText,
);

interface Chunk {
  readonly text: string;
  readonly entry?: ModelEntry;
  readonly section?: string;
}

const comment = fc.tuple(fc.constantFrom("#", ";", "//", "##"), blanks, prose);
const trailing = fc.option(fc.tuple(someBlanks, comment), { nil: null, freq: 2 });

const entryLine: fc.Arbitrary<Chunk> = fc
  .record({
    indent: blanks,
    key: fc.oneof(
      word,
      fc.tuple(word, word).map(([one, two]) => `${one}.${two}`),
      fc.constant("__proto__"),
    ),
    separator: fc.constantFrom(" = ", "=", ": ", " : ", "   =\t"),
    value: lineValue,
    trailing,
    tail: blanks,
  })
  .map(({ indent, key, separator, value, trailing: behind, tail }) => {
    const [gap, parts] = behind ?? ["", ["", "", ""]];
    return {
      text: `${indent}${key}${separator}${value}${gap}${parts.join("")}${tail}`,
      entry: { key, raw: value, disabled: false, comment: behind ? parts[2] : null },
    };
  });

const disabledLine: fc.Arbitrary<Chunk> = fc
  .tuple(fc.constantFrom("#", "# ", ";", "// "), word, number)
  .map(([mark, key, value]) => ({
    text: `${mark}${key} = ${value}`,
    entry: { key, raw: value, disabled: true, comment: null },
  }));

const sectionLine: fc.Arbitrary<Chunk> = fc
  .tuple(blanks, fc.stringMatching(/^[a-z]{1,5}(\.[a-z])?$/))
  .map(([indent, section]) => ({ text: `${indent}[${section}]`, section }));

const proseLine: fc.Arbitrary<Chunk> = comment.map((parts) => ({ text: parts.join("") }));
const blankLine: fc.Arbitrary<Chunk> = blanks.map((text) => ({ text }));

/** A text of the line family with what it says. */
export const lineText: fc.Arbitrary<ModelText> = fc
  .record({
    mark: fc.constantFrom("", "", "", "\ufeff"),
    lines: fc.array(
      fc.tuple(
        fc.oneof(
          { weight: 6, arbitrary: entryLine },
          { weight: 1, arbitrary: disabledLine },
          { weight: 1, arbitrary: sectionLine },
          { weight: 1, arbitrary: proseLine },
          { weight: 1, arbitrary: blankLine },
        ),
        lineEnds,
      ),
      { maxLength: 30 },
    ),
    lastLineEnd: fc.boolean(),
  })
  .map(({ mark, lines, lastLineEnd }) => {
    let section = "";
    const entries: ModelEntry[] = [];
    for (const [chunk] of lines) {
      if (chunk.section !== undefined) section = `${chunk.section}.`;
      if (chunk.entry) entries.push({ ...chunk.entry, key: section + chunk.entry.key });
    }
    const body = lines.map(
      ([{ text }, end], index) => text + (index < lines.length - 1 || lastLineEnd ? end : ""),
    );
    return { text: mark + body.join(""), entries };
  });

const cNumber = fc
  .tuple(fc.oneof(integer, decimal), fc.constantFrom("", "", "f", "L", "UL"))
  .map(([digits, suffix]) => digits + suffix);
const cString = fc.stringMatching(/^[a-z/* #]{0,10}$/).map((inner) => `"${inner}"`);
const cList = fc
  .tuple(
    fc.array(cNumber, { minLength: 1, maxLength: 5 }),
    fc.constantFrom(", ", ",", ", \\\n    ", ", \\\r\n\t"),
  )
  .map(([items, comma]) => `{ ${items.join(comma)} }`);

/** The value of a `#define`, as typed. */
export const defineValue: fc.Arbitrary<string> = fc.oneof(
  cNumber,
  cNumber.map((value) => `(${value})`),
  cString,
  cList,
  fc.stringMatching(/^[A-Z][A-Z_]{0,8}$/),
  fc.constantFrom("true", "false"),
);

const macro = fc.stringMatching(/^[A-Z][A-Z0-9_]{0,9}$/);
const cComment = fc.oneof(
  prose.map((words) => ({ text: `// ${words}`, words })),
  prose.map((words) => ({ text: `/* ${words} */`, words })),
  fc.tuple(prose, prose).map(([a, b]) => ({ text: `/* ${a}\n   ${b} */`, words: `${a}\n   ${b}` })),
);

const defineLine: fc.Arbitrary<Chunk> = fc
  .record({
    hash: fc.constantFrom("#define ", "# define\t", "  #define  ", "#define \\\n"),
    key: macro,
    gap: fc.constantFrom(" ", "\t", "   ", " \\\n  "),
    value: defineValue,
    behind: fc.option(fc.tuple(someBlanks, cComment), { nil: null, freq: 2 }),
    tail: blanks,
  })
  .map(({ hash, key, gap, value, behind, tail }) => ({
    text: `${hash}${key}${gap}${value}${behind ? behind[0] + behind[1].text : ""}${tail}`,
    entry: { key, raw: value, disabled: false, comment: behind ? behind[1].words : null },
  }));

const disabledDefine: fc.Arbitrary<Chunk> = fc
  .tuple(fc.constantFrom(["//", ""], ["// ", ""], ["/* ", " */"], ["/*\n * ", "\n */"]), macro, cNumber)
  .map(([[open, close], key, value]) => ({
    text: `${open}#define ${key} ${value}${close}`,
    entry: { key, raw: value, disabled: true, comment: null },
  }));

const cProse: fc.Arbitrary<Chunk> = cComment.map(({ text }) => ({ text }));
const directive: fc.Arbitrary<Chunk> = fc.constantFrom(
  { text: "#pragma once" },
  { text: '#include "board.h" // pins' },
  { text: "#if 1" },
  { text: "#ifdef FAST" },
  { text: "#else" },
  { text: "#endif" },
);

/** A C header with what its `#define` lines say. Blocks are not balanced on purpose; conditions are not in the model. */
export const defineText: fc.Arbitrary<ModelText> = fc
  .record({
    mark: fc.constantFrom("", "", "", "\ufeff"),
    lines: fc.array(
      fc.tuple(
        fc.oneof(
          { weight: 6, arbitrary: defineLine },
          { weight: 1, arbitrary: disabledDefine },
          { weight: 1, arbitrary: cProse },
          { weight: 1, arbitrary: blankLine },
          { weight: 1, arbitrary: directive },
        ),
        fc.constantFrom("\n", "\r\n", "\n"),
      ),
      { maxLength: 30 },
    ),
  })
  .map(({ mark, lines }) => ({
    text: mark + lines.map(([{ text }, end]) => text + end).join(""),
    entries: lines.flatMap(([{ entry }]) => (entry ? [entry] : [])),
  }));

/** Characters that lexers trip over, mixed with any other. */
export const garbage: fc.Arbitrary<string> = fc
  .array(
    fc.oneof(
      fc.constantFrom(..."\"'`[](){}<>=:;#/\\*,.+-%$ \t\n\r0189azAZ_\ufeff\u200b\u202e\u0000"),
      fc.constantFrom(
        "#define ",
        "#if ",
        "#endif",
        "/*",
        "*/",
        "//",
        "\\\n",
        "\r\n",
        "0x",
        "1e",
        "[[",
        "key = ",
        "#undef ",
      ),
      fc.string({ unit: "binary", maxLength: 3 }),
    ),
    { maxLength: 80 },
  )
  .map((parts) => parts.join(""));

/** Line and column of an offset, counted the slow way. */
export function lineAndColumn(text: string, offset: number): { line: number; column: number } {
  const before = text.slice(0, offset).split(/\r\n|\r|\n/);
  return { line: before.length, column: (before[before.length - 1] ?? "").length + 1 };
}

/** The parts of a document that a model speaks of. */
export function asModel(document: Document): ModelEntry[] {
  return document.entries.map(({ key, raw, disabled, comment: said }) => ({
    key,
    raw,
    disabled,
    comment: said,
  }));
}
