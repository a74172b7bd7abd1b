import { describe, expect, it } from "vitest";
import { hardwareFactSchema, modelHardwareSchema, type HardwareFact } from "@/lib/domain/catalog";
import { resolveAssembly, type CatalogEntry } from "@/lib/review/resolve-assembly";

const ID = {
  motor: "6e4f4d2e-6a51-4b6e-8d3f-0a3d5f1f0001",
  otherMotor: "6e4f4d2e-6a51-4b6e-8d3f-0a3d5f1f0002",
  driver: "6e4f4d2e-6a51-4b6e-8d3f-0a3d5f1f0003",
  supply: "6e4f4d2e-6a51-4b6e-8d3f-0a3d5f1f0004",
  train: "6e4f4d2e-6a51-4b6e-8d3f-0a3d5f1f0005",
  gone: "6e4f4d2e-6a51-4b6e-8d3f-0a3d5f1f0009",
};

const items = new Map<string, CatalogEntry>([
  [
    ID.motor,
    { kind: "motor", data: { rated_current_a: 1.5, rated_current_basis: "rms", step_angle_deg: 1.8 } },
  ],
  [ID.otherMotor, { kind: "motor", data: { rated_current_a: 0.8, rated_current_basis: "rms" } }],
  [
    ID.driver,
    {
      kind: "driver",
      data: {
        max_current_a: 2,
        set_point: { method: "reference_voltage", gain: 8, basis: "peak", sense_resistance_ohm: 0.1 },
      },
    },
  ],
  [ID.supply, { kind: "supply", data: { voltage_v: 24 } }],
  [ID.train, { kind: "drive_train", data: { kind: "belt", pitch_mm: 2, teeth: 20 } }],
]);

const model = modelHardwareSchema.parse({
  supply: ID.supply,
  enclosure_rise_k: 5,
  axes: [
    {
      axis: "x",
      motor: ID.motor,
      driver: ID.driver,
      drive_train: ID.train,
      load: { mass_kg: 0.6 },
      travel_mm: 400,
    },
    { axis: "z", motor: ID.motor, driver: ID.driver },
  ],
});

function resolve(facts: HardwareFact[], own = model) {
  return resolveAssembly({ model: own, items, facts, site: { ambient_c: 35 } });
}

function fact(
  input: Omit<Partial<HardwareFact>, "axis"> & Pick<HardwareFact, "part"> & { axis?: string | null },
) {
  return hardwareFactSchema.parse({ axis: "x", evidence: "read on the board, 3 March", ...input });
}

describe("resolveAssembly", () => {
  it("is the model's hardware at the site's ambient where the machine has none of its own", () => {
    const { assembly, evidence, ignored } = resolve([]);
    expect(assembly).toEqual({
      ambient_c: 35,
      enclosure_rise_k: 5,
      supply: { voltage_v: 24 },
      axes: [
        {
          axis: "x",
          motor_count: 1,
          motor: { rated_current_a: 1.5, rated_current_basis: "rms", step_angle_deg: 1.8 },
          driver: {
            max_current_a: 2,
            set_point: { method: "reference_voltage", gain: 8, basis: "peak", sense_resistance_ohm: 0.1 },
          },
          drive_train: { kind: "belt", pitch_mm: 2, teeth: 20 },
          load: { mass_kg: 0.6 },
          travel_mm: 400,
          coupled_with: [],
        },
        expect.objectContaining({ axis: "z", load: {} }),
      ],
    });
    expect([evidence, ignored]).toEqual([[], []]);
  });

  it("puts a swapped motor in the model's place on that axis alone, with its evidence", () => {
    const { assembly, evidence } = resolve([fact({ part: "motor", axis: "X", itemId: ID.otherMotor })]);
    expect(assembly.axes.map(({ motor }) => motor?.rated_current_a)).toEqual([0.8, 1.5]);
    expect(assembly.axes[0]?.motor?.step_angle_deg).toBeUndefined();
    expect(evidence).toEqual([{ path: "axes.x.motor", evidence: "read on the board, 3 March" }]);
  });

  it("lays measured data over single fields and keeps the rest", () => {
    const { assembly } = resolve([
      fact({ part: "load", data: { mass_kg: 0.9, friction_n: 4 } }),
      fact({ part: "driver", data: { max_current_a: 1.8, "set_point.gain": 5 } }),
      fact({ part: "supply", axis: null, data: { voltage_v: 23.4 } }),
    ]);
    expect(assembly.axes[0]?.load).toEqual({ mass_kg: 0.9, friction_n: 4 });
    expect(assembly.axes[0]?.driver).toEqual({
      max_current_a: 1.8,
      set_point: { method: "reference_voltage", gain: 5, basis: "peak", sense_resistance_ohm: 0.1 },
    });
    expect(assembly.supply).toEqual({ voltage_v: 23.4 });
  });

  it("lays a sense resistor over the driver's set-point, whichever is fitted and in whichever order it was recorded", () => {
    const sensed = fact({
      part: "sense_resistor",
      data: { sense_resistance_ohm: 0.051, sense_resistor_rating_w: 0.5 },
    });
    const swapped = fact({ part: "driver", itemId: ID.driver });
    for (const facts of [
      [sensed, swapped],
      [swapped, sensed],
    ]) {
      const { assembly, evidence } = resolve(facts);
      expect(assembly.axes[0]?.driver?.set_point).toMatchObject({
        gain: 8,
        sense_resistance_ohm: 0.051,
        sense_resistor_rating_w: 0.5,
      });
      expect(assembly.axes[1]?.driver?.set_point?.sense_resistance_ohm).toBe(0.1);
      expect(evidence.map(({ path }) => path)).toContain("axes.x.driver.set_point.sense_resistance_ohm");
    }
  });

  it("holds a resistor that was read for the whole board for every axis", () => {
    const { assembly } = resolve([
      fact({ part: "sense_resistor", axis: null, data: { sense_resistance_ohm: 0.15 } }),
    ]);
    expect(assembly.axes.map(({ driver }) => driver?.set_point?.sense_resistance_ohm)).toEqual([0.15, 0.15]);
  });

  it("lets the later of two facts win", () => {
    const { assembly } = resolve([
      fact({ part: "load", data: { mass_kg: 0.9 } }),
      fact({ part: "load", data: { mass_kg: 1.1 } }),
    ]);
    expect(assembly.axes[0]?.load?.mass_kg).toBe(1.1);
  });

  it("says what it cannot use, and uses the rest", () => {
    const { assembly, ignored } = resolve([
      fact({ part: "motor", data: { resistance_ohm: -2, colour: "black", inductance_mh: 3 } }),
      fact({ part: "mount", itemId: ID.gone }),
      fact({ part: "load", axis: "w", data: { mass_kg: 1 } }),
    ]);
    expect(assembly.axes[0]?.motor).toEqual({
      rated_current_a: 1.5,
      rated_current_basis: "rms",
      step_angle_deg: 1.8,
      inductance_mh: 3,
    });
    expect(ignored).toEqual([
      { path: "axes.x.mount", reason: "The mount that is named here is not in the catalog." },
      { path: "axes.x.motor.resistance_ohm", reason: "-2 cannot be its value." },
      { path: "axes.x.motor.colour", reason: "There is no such field." },
      { path: "axes.w.load", reason: "The model has no axis “w”." },
    ]);
  });

  it("leaves the ambient out where the site does not know it", () => {
    const { assembly } = resolveAssembly({ model, items, facts: [], site: { ambient_c: null } });
    expect("ambient_c" in assembly).toBe(false);
  });
});
