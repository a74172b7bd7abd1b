import { describe, expect, it } from "vitest";
import { assemblyWith, EXAMPLE_TEXT, world } from "./world";

/** By hand: on a hold current of 0.4 A rms of 1.5 A the motor holds 0.45 N·m · 0.4/1.5 = 0.12 N·m; r = 40 mm/2π. */
const HELD = 0.12 / (0.04 / (2 * Math.PI));

function resting(load: { readonly pushed: number; readonly rubbed: number; readonly braked?: boolean }) {
  const assembly = assemblyWith((axis) => {
    axis.load!.external_force_n = load.pushed * HELD;
    axis.load!.friction_n = load.rubbed * HELD;
    axis.load!.holding_brake = load.braked ?? false;
  });
  return world(EXAMPLE_TEXT, assembly).finding("static-position");
}

describe("static-position beyond its limit", () => {
  it("is a caution on a holding brake, and says so", () => {
    const { level, sentence } = resting({ pushed: 1.2, rubbed: 0, braked: true });
    expect(level).toBe("near");
    expect(sentence).toContain("a caution and no more because a holding brake carries it");
  });

  it("is a caution where friction makes up the rest, and says so", () => {
    const { level, sentence } = resting({ pushed: 0.2, rubbed: 0.7 });
    expect(level).toBe("near");
    expect(sentence).toContain("a caution and no more because friction makes up the rest");
  });

  it("is over without either, and gives no excuse where none is needed", () => {
    const over = resting({ pushed: 0.8, rubbed: 0 });
    expect(over.level).toBe("over");
    expect(over.sentence).not.toContain("caution");
    const near = resting({ pushed: 0.6, rubbed: 0, braked: true });
    expect(near.level).toBe("near");
    expect(near.sentence).not.toContain("caution");
  });
});
