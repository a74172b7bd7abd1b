import { describe, expect, it } from "vitest";
import { assemblyWith, EXAMPLE_TEXT, texts, world } from "./world";
import type { Texts } from "./world";

function exampleWith(change: Parameters<typeof assemblyWith>[0], text: Texts = EXAMPLE_TEXT) {
  return world(text, assemblyWith(change));
}

const JERK: Texts = { jerk: { typed: 3000, unit: "mm/s³", factor: 1e-3 } };

describe("the jerk of the text", () => {
  /** 100 mm/s at 3 m/s³: 2·√(0.1/3) = 0.36515 s, the acceleration of 3 m/s² is never reached. */
  const seekingSoftly = (free: number, jerk: Texts = JERK) =>
    exampleWith(
      (axis) => (axis.load!.reference_overtravel_mm = free),
      texts({ reference_run_speed: { typed: 100, unit: "mm/s", factor: 1e-3 }, ...jerk }),
    ).finding("reference-run");

  it("lengthens the way to stop at the reference switch: 0.1 · 0.36515/2 = 18.26 mm", () => {
    const finding = seekingSoftly(5);
    expect(finding.level).toBe("over");
    expect(finding.value).toBeCloseTo(0.018257, 6);
    expect(finding.parameters).toContain("jerk");
    expect(seekingSoftly(5, {}).level).toBe("within");
    expect(seekingSoftly(23).level).toBe("within");
  });

  it("adds a/j to the time to stop where the acceleration is reached: 0.1 · (0.1/3 + 3/300)/2 = 2.167 mm", () => {
    const quick = { jerk: { typed: 300, unit: "m/s³" } };
    expect(seekingSoftly(5, quick).value).toBeCloseTo((0.1 * (0.1 / 3 + 0.01)) / 2, 12);
  });

  it("keeps the maximum speed from being reached: ∛(3 · 0.1²/4) = 195.7 mm/s of 300", () => {
    const softly = exampleWith((axis) => (axis.travel_mm = 100), texts(JERK));
    const { level, value, sentence } = softly.finding("speed-reached");
    expect(level).toBe("near");
    expect(sentence).toContain("turns round at 195.7 mm/s");
    expect(sentence).toContain("would need 189.7 mm");
    // The quantity and the value of the check know no jerk.
    expect(softly.quantity("peak_speed")).toBe(0.3);
    expect(value).toBe(0.3);
    const far = exampleWith((axis) => (axis.travel_mm = 190), texts(JERK));
    expect(far.finding("speed-reached").level).toBe("within");
  });

  it("below 0 is refused by both in the words of the text", () => {
    const back = texts({
      reference_run_speed: { typed: 100, unit: "mm/s", factor: 1e-3 },
      jerk: { typed: -1, unit: "m/s³" },
    });
    const found = exampleWith((axis) => (axis.load!.reference_overtravel_mm = 5), back);
    for (const ruleId of ["reference-run", "speed-reached"])
      expect(found.finding(ruleId)).toMatchObject({ level: "cannot", needs: ["axes.x.jerk"] });
  });

  it("of 0 is none", () => {
    const none = { jerk: { typed: 0, unit: "m/s³" } };
    expect(seekingSoftly(5, none).value).toBeCloseTo(0.1 ** 2 / 6, 12);
    expect(world(texts(none)).finding("speed-reached").level).toBe("within");
  });
});
