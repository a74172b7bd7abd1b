import { describe, expect, it } from "vitest";
import {
  axisAssemblySchema,
  controllerBoardSchema,
  driverSchema,
  driveTrainSchema,
  loadSchema,
  motorSchema,
  mountSchema,
  setPointSchema,
  supplySchema,
} from "@/lib/domain/assembly";
import { PARAMETER_NAMES } from "@/lib/domain/parameters";
import { RULES } from "@/lib/rules/table";
import { unlockedBy } from "@/lib/rules/unlocks";

const IDS = [
  "run-current-motor",
  "run-current-driver",
  "set-point",
  "driver-junction",
  "sense-resistor",
  "winding-temperature",
  "winding-class",
  "mount-temperature",
  "touch-temperature",
  "steps-per-mm",
  "step-rate",
  "torque-margin",
  "ramp-torque-margin",
  "corner-speed",
  "hold-torque",
  "fall-after-power-loss",
  "static-position",
  "supply-voltage",
  "braking-voltage",
  "lowering-voltage",
  "supply-power",
  "cable-drop",
  "supply-drives-current",
  "supply-overdrive",
  "inductance-rule",
  "resonance",
  "axis-resonance",
  "speed-reached",
  "soft-travel",
  "reference-run",
  "microstep-current",
  "microstep-friction",
  "inertia-ratio",
  "coupled-motors",
  "coupled-jump",
];

function fields(prefix: string, shape: Readonly<Record<string, unknown>>): string[] {
  return Object.keys(shape).map((field) => `${prefix}.${field}`);
}

const KNOWN = new Set<string>([
  ...PARAMETER_NAMES,
  ...fields("motor", motorSchema.shape),
  ...fields("driver", driverSchema.shape),
  ...fields("driver.set_point", setPointSchema.shape),
  ...fields("drive_train", driveTrainSchema.shape),
  ...fields("load", loadSchema.shape),
  ...fields("mount", mountSchema.shape),
  ...fields("supply", supplySchema.shape),
  ...fields("controller_board", controllerBoardSchema.shape),
  ...fields("axis", axisAssemblySchema.shape),
  "machine.ambient_c",
  "machine.enclosure_rise_k",
  "machine.motor_ambient_c",
]);

describe("the table of checks", () => {
  it("holds every check once", () => {
    expect(RULES.map(({ id }) => id)).toEqual(IDS);
  });

  it.each(RULES.map((rule) => [rule.id, rule] as const))(
    "%s says what it compares, its source and its margins",
    (_id, rule) => {
      for (const words of [rule.title, rule.compares, rule.formula, rule.source, rule.margin])
        expect(words.length).toBeGreaterThan(5);
      expect(rule.margin).toContain("near");
    },
  );

  it.each(RULES.map((rule) => [rule.id, rule] as const))(
    "%s needs only fields and parameters that exist",
    (_id, rule) => {
      expect(rule.needs.filter((need) => !KNOWN.has(need))).toEqual([]);
    },
  );
});

describe("what a field unlocks", () => {
  it("names the checks by their titles", () => {
    expect(unlockedBy("mount", "softening_c")).toEqual(["Temperature of the mount"]);
    expect(unlockedBy("motor", "inductance_mh")).toEqual([
      "Torque margin at speed",
      "Torque margin along the ramp",
      "Corner speed",
      "Supply against the winding's inductance",
      "Motors shared by two axes",
      "Corner speed of shared motors",
    ]);
    expect(unlockedBy("driver", "set_point.sense_resistor_rating_w")).toEqual(["Heat of the sense resistor"]);
    expect(unlockedBy("axis", "travel_mm")).toContain("Maximum speed reached");
    expect(unlockedBy("machine", "ambient_c")).toContain("Winding temperature");
    expect(unlockedBy("load", "holding_brake")).toEqual([
      "Hold torque of a raised load",
      "Fall after a loss of power",
      "Position error under load",
    ]);
    expect(unlockedBy("supply", "cable_length_m")).toEqual(["Voltage lost on the supply cable"]);
    expect(unlockedBy("motor", "thermal_class")).toEqual(["Thermal class of the winding"]);
    expect(unlockedBy("drive_train", "belt_width_mm")).toEqual(["Resonance of belt or screw"]);
    expect(unlockedBy("load", "reference_overtravel_mm")).toEqual(["Stopping at the reference switch"]);
    expect(unlockedBy("controller_board", "max_step_rate_hz")).toEqual(["Step rate"]);
  });

  it("is nothing for a field that no check uses", () => {
    expect(unlockedBy("motor", "thermal_time_constant_s")).toEqual([]);
  });
});
