import { describe, expect, test } from "vitest";
import { assemblySchema } from "@/lib/domain/assembly";
import { withoutRefined, withRefined, type RefinedOfAxis } from "@/lib/review/refined-assembly";
import { evaluateRules } from "@/lib/rules/evaluate-rules";
import { heatModel } from "@/lib/rules/heat-model";
import { assemblyWith, EXAMPLE_TEXT, exampleAssembly, textsWithout, world } from "../rules/world";

const REFINED: RefinedOfAxis = {
  axis: "X",
  field: "case_to_ambient_k_per_w",
  catalog: 7,
  value: 8.25,
  low: 7.2,
  high: 9.3,
  readings: 3,
};

describe("thermal resistances refined by measured temperatures", () => {
  test("take the catalog's place with their upper end, and the checks that rest on them say so", () => {
    const assembly = withRefined(exampleAssembly(), [REFINED]);
    expect(assemblySchema.parse(assembly)).toEqual(assembly);
    expect(assembly.axes[0]?.motor?.case_to_ambient_k_per_w).toBe(9.3);
    const { findings } = evaluateRules({ ...world().input, assembly });
    const of = (ruleId: string) => findings.find((finding) => finding.ruleId === ruleId)!.sentence;
    const note =
      "from case to ambient is refined from 3 temperatures measured on this machine; the catalog says 7 K/W. The check takes the upper end of the 95 % interval, 9.3 K/W, in place of its middle, 8.25 K/W.";
    expect(of("mount-temperature")).toContain(note);
    expect(of("winding-temperature")).not.toContain("refined");
    expect(of("step-rate")).not.toContain("refined");
  });

  test("give way to the catalog's again where a fault is looked for", () => {
    expect(withoutRefined(withRefined(exampleAssembly(), [REFINED]))).toEqual(exampleAssembly());
  });

  test("are left out once the catalog value that they started from has given way to another", () => {
    const other = assemblyWith((axis) => {
      axis.motor!.case_to_ambient_k_per_w = 6;
    });
    expect(withRefined(other, [REFINED])).toEqual(other);
    expect(withRefined(exampleAssembly(), [{ ...REFINED, axis: "y" }])).toEqual(exampleAssembly());
  });
});

describe("what heats the motor of an axis", () => {
  test("is its current and resistance, with the thermal data that are stated", () => {
    const bare = assemblyWith((axis) => {
      delete axis.motor!.winding_to_ambient_k_per_w;
    });
    expect(heatModel(world(EXAMPLE_TEXT, bare).input, "X")).toMatchObject({
      ok: true,
      value: {
        axis: "x",
        current: 0.8,
        holdCurrent: 0.4,
        resistanceAt20: 2.1,
        windingResistance: null,
        caseResistance: 7,
        ambient: 35,
      },
    });
  });

  test("names what is missing", () => {
    const lack = heatModel(world(textsWithout("run_current"), { axes: [{ axis: "x" }] }).input, "x");
    expect(lack).toMatchObject({ ok: false, needs: expect.arrayContaining(["axes.x.motor.resistance_ohm"]) });
    expect(heatModel(world().input, "q")).toMatchObject({ ok: false, needs: ["axes.q"] });
  });
});
