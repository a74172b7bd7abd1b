import { describe, expect, it } from "vitest";
import { assemblyWith, textsWithout, world } from "./world";

const NO_HOLD = textsWithout("hold_current");

describe("the current at standstill that the text does not state", () => {
  it.each([
    ["a weight", { incline_deg: 90 }],
    ["a weight in part balanced", { incline_deg: 90, counterbalance_n: 3 }],
    ["an external force", { external_force_n: 5 }],
    ["an external force beside a weight of the same size", { incline_deg: 30, external_force_n: -2.941995 }],
  ])("is not guessed under %s", (_words, load) => {
    const found = world(
      NO_HOLD,
      assemblyWith((axis) => Object.assign(axis.load!, load)),
    );
    const finding = found.finding("static-position");
    expect(finding).toMatchObject({ level: "cannot", needs: ["axes.x.hold_current"] });
    expect(finding.sentence).toBe("Not in the text: hold current.");
    expect(found.quantity("static_position_error")).toBeUndefined();
  });

  it("counts as the run current under friction alone, and as assumed", () => {
    const finding = world(NO_HOLD).finding("static-position");
    expect(finding.level).toBe("within");
    // 4 N at 6.366 mm for each radian beside 0.45 N·m · 0.8/1.5.
    expect(finding.value).toBeCloseTo((4 * 0.04) / (2 * Math.PI) / 0.24, 12);
    expect(finding.assumed).toEqual(["axes.x.hold_current"]);
  });

  it("is nobody's guess where the text states it", () => {
    expect(world().finding("static-position").assumed).toEqual([]);
  });
});
