import { describe, expect, it } from "vitest";
import { parseDefines } from "@/lib/parsers/defines";
import type { Entry, ParsedValue } from "@/lib/parsers/types";

function parse(text: string) {
  return parseDefines("config.h", text);
}

function only(text: string): Entry {
  const { entries } = parse(text);
  expect(entries).toHaveLength(1);
  return entries[0]!;
}

function short(value: ParsedValue): unknown {
  if (value.kind === "list") return value.items.map((item) => short(item.value));
  return value.kind === "none" ? null : value.value;
}

function codes(text: string): string[] {
  return parse(text).diagnostics.map(({ code }) => code);
}

/** Key, raw value, and why the entry may not count. */
function rows(text: string): unknown[] {
  return parse(text).entries.map(({ key, raw, disabled, shadowed, conditions }) => [
    key,
    raw,
    ...(disabled ? ["disabled"] : []),
    ...(shadowed ? ["shadowed"] : []),
    ...conditions,
  ]);
}

describe("a #define", () => {
  it.each([
    ["#define A 80", 80],
    ["#define A 80.5f", 80.5],
    ["#define A 16UL", 16],
    ["#define A (80)", 80],
    ["#define A ((-80.5F))", -80.5],
    ["#define A 0x1F", 31],
    ["#define A 0b11", 3],
    ["#define A 1e3", 1000],
    ["#define A true", true],
    ['#define A "a // b"', "a // b"],
    ["#define A 'x'", "x"],
    ["#define A OTHER", "OTHER"],
    ["#define A (80 * 16)", "(80 * 16)"],
    ["#define A 80 mA", "80 mA"],
    ["#define A", null],
    ["  #  define A 80", 80],
    ["/* first */ #define A 80", 80],
  ])("%s has its value", (text, value) => expect(short(only(text).value)).toBe(value));

  it("has a leading 0 for octal, as ISO/IEC 9899 6.4.4.1 says", () => {
    expect(short(only("#define A 017").value)).toBe(15);
    expect(short(only("#define A 0").value)).toBe(0);
    expect(short(only("#define A 09").value)).toBe("09");
    expect(short(only("#define A 017.5").value)).toBe(17.5);
  });

  it.each([
    ["#define A { 80, 80.0f, (400) }", [80, 80, 400]],
    ["#define A {80}", [80]],
    ["#define A 80, 400", [80, 400]],
    ["#define A { 80, \\\n  400 }", [80, 400]],
    ["#define A { X_STEPS, 400 }", ["X_STEPS", 400]],
    ["#define A {}", []],
  ])("%s has a list", (text, items) => expect(short(only(text).value)).toEqual(items));

  it("on spliced lines has elements with the line and column where they stand", () => {
    const { value } = only("#define A { 80, \\\r\n  400 } // end");
    if (value.kind !== "list") throw new Error("no list");
    expect(value.items[1]?.span).toMatchObject({ line: 2, column: 3 });
  });

  it("with parameters keeps its body as text", () => {
    const entry = only("#define SQUARE(x) ((x) * (x)) // area");
    expect([entry.key, entry.raw, entry.value.kind, entry.comment]).toEqual([
      "SQUARE",
      "((x) * (x))",
      "text",
      "area",
    ]);
  });

  it.each([
    ["#define A 80 // mA", "80", "mA"],
    ["#define A 80 /* mA */", "80", "mA"],
    ["#define A 80/* mA */ // rms", "80", "mA"],
    ["#define A /* mA */ 80", "80", "mA"],
    ["#define A 80 /**< mA */", "80", "mA"],
    ["#define A 80 ///< mA", "80", "mA"],
    ["#define A 80 /* two\n lines */", "80", "two\n lines"],
    ["#define A 80 /* a */ + 1", "80 /* a */ + 1", null],
    ['#define A "/*" // b', '"/*"', "b"],
    ["#define A 80", "80", null],
  ])("%j has its comment", (text, raw, comment) => {
    const entry = only(text);
    expect([entry.raw, entry.comment]).toEqual([raw, comment]);
  });

  it.each([
    "// #define A 80",
    "//#define A 80",
    "/* #define A 80 */",
    "/*\n * #define A 80\n */",
    "/// # define A 80",
  ])("in a comment is disabled: %j", (text) =>
    expect(only(text)).toMatchObject({ key: "A", raw: "80", disabled: true }),
  );

  it("in a comment may be one of several, each with its own line", () => {
    const { entries } = parse("/* off:\n#define A 1\n  #define B 2 // two\n*/\n#define C 3");
    expect(entries.map(({ key, raw, comment, keySpan }) => [key, raw, comment, keySpan.line])).toEqual([
      ["A", "1", null, 2],
      ["B", "2", "two", 3],
      ["C", "3", null, 5],
    ]);
  });

  it("is not what prose or code says of one", () => {
    expect(rows('// use #define A 80\n// #defined A\nchar *s = "#define A 1";\n')).toEqual([]);
  });
});

describe("conditions", () => {
  it("stand at the entries they enclose, outermost first", () => {
    expect(
      rows(
        "#if FAST\n#define A 1\n# ifdef X\n#define B 2\n# else // not X\n#define B 3\n# endif\n#elif  SLOW \n#define A 4\n#else\n#define A 5\n#endif\n#define C 6",
      ),
    ).toEqual([
      ["A", "1", "#if FAST"],
      ["B", "2", "#if FAST", "#ifdef X"],
      ["B", "3", "#if FAST", "#else (of #ifdef X)"],
      ["A", "4", "#elif SLOW (of #if FAST)"],
      ["A", "5", "#else (of #if FAST)"],
      ["C", "6"],
    ]);
  });

  it("that are 1 or 0 are decided", () => {
    expect(rows("#if 1\n#define A 1\n#else\n#define A 2\n#endif")).toEqual([
      ["A", "1"],
      ["A", "2", "disabled", "#else (of #if 1)"],
    ]);
    expect(
      rows("#if (0)\n#define A 1\n#elif X\n#define A 2\n#elif 1\n#define A 3\n#else\n#define A 4\n#endif"),
    ).toEqual([
      ["A", "1", "disabled", "#if (0)"],
      ["A", "2", "#elif X (of #if (0))"],
      ["A", "3", "#elif 1 (of #if (0))"],
      ["A", "4", "disabled", "#else (of #if (0))"],
    ]);
    expect(rows("#if 0\n#if X\n#define A 1\n#endif\n#else\n#define A 2\n#endif")).toEqual([
      ["A", "1", "disabled", "#if 0", "#if X"],
      ["A", "2"],
    ]);
  });

  it.each(["#ifndef M_H\n#define M_H\n", "#pragma once\n#if !defined(M_H)\n#define M_H // guard\n"])(
    "are none where they are an include guard",
    (guard) => {
      expect(rows(`// head\n${guard}#define A 1\n#ifdef X\n#define B 2\n#endif\n#endif // M_H\n`)).toEqual([
        ["A", "1"],
        ["B", "2", "#ifdef X"],
      ]);
    },
  );

  it.each([
    [
      "something follows",
      "#ifndef M_H\n#define M_H\n#define A 1\n#endif\n#define B 2",
      ["A", "1", "#ifndef M_H"],
    ],
    ["it has an #else", "#ifndef M_H\n#define M_H\n#define A 1\n#else\n#endif", ["A", "1", "#ifndef M_H"]],
    ["another name is defined", "#ifndef M_H\n#define N_H\n#define A 1\n#endif", ["A", "1", "#ifndef M_H"]],
    ["it is not closed", "#ifndef M_H\n#define M_H\n#define A 1\n", ["A", "1", "#ifndef M_H"]],
  ])("are no include guard where %s", (_, text, row) => expect(rows(text)).toContainEqual(row));

  it("of a default value stay conditions", () => {
    expect(rows("#ifndef RUN_MA\n#define RUN_MA 800\n#endif")).toEqual([["RUN_MA", "800", "#ifndef RUN_MA"]]);
  });

  it("that are not closed or not opened are reported with their line", () => {
    const { diagnostics, entries } = parse("#endif\n#else\n#define A 1\n#if X\n#define B 2\n");
    expect(diagnostics.map(({ code, span }) => [code, span?.line])).toEqual([
      ["unmatched-conditional", 1],
      ["unmatched-conditional", 2],
      ["unclosed-conditional", 4],
    ]);
    expect(entries.map(({ conditions }) => conditions)).toEqual([[], ["#if X"]]);
  });

  it("nested a hundred deep are kept to the outer sixty-four", () => {
    const { entries } = parse(`${"#if A\n".repeat(100)}#define K 1\n${"#endif\n".repeat(100)}`);
    expect(entries[0]?.conditions).toHaveLength(64);
  });
});

describe("a name that is defined twice", () => {
  it("counts where it stands last", () => {
    expect(rows("#define A 1\n#define A 2")).toEqual([
      ["A", "1", "shadowed"],
      ["A", "2"],
    ]);
    expect(codes("#define A 1\n#define A 2")).toEqual(["duplicate-key"]);
  });

  it("counts in each branch apart, until one without conditions follows", () => {
    expect(rows("#if X\n#define A 1\n#define A 2\n#else\n#define A 3\n#endif")).toEqual([
      ["A", "1", "shadowed", "#if X"],
      ["A", "2", "#if X"],
      ["A", "3", "#else (of #if X)"],
    ]);
    expect(rows("#if X\n#define A 1\n#endif\n#define A 2")).toEqual([
      ["A", "1", "shadowed", "#if X"],
      ["A", "2"],
    ]);
  });

  it("no longer counts after its #undef", () => {
    expect(rows("#define A 1\n#undef A\n")).toEqual([["A", "1", "shadowed"]]);
    expect(rows("#define A 1\n#undef A\n#define A 2")).toEqual([
      ["A", "1", "shadowed"],
      ["A", "2"],
    ]);
    expect(codes("#define A 1\n#undef A\n#define A 2")).toEqual([]);
  });

  it("becomes conditional by a conditional #undef", () => {
    expect(rows("#define A 1\n#if X\n#undef A\n#define A 2\n#endif\n#if 0\n#undef A\n#endif")).toEqual([
      ["A", "1", "unless #undef under #if X"],
      ["A", "2", "#if X"],
    ]);
    expect(rows("#if X\n#define A 1\n#undef A\n#endif")).toEqual([["A", "1", "shadowed", "#if X"]]);
  });

  it("may be one that a language gives a meaning of its own", () => {
    expect(rows("#define __proto__ 1\n#define constructor 2\n#define __proto__ 3")).toEqual([
      ["__proto__", "1", "shadowed"],
      ["constructor", "2"],
      ["__proto__", "3"],
    ]);
  });
});

describe("what is no #define", () => {
  it("is reported once for each run of code", () => {
    const { diagnostics } = parse("int a;\nint b; /* c */\n#define A 1\nint d;\n");
    expect(diagnostics.map(({ code, span }) => [code, span?.line])).toEqual([
      ["unreadable-line", 1],
      ["unreadable-line", 4],
    ]);
  });

  it.each(["#include <x.h>", "#pragma once", "#error no", "#", "#define", "#undef", "# 5"])(
    "is kept without a word: %s",
    (text) => {
      expect(parse(text).entries).toEqual([]);
      expect(codes(text)).toEqual([]);
    },
  );

  it("is the rest of the text after a comment that is not closed", () => {
    expect(rows("#define A 1\n/* open\n#define B 2\n")).toEqual([
      ["A", "1"],
      ["B", "2", "disabled"],
    ]);
    expect(codes("#define A 1 /* open\n#define B 2\n")).toEqual(["unclosed-comment"]);
  });

  it.each([
    ['#define A "open', "unclosed-quote"],
    ["#define A { 80, 90", "unclosed-list"],
  ])("is a value left open: %s", (text, code) => {
    expect(codes(text)).toEqual([code]);
    expect(only(text).value.kind).toBe("text");
  });
});
