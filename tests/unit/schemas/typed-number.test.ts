import { describe, expect, it } from "vitest";
import { readTypedNumber } from "@/lib/schemas/typed-number";

describe("a number as typed", () => {
  it.each([
    ["1.5", 1.5],
    ["1,5", 1.5],
    [" 0 ", 0],
    [".25", 0.25],
    ["5.4e-6", 5.4e-6],
    ["\u22123", -3],
    ["12.", 12],
  ])("%s is understood", (typed, value) => {
    expect(readTypedNumber(typed)).toEqual({ ok: true, value });
  });

  it("is missing where nothing is typed, and not 0", () => {
    expect(readTypedNumber("  ")).toEqual({ ok: true, value: undefined });
  });

  it.each([
    ["1,234.5", /two ways/],
    ["1.234,5", /two ways/],
    ["1 234,5", /two ways/],
    ["1.5 A", /number alone/],
    ["24V", /number alone/],
    ["about two", /not a number/],
    ["0x10", /number alone/],
    ["1e999", /too large/],
    ["--1", /not a number/],
  ])("%s is refused with a sentence", (typed, sentence) => {
    const read = readTypedNumber(typed);
    expect(read.ok ? "" : read.sentence).toMatch(sentence);
  });
});
