import { beforeAll, describe, expect, it } from "vitest";
import type { KeyRule } from "@/lib/domain/key-table";
import { acceptSuggestion } from "@/lib/services/key-tables/accept-suggestion";
import { saveKeyTable } from "@/lib/services/key-tables/save";
import { setBasis } from "@/lib/services/key-tables/set-basis";
import { showKeyTable } from "@/lib/services/key-tables/show";
import type { TestPerson } from "@/tests/support/world";
import { KEY_RULES, model, person } from "@/tests/support/world";
import { queuedRechecks } from "./support";

let engineer: TestPerson;
beforeAll(async () => {
  engineer = await person("engineer");
});

const save = (modelId: string, rules: KeyRule[], ifMatch = 1) =>
  saveKeyTable(engineer, { modelId, rules, note: "", ifMatch });

describe("a key table", () => {
  it("keeps each saved version readable and has the model's machines checked again", async () => {
    const { id } = await model(engineer);
    const saved = await save(id, KEY_RULES.slice(0, 1));
    expect(saved.versions.map(({ version, rules }) => [version, rules.length])).toEqual([
      [2, 1],
      [1, KEY_RULES.length],
    ]);
    expect(await queuedRechecks({ modelId: id })).toBe(2);
  });

  it("refuses a save upon a version that no longer stands", async () => {
    const { id } = await model(engineer);
    await save(id, [...KEY_RULES]);
    await expect(save(id, [])).rejects.toMatchObject({ code: "precondition_failed" });
  });

  it.each<[string, KeyRule, RegExp]>([
    ["an unknown unit", { key: "a", parameter: "supply_voltage", unit: "furlong" }, /“furlong” is not known/],
    [
      "a unit of something else",
      { key: "a", parameter: "supply_voltage", unit: "mA" },
      /not a unit of supply/,
    ],
    [
      "a basis on what is no current",
      { key: "{axis}.v", parameter: "max_speed", basis: "rms" },
      /Only a current/,
    ],
    ["no axis", { key: "a", parameter: "max_speed" }, /Name the axis/],
    [
      "an axis for the machine's own",
      { key: "a", parameter: "supply_voltage", axis: "x" },
      /belongs to the machine/,
    ],
    ["an axis that the model has not", { key: "a", parameter: "max_speed", axis: "q" }, /has no axis “q”/],
    ["a misspelt placeholder", { key: "{achse}.v", parameter: "max_speed", axis: "x" }, /Only \{axis\}/],
  ])("refuses a row with %s", async (_, rule, sentence) => {
    const { id } = await model(engineer);
    await expect(save(id, [rule])).rejects.toThrow(sentence);
  });

  it("refuses two rows that say the same", async () => {
    const { id } = await model(engineer);
    const [first] = KEY_RULES;
    await expect(
      save(id, [first!, { ...first!, key: first!.key.toUpperCase().replace("AXIS}", "axis}") }]),
    ).rejects.toThrow(/Row 1 says the same/);
  });

  it("takes one suggested rule more, once", async () => {
    const { id } = await model(engineer);
    const rule: KeyRule = { key: "axis.{axis}.corner", parameter: "corner_speed", unit: "mm/s" };
    const accepted = await acceptSuggestion(engineer, { modelId: id, rule });
    expect(accepted).toMatchObject({ version: 2, rules: [...KEY_RULES, rule] });
    expect((await acceptSuggestion(engineer, { modelId: id, rule })).version).toBe(2);
    const other: KeyRule = { ...rule, parameter: "max_speed" };
    await expect(acceptSuggestion(engineer, { modelId: id, rule: other })).rejects.toMatchObject({
      code: "conflict",
    });
  });

  it("loses no rule when two are accepted at the same moment", async () => {
    const { id } = await model(engineer);
    const rule = (name: "corner_speed" | "jerk"): KeyRule => ({
      key: `axis.{axis}.${name}`,
      parameter: name,
    });
    await Promise.all(
      (["corner_speed", "jerk"] as const).map((name) =>
        acceptSuggestion(engineer, { modelId: id, rule: rule(name) }),
      ),
    );
    const table = await showKeyTable(engineer, id);
    expect(table.version).toBe(3);
    expect(table.rules).toHaveLength(KEY_RULES.length + 2);
  });

  it("remembers whether a current is peak or rms, asked by the key as the text has it", async () => {
    const { id } = await model(engineer);
    const { basis: _, ...run } = KEY_RULES[0]!;
    await save(id, [run, ...KEY_RULES.slice(1)]);
    const told = await setBasis(engineer, {
      modelId: id,
      key: "Axis.X.run_ma",
      parameter: "run_current",
      basis: "peak",
    });
    expect(told.version).toBe(3);
    expect(told.rules[0]).toEqual({ ...run, basis: "peak" });
    expect(told.rules[1]).toEqual(KEY_RULES[1]);
    const again = { modelId: id, key: run.key, parameter: "run_current", basis: "peak" } as const;
    expect((await setBasis(engineer, again)).version).toBe(3);
  });

  it("takes no basis for a key that no row makes a current", async () => {
    const { id } = await model(engineer);
    const asked = { modelId: id, key: "axis.x.amps", parameter: "run_current", basis: "rms" } as const;
    await expect(setBasis(engineer, asked)).rejects.toMatchObject({ code: "invalid", pointer: "/key" });
  });

  it("is read but not written by a technician", async () => {
    const technician = await person("technician");
    const { id } = await model(engineer);
    expect((await showKeyTable(technician, id)).version).toBe(1);
    const rule: KeyRule = { key: "axis.{axis}.jerk", parameter: "jerk" };
    await expect(acceptSuggestion(technician, { modelId: id, rule })).rejects.toMatchObject({
      code: "forbidden",
    });
  });
});
