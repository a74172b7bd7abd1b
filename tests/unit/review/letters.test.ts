import { describe, expect, it } from "vitest";
import { lineLetters } from "@/lib/review/line-letters";
import { revisionLetter } from "@/lib/review/revision-letter";
import type { ParameterChange } from "@/lib/review/types";

describe("revisionLetter", () => {
  it("counts A to Z, then AA", () => {
    expect([0, 1, 25, 26, 27, 51, 52, 701, 702].map(revisionLetter)).toEqual([
      "A",
      "B",
      "Z",
      "AA",
      "AB",
      "AZ",
      "BA",
      "ZZ",
      "AAA",
    ]);
  });

  it("never gives a letter twice", () => {
    const letters = Array.from({ length: 2000 }, (_, index) => revisionLetter(index));
    expect(new Set(letters).size).toBe(letters.length);
  });
});

describe("lineLetters", () => {
  const side = (path: string, line: number) => ({ value: 1, unit: "A", basis: null, line, path });
  const change = (
    letter: string,
    was: ParameterChange["was"],
    toBe: ParameterChange["toBe"],
  ): ParameterChange => ({
    letter,
    axis: "x",
    parameter: "run_current",
    was,
    toBe,
    change: null,
  });

  it("puts each letter at the line that held the old value and at the one that holds the new", () => {
    const letters = lineLetters([
      change("A", side("a.conf", 4), side("a.conf", 5)),
      change("B", side("a.conf", 4), side("b.conf", 1)),
      change("C", null, side("a.conf", 5)),
    ]);
    expect(letters.was).toEqual(new Map([["a.conf", new Map([[4, ["A", "B"]]])]]));
    expect(letters.toBe).toEqual(
      new Map([
        ["a.conf", new Map([[5, ["A", "C"]]])],
        ["b.conf", new Map([[1, ["B"]]])],
      ]),
    );
  });
});
