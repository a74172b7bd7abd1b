import { describe, expect, it } from "vitest";
import { effects } from "@/lib/review/effects";
import { movedTests } from "@/lib/review/moved-tests";
import { parameterChanges } from "@/lib/review/parameter-changes";
import { check, edited, TEXT } from "./support/gantry";

function testsOf(was: string, toBe: string) {
  const [before, after] = [check(was), check(toBe)];
  const changes = parameterChanges(before, after);
  return movedTests(effects({ before, after, changes }), changes);
}

const named = (tests: ReturnType<typeof testsOf>) => tests.map(({ axis, test }) => `${axis} ${test}`);

describe("movedTests", () => {
  it("asks for nothing where nothing moved", () => {
    expect(testsOf(TEXT, TEXT)).toEqual([]);
  });

  it("asks for moves or a ladder after a faster acceleration, and for no heat record", () => {
    const tests = testsOf(TEXT, edited("x", "acc = 6000", "acc = 8000"));
    expect(named(tests)).toEqual([expect.stringMatching(/^x (move_run|acceleration_ladder)$/)]);
    expect(tests[0]!.because[0]).toMatch(/^torque margin .+ → .+/);
  });

  it("asks for a ladder where the margin is no longer enough", () => {
    expect(named(testsOf(TEXT, edited("x", "acc = 6000", "acc = 60000")))).toContain("x acceleration_ladder");
  });

  it("asks for a heat record after another current, with the temperatures that move", () => {
    const tests = testsOf(TEXT, edited("x", "amps = 0.85", "amps = 1.05"));
    const heat = tests.find(({ test }) => test === "heat_record")!;
    expect(heat.axis).toBe("x");
    expect(heat.because.join()).toMatch(/motor case \d+ → \d+ °C/);
    expect(tests.every(({ axis }) => axis === "x")).toBe(true);
  });

  it("asks for the corner test after another corner speed although the start-stop speed stays", () => {
    const tests = testsOf(TEXT, edited("x", "corner = 12", "corner = 14"));
    expect(named(tests)).toEqual([expect.stringMatching(/^x corner_(run|ladder)$/)]);
    expect(tests[0]!.because[0]).toBe("corner speed 12 → 14 mm/s");
  });
});
