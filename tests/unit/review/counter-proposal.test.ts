import { describe, expect, it } from "vitest";
import { counterEdit } from "@/lib/review/counter-proposal";
import { checkWords, conflictSentence, counterSentence } from "@/lib/review/counter-words";
import { answerSolve } from "@/lib/review/solve-protocol";
import { check, edited, input, TEXT } from "./support/gantry";

const over = (text: string) =>
  check(text)
    .findings.filter(({ level }) => level === "over")
    .map(({ ruleId, axis }) => `${ruleId} ${axis}`)
    .sort();

const FAST = edited("x", "corner = 12 ", "corner = 300 ");

describe("a counter-proposal as an edit of the text", () => {
  it("changes only the values and keeps everything else byte for byte", () => {
    const edit = counterEdit(input(FAST));
    expect(over(FAST)).toContain("corner-speed x");
    const text = edit.files[0]!.text;
    expect(over(text)).toEqual(edit.left.map(({ ruleId, axis }) => `${ruleId} ${axis}`).sort());
    const corner = edit.moves.find(({ parameter }) => parameter === "corner_speed")!;
    expect(corner).toMatchObject({ axis: "x", because: [{ ruleId: "corner-speed", axis: "x" }] });
    const strip = (one: string) => one.replaceAll(/\d+(\.\d+)?/g, "0");
    expect(strip(text)).toBe(strip(FAST));
    expect(text).toContain("colour = grey");
    expect(corner.toBe.value).toBeLessThan(corner.was.value);
  });

  it("gives values without the last bits of the arithmetic, as the text holds them", () => {
    const inMilliamperes = edited("x", "amps = 0.85 ", "amps = 1902 mA ");
    const moves = counterEdit(input(inMilliamperes)).moves;
    // 1902 · 0.001 is 1.9020000000000001 in floating point.
    expect(1902 * 0.001).not.toBe(1.902);
    expect(moves.find(({ parameter }) => parameter === "run_current")?.was.value).toBe(1.902);
    for (const { was, toBe } of moves)
      for (const { value } of [was, toBe]) expect(value).toBe(Number(value.toPrecision(12)));
  });

  it("gives back the very text where nothing is over limit", () => {
    const clear = counterEdit(input(FAST)).files[0]!.text;
    const again = counterEdit(input(clear));
    expect(again.files[0]!.text).toBe(clear);
    expect(again.moves).toEqual([]);
  });

  it("does not touch a value that stands under a condition, and says what is left", () => {
    const text = [
      "#ifdef FAST",
      "#define X_CORNER 300",
      "#endif",
      "#define X_AMPS 0.6",
      "#define X_SUBDIVIDE 16",
    ].join("\n");
    const rules = [
      { key: "X_CORNER", parameter: "corner_speed", axis: "x", unit: "mm/s" },
      { key: "X_AMPS", parameter: "run_current", axis: "x", unit: "A", basis: "rms" },
      { key: "X_SUBDIVIDE", parameter: "microsteps", axis: "x" },
    ] as const;
    const asked = input("", { keyTable: { rules: [...rules] } });
    const edit = counterEdit({ ...asked, files: [{ path: "axes.h", text }] });
    expect(edit.left).toContainEqual({ ruleId: "corner-speed", axis: "x" });
    expect(edit.moves.map(({ parameter }) => parameter)).not.toContain("corner_speed");
  });

  it("is worded in one sentence, and so is what stands against it", () => {
    const edit = counterEdit(input(FAST));
    expect(counterSentence(edit)).toMatch(/^The smallest change that clears /);
    expect(counterSentence(counterEdit(input(edit.files[0]!.text)))).toMatch(
      /^Nothing is over limit|^No change/,
    );
    const pair = {
      checks: [
        { ruleId: "mount-temperature", axis: "x" },
        { ruleId: "torque-margin", axis: "x" },
      ],
    };
    expect(checkWords(pair.checks[0]!)).toBe("X temperature of the mount");
    expect(conflictSentence(pair, 0.1)).toContain("contradict each other");
    expect(conflictSentence({ checks: pair.checks.slice(0, 1) }, 0.1)).toContain("no value of the text");
  });

  it("is the same from the worker's protocol", () => {
    const answer = answerSolve({ kind: "counter", input: input(FAST) });
    expect(answer).toEqual({ kind: "counter", edit: counterEdit(input(FAST)) });
    const { parameters } = check(TEXT);
    const { keyTable: _table, files: _files, ...rest } = input(TEXT);
    const order = answerSolve({ kind: "order", input: { ...rest, was: parameters, toBe: parameters } });
    expect(order).toEqual({ kind: "order", order: { kind: "needless" } });
  });
});
