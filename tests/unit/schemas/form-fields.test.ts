import { describe, expect, it } from "vitest";
import { loadSchema } from "@/lib/domain/assembly";
import { CATALOG_DATA, CATALOG_KINDS } from "@/lib/domain/catalog";
import { formFields, typedSchema, typedValues } from "@/lib/schemas/form-fields";

const driver = CATALOG_DATA.driver;

describe("the fields of a form", () => {
  it("have a label for every kind, and numbers of a dimension have a unit", () => {
    const unitless = [
      ...["gain", "steps", "overall_scale", "teeth", "ratio", "efficiency", "tolerance"],
      "preload_friction",
    ];
    for (const schema of [...CATALOG_KINDS.map((kind) => CATALOG_DATA[kind]), loadSchema])
      for (const { path, label, entry, unit } of formFields(schema)) {
        expect(label, path).not.toBe(path);
        const name = path.split(".").at(-1) ?? "";
        if (entry === "number" && !unitless.includes(name)) expect(unit, path).not.toBe("");
      }
  });

  it("flatten a nested object in its place", () => {
    const paths = formFields(driver).map(({ path }) => path);
    expect(paths).toContain("set_point.gain");
    expect(paths).not.toContain("set_point");
  });
});

describe("entries", () => {
  const stored = {
    max_current_a: 2,
    quiescent_power_w: 0,
    decay_mode: "slow",
    set_point: { method: "direct", sense_resistance_ohm: 0.11 },
  };

  it("give back the stored data unchanged", () => {
    expect(typedSchema(driver).parse(typedValues(driver, stored))).toEqual(stored);
  });

  it("of nothing are no data at all, not even an empty set-point", () => {
    expect(typedSchema(driver).parse(typedValues(driver, undefined))).toEqual({});
  });

  it("tell yes, no and not stated apart", () => {
    for (const data of [{ holding_brake: true }, { holding_brake: false }, {}])
      expect(typedSchema(loadSchema).parse(typedValues(loadSchema, data))).toEqual(data);
  });

  it("say what is out of range with the unit, at the field", () => {
    const entries = typedValues(driver, { ...stored, max_current_a: 0 });
    const issues = typedSchema(driver).safeParse(entries).error?.issues ?? [];
    expect(issues.map(({ path, message }) => [path.join("."), message])).toEqual([
      ["max_current_a", "More than 0 A."],
    ]);
  });

  it("take a decimal comma inside the set-point", () => {
    const entries = {
      ...typedValues(driver, stored),
      set_point: { ...(typedValues(driver, stored).set_point as object), sense_resistance_ohm: "0,15" },
    };
    expect(typedSchema(driver).parse(entries)).toMatchObject({ set_point: { sense_resistance_ohm: 0.15 } });
  });
});
