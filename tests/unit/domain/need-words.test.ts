import { describe, expect, it } from "vitest";
import { assemblySchema, axisAssemblySchema } from "@/lib/domain/assembly";
import { needWords } from "@/lib/domain/need-words";

describe("needWords", () => {
  it.each([
    ["axes.x.motor.inductance_mh", "winding inductance of the X motor", "hardware"],
    ["axes.turret.drive_train.pitch_mm", "belt pitch of the Turret drive train", "hardware"],
    ["axes.x.driver.set_point.sense_resistance_ohm", "sense resistance of the X driver", "hardware"],
    ["axes.x.motor", "the X motor", "hardware"],
    ["axes.x.travel_mm", "travel of the X axis", "hardware"],
    ["axes.z.load.incline_deg", "incline of the Z load", "hardware"],
    ["axes.x.corner_speed", "X corner speed", "text"],
    ["axes.x.run_current.basis", "whether the X run current is peak or rms", "text"],
    ["max_step_rate", "maximum step rate", "text"],
    ["supply.bus_capacitance_uf", "bus capacitance of the supply", "hardware"],
    ["controller_board.max_step_rate_hz", "highest step rate of the controller board", "hardware"],
    ["ambient_c", "ambient temperature of the site", "site"],
  ])("says %s as “%s”", (path, words, where) => {
    expect(needWords(path)).toEqual({ words, where });
  });

  it("gives an unknown path back as it is", () => {
    expect(needWords("axes.x.nothing.of_the_kind").words).toBe("axes.x.nothing.of_the_kind");
    expect(needWords("constructor").words).toBe("constructor");
  });

  it("has words without underscores for every hardware field", () => {
    const fields = [
      ...Object.keys(axisAssemblySchema.shape).map((field) => `axes.x.${field}`),
      ...Object.keys(assemblySchema.shape),
    ];
    for (const field of fields) expect(needWords(field).words).not.toMatch(/_/);
  });
});
