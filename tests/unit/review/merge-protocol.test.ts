import { describe, expect, it } from "vitest";
import { answerMerge, type Choices } from "@/lib/review/merge-protocol";
import { check, ASSEMBLY, edited, files, KEY_TABLE, POLICY, TEXT } from "./support/gantry";

const OURS = edited("x", "amps = 0.85", "amps = 1.05");
const THEIRS = edited("x", "amps = 0.85", "amps = 0.6");

function ask(choices: Choices) {
  const input = {
    base: files(TEXT),
    ours: files(OURS),
    theirs: files(THEIRS),
    keyTable: KEY_TABLE,
    assembly: ASSEMBLY,
  };
  return answerMerge({ id: 7, input, policy: POLICY, choices });
}

function quantity(text: string, name: string) {
  return check(text).quantities.find((one) => one.axis === "x" && one.name === name)?.value;
}

describe("answerMerge", () => {
  it("says what each choice of a conflict would do to every quantity that it moves", () => {
    const { id, conflicts, files: merged } = ask({});
    expect(id).toBe(7);
    expect(merged).toBeNull();
    const winding = conflicts[0]?.effects.find((one) => one.quantity === "winding_c");
    expect(winding?.by.map(({ choice, value }) => [choice, value])).toEqual([
      ["base", quantity(TEXT, "winding_c")],
      ["ours", quantity(OURS, "winding_c")],
      ["theirs", quantity(THEIRS, "winding_c")],
    ]);
    expect(conflicts[0]?.effects.some((one) => one.quantity === "step_rate")).toBe(false);
  });

  it("gives the merged texts and what they change of the text in force once all is chosen", () => {
    const [conflict] = ask({}).conflicts;
    const answer = ask({ [conflict?.conflict.id ?? ""]: "ours" });
    expect(answer.files).toEqual(files(OURS));
    expect(answer.changes).toMatchObject([
      { axis: "x", parameter: "run_current", was: { value: 0.6 }, toBe: { value: 1.05 } },
    ]);
    expect(answer.effects.length).toBeGreaterThan(0);
  });
});
