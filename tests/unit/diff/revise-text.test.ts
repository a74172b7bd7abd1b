import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { reviseText } from "@/lib/diff/revise-text";
import { splitLines } from "@/lib/diff/text-lines";
import type { RevisionLine, RevisionStretch } from "@/lib/diff/types";
import { garbage, lineText, RUNS, TIMEOUT } from "../parsers/arbitrary-texts";

function rowsOf(stretches: readonly RevisionStretch[]): RevisionLine[] {
  return stretches.flatMap(({ lines }) => lines);
}

/** Kept text plain, struck text in [-brackets-], new text in {+braces+}. */
function drawn({ segments }: RevisionLine): string {
  return segments
    .map(({ kind, text }) => (kind === "same" ? text : kind === "was" ? `[-${text}-]` : `{+${text}+}`))
    .join("");
}

function draw(was: string, toBe: string): string[] {
  return rowsOf(reviseText(was, toBe)).map(
    (row) => `${row.kind[0]}${row.onlySpace ? "~" : " "} ${drawn(row)}`,
  );
}

/** One side of a revision, line ends left out. */
function side(rows: readonly RevisionLine[], kind: "was" | "to_be"): (string | null)[] {
  const number = kind === "was" ? "wasLine" : "toBeLine";
  return rows
    .filter((row) => row[number] !== null)
    .map(({ segments }) =>
      segments
        .filter((part) => part.kind === "same" || part.kind === kind)
        .map(({ text }) => text)
        .join(""),
    );
}

describe("a changed line", () => {
  it.each([
    ["run = 800", "run = 900", "c  run = [-800-]{+900+}"],
    ["v = 0.8", "v = 0.9", "c  v = [-0.8-]{+0.9+}"],
    ["v = 12mm/s # x", "v = 14mm/s # x", "c  v = [-12mm-]{+14mm+}/s # x"],
    ["s = { 80, 80, 400 }", "s = { 80, 81, 400 }", "c  s = { 80, [-80-]{+81+}, 400 }"],
    ["run = 800", "run = 800 # hot", "c~ run = 800{+ # hot+}"],
    ["run = 800 ; hot", "run = 800 ; cold", "c~ run = 800 ; [-hot-]{+cold+}"],
    ["#define A 1 // a", "#define A 1 // b", "c~ #define A 1 // [-a-]{+b+}"],
    ["#define A 1", "#define A 2", "c  #define A [-1-]{+2+}"],
    ["run = 800", "run   = 800", "c~ run[- -]{+   +}= 800"],
    ["# run = 800", "run = 800", "c  [-# -]run = 800"],
    ['a = "x # y"', 'a = "x # z"', 'c  a = "x # [-y-]{+z+}"'],
    ["a = old words here", "a = new phrase here", "c  a = [-old words-]{+new phrase+} here"],
  ])("%s to %s is one row", (was, toBe, row) => expect(draw(was, toBe)).toEqual([row]));

  it("has both line numbers", () => {
    const [, , row] = rowsOf(reviseText("a\nb\nrun = 1\n", "b\nrun = 2\n"));
    expect(row).toMatchObject({ kind: "changed", wasLine: 3, toBeLine: 2 });
  });

  it("may differ in its line end alone", () => {
    expect(draw("a = 1\r\nb = 2\r\n", "a = 1\nb = 2\n")).toEqual(["c~ a = 1", "c~ b = 2"]);
    expect(draw("a = 1", "a = 1\n")).toEqual(["c~ a = 1"]);
  });
});

describe("lines", () => {
  it("that only one side has stand alone", () => {
    expect(draw("a = 1\nold = 5\nb = 2\n", "a = 1\nb = 2\nnew = 7\n")).toEqual([
      "s  a = 1",
      "r  [-old = 5-]",
      "s  b = 2",
      "a  {+new = 7+}",
    ]);
  });

  it("of one key stand together, whatever comes between them", () => {
    expect(
      draw("run = 800\nhold = 300\naccel = 5\n", "run = 900\nextra = 1\nhold = 350\naccel = 6\n"),
    ).toEqual([
      "c  run = [-800-]{+900+}",
      "a  {+extra = 1+}",
      "c  hold = [-300-]{+350+}",
      "c  accel = [-5-]{+6+}",
    ]);
  });

  it("that have nothing in common are one removed and one added", () => {
    expect(draw("alpha = 1\n", "[section]\n")).toEqual(["r  [-alpha = 1-]", "a  {+[section]+}"]);
  });

  it("of comments and blanks are marked as such when they come or go", () => {
    expect(draw("# note\n\nrun = 1\n", "run = 1\n")).toEqual(["r~ [-# note-]", "r~ ", "s  run = 1"]);
    expect(draw("/* note */\n#define A 1\n", "#define A 1\n")).toEqual([
      "r~ [-/* note */-]",
      "s  #define A 1",
    ]);
    expect(draw("#if FAST\n#define A 1\n", "#define A 1\n")).toEqual(["r  [-#if FAST-]", "s  #define A 1"]);
  });
});

describe("unchanged runs", () => {
  const text = (count: number, changed: Record<number, string> = {}) =>
    Array.from({ length: count }, (_, index) => changed[index] ?? `k${index} = ${index}`).join("\n") + "\n";
  const shape = (was: string, toBe: string, context?: number) =>
    reviseText(was, toBe, context).map(({ closed, lines }) => (closed ? -lines.length : lines.length));

  it("are closed but for three lines beside each change", () => {
    expect(shape(text(40), text(40, { 20: "k20 = x" }))).toEqual([-17, 7, -16]);
  });

  it("of no more than twice the context and two stay open", () => {
    expect(shape(text(20), text(20, { 0: "k0 = x", 9: "k9 = x" }))).toEqual([13, -7]);
    expect(shape(text(20), text(20, { 0: "k0 = x", 10: "k10 = x" }))).toEqual([4, -3, 7, -6]);
    expect(shape(text(9), text(9, { 0: "k0 = x" }))).toEqual([9]);
    expect(shape(text(10), text(10, { 0: "k0 = x" }), 1)).toEqual([2, -8]);
  });

  it("are all there is where nothing changed", () => {
    expect(shape(text(20), text(20))).toEqual([-20]);
    expect(shape(text(3), text(3))).toEqual([3]);
    expect(shape("", "")).toEqual([]);
  });
});

describe("a revision", () => {
  const changed = lineText.chain(({ text }) => {
    const lines = splitLines(text);
    return fc
      .array(fc.tuple(fc.nat(), fc.constantFrom("drop", "double", "change", "swap")), { maxLength: 6 })
      .map((edits) => ({ was: text, toBe: mutate(lines, edits) }));
  });

  function mutate(lines: readonly string[], edits: readonly (readonly [number, string])[]): string {
    const next = [...lines];
    for (const [pick, edit] of edits) {
      const at = pick % Math.max(1, next.length);
      const line = next[at] ?? "";
      if (edit === "drop") next.splice(at, 1);
      else if (edit === "double") next.splice(at, 0, line);
      else if (edit === "change") next[at] = line.replace(/[0-9a-z]/, "9");
      else next.splice(at, 1, "swapped = 1\n");
    }
    return next.join("");
  }

  const pair = fc.oneof(
    changed,
    fc.tuple(garbage, garbage).map(([was, toBe]) => ({ was, toBe })),
    fc.tuple(lineText, lineText).map(([was, toBe]) => ({ was: was.text, toBe: toBe.text })),
  );

  it("holds each line of both texts once, in order, with its number", { timeout: TIMEOUT }, () => {
    fc.assert(
      fc.property(pair, ({ was, toBe }) => {
        const rows = rowsOf(reviseText(was, toBe));
        const bare = (text: string) => splitLines(text).map((line) => line.replace(/[\r\n]+$/, ""));
        expect(side(rows, "was")).toEqual(bare(was));
        expect(side(rows, "to_be")).toEqual(bare(toBe));
        const numbers = (key: "wasLine" | "toBeLine") => rows.flatMap((row) => row[key] ?? []);
        expect(numbers("wasLine")).toEqual(splitLines(was).map((_, index) => index + 1));
        expect(numbers("toBeLine")).toEqual(splitLines(toBe).map((_, index) => index + 1));
      }),
      RUNS,
    );
  });

  it("of a text and itself has no change", { timeout: TIMEOUT }, () => {
    fc.assert(
      fc.property(lineText, ({ text }) => {
        expect(rowsOf(reviseText(text, text)).every(({ kind }) => kind === "same")).toBe(true);
      }),
      RUNS,
    );
  });

  it("of two large texts without a common line is done line by line", { timeout: TIMEOUT }, () => {
    const large = (word: string) =>
      Array.from({ length: 20_000 }, (_, index) => `${word}_${index} = ${index}\n`).join("");
    const rows = rowsOf(reviseText(large("a"), large("b")));
    expect(rows).toHaveLength(20_000);
    expect(rows[0]?.kind).toBe("changed");
  });

  it("of two large texts in another order keeps their equal ends", { timeout: TIMEOUT }, () => {
    const lines = Array.from({ length: 6000 }, (_, index) => `k${(index * 2741) % 6000} = 1\n`);
    const sorted = [...lines].sort();
    const rows = rowsOf(
      reviseText(["head\n", ...lines, "tail\n"].join(""), ["head\n", ...sorted, "tail\n"].join("")),
    );
    expect([rows[0]?.kind, rows[rows.length - 1]?.kind]).toEqual(["same", "same"]);
    expect(side(rows, "to_be")).toHaveLength(6002);
  });

  it("of one very long changed line strikes it whole", () => {
    const long = (word: string) => `k = ${`${word} `.repeat(20_000)}`;
    const [row] = rowsOf(reviseText(long("a"), long("b")));
    expect(side([row!], "was")).toEqual([long("a")]);
  });
});
