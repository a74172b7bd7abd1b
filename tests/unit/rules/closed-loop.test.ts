import { describe, expect, it } from "vitest";
import { assemblyWith, EXAMPLE_TEXT, world } from "./world";

describe("a drive that closes its own loop", () => {
  const closed = (decay: "slow" | "mixed") =>
    world(
      EXAMPLE_TEXT,
      assemblyWith((axis) => Object.assign(axis.driver!, { feedback: "closed_loop", decay_mode: decay })),
    );

  it.each(["microstep-friction", "microstep-current"])("is not covered by %s, which says so", (ruleId) => {
    expect(world().finding(ruleId).level).not.toBe("cannot");
    const finding = closed("slow").finding(ruleId);
    expect(finding).toMatchObject({ level: "cannot", needs: ["axes.x.driver.feedback"] });
    expect(finding.sentence).toContain("Not covered");
  });

  it("is not spoken of where the check has no meaning at all", () => {
    expect(closed("mixed").has("microstep-current")).toBe(false);
  });

  it("still heats its sense resistor", () => {
    expect(closed("slow").finding("sense-resistor").level).not.toBe("cannot");
  });
});
