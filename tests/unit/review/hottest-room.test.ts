import { describe, expect, test } from "vitest";
import { DEFAULT_POLICY } from "@/lib/domain/policy";
import { HOTTEST_ROOM, hottestRoom, inRoom } from "@/lib/review/hottest-room";
import { evaluateRules } from "@/lib/rules/evaluate-rules";
import type { RuleInput } from "@/lib/rules/types";
import { assemblyWith, EXAMPLE_TEXT, exampleAssembly, textsWithout, world } from "../rules/world";

const example = world(EXAMPLE_TEXT, exampleAssembly()).input;

function overAt(input: RuleInput, ambientC: number): string[] {
  return evaluateRules({ ...input, assembly: inRoom(input.assembly, ambientC) })
    .findings.filter(({ level }) => level === "over")
    .map(({ ruleId }) => ruleId);
}

describe("the hottest room", () => {
  test("is the last in which nothing new is over limit, to 0.1 K, and names the check that limits it", () => {
    const room = hottestRoom(example);
    expect(room.kind).toBe("limited");
    const { ambientC, limitedBy } = room;
    const always = new Set(room.alwaysOver.map(({ ruleId }) => ruleId));
    const fresh = (ambient: number) => overAt(example, ambient).filter((id) => !always.has(id));
    expect(fresh(ambientC!)).toEqual([]);
    expect(fresh(ambientC! + 0.11)).toContain(limitedBy!.ruleId);
  });

  test("of the mount is its softening temperature less 10 K and the rise of the case", () => {
    // Case: 7 K/W · 2 · (0.8 A)² · R(T); by hand the mount stands between the room and the loss that grows with it.
    const room = hottestRoom(example);
    expect(room.limitedBy).toEqual({ ruleId: "mount-temperature", axis: "x" });
    const { assembly } = example;
    const at = evaluateRules({ ...example, assembly: inRoom(assembly, room.ambientC!) });
    const caseC = at.quantities.find(({ name }) => name === "case_c")!.value;
    expect(caseC).toBeLessThanOrEqual(50);
    expect(caseC).toBeGreaterThan(49.8);
  });

  test("does not ask for the ambient temperature of the site", () => {
    const { ambient_c: _, ...assembly } = exampleAssembly();
    expect(hottestRoom({ ...example, assembly })).toEqual(hottestRoom(example));
  });

  test("keeps the motors' own air as far from the room as it is", () => {
    const warmer = assemblyWith((_, machine) => {
      machine.motor_ambient_c = 40;
    });
    expect(inRoom(warmer, 20)).toMatchObject({ ambient_c: 20, motor_ambient_c: 25 });
    const cooler = hottestRoom({ ...example, assembly: warmer }).ambientC!;
    expect(cooler).toBeCloseTo(hottestRoom(example).ambientC! - 5, 1);
  });

  test("is not limited by what is over in any room, and says so", () => {
    const hot = assemblyWith((axis) => {
      axis.mount = { softening_c: -60 };
    });
    const room = hottestRoom({ ...example, assembly: hot });
    expect(room.alwaysOver).toEqual([{ ruleId: "mount-temperature", axis: "x" }]);
    expect(room.limitedBy?.ruleId).not.toBe("mount-temperature");
  });

  test("cannot be told where no check of heat has its data, and names them", () => {
    const room = hottestRoom({
      ...world(textsWithout("run_current"), { axes: [{ axis: "x" }] }).input,
      policy: DEFAULT_POLICY,
    });
    expect(room).toMatchObject({ kind: "cannot", ambientC: null, limitedBy: null });
    expect(room.needs).toContain("axes.x.motor.resistance_ohm");
  });

  test("names data that some checks lack beside the limit of the others", () => {
    const bare = assemblyWith((axis) => {
      delete axis.driver!.junction_to_ambient_k_per_w;
    });
    const room = hottestRoom({ ...example, assembly: bare });
    expect(room.kind).toBe("limited");
    expect(room.needs).toContain("axes.x.driver.junction_to_ambient_k_per_w");
  });

  test("has no limit up to the hottest that is looked at where no loss is to speak of", () => {
    const cold = assemblyWith((axis) => {
      axis.motor = { ...axis.motor, resistance_ohm: 1e-6, winding_limit_c: 180 };
      axis.mount = { softening_c: 390 };
      axis.driver = { junction_limit_c: 300, junction_to_ambient_k_per_w: 1e-3, rds_on_ohm: 1e-3 };
    });
    const room = hottestRoom({
      ...example,
      assembly: cold,
      policy: { ...DEFAULT_POLICY, junction_limit_c: 200 },
    });
    expect(room).toMatchObject({ kind: "any", ambientC: HOTTEST_ROOM, limitedBy: null });
  });
});
