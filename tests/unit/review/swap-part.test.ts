import { describe, expect, test } from "vitest";
import { hardwareFactSchema, modelHardwareSchema, type HardwareFact } from "@/lib/domain/catalog";
import { swapPart } from "@/lib/review/swap-part";

const id = (digit: number) => `6e4f4d2e-6a51-4b6e-8d3f-0a3d5f1f000${digit}`;
const [OLD, OTHER, NEW, DRIVER] = [id(1), id(2), id(3), id(4)];

const model = modelHardwareSchema.parse({
  axes: [
    { axis: "x", motor: OLD, driver: DRIVER },
    { axis: "y", motor: OLD, driver: DRIVER },
    { axis: "z", motor: OTHER },
  ],
});

const fact = (input: Partial<HardwareFact> & Pick<HardwareFact, "part">): HardwareFact =>
  hardwareFactSchema.parse({ axis: null, evidence: "read on the machine", ...input });

const motors = (swapped: ReturnType<typeof swapPart>) => swapped.model.axes.map(({ motor }) => motor);

describe("another part fitted", () => {
  test("takes the place of the named part only", () => {
    const swapped = swapPart({ model, facts: [] }, { part: "motor", itemId: NEW, replacesId: OLD });
    expect(swapped.axes).toEqual(["x", "y"]);
    expect(motors(swapped)).toEqual([NEW, NEW, OTHER]);
    expect(swapped.model.axes[0]?.driver).toBe(DRIVER);
  });

  test("takes the place of whatever is there where none is named, and of nothing where nothing is", () => {
    expect(swapPart({ model, facts: [] }, { part: "motor", itemId: NEW, replacesId: null }).axes).toEqual([
      "x",
      "y",
      "z",
    ]);
    expect(swapPart({ model, facts: [] }, { part: "driver", itemId: NEW, replacesId: null }).axes).toEqual([
      "x",
      "y",
    ]);
  });

  test("goes by what the machine itself has recorded before what its model says", () => {
    const facts = [fact({ part: "motor", axis: "X", itemId: OTHER })];
    const swapped = swapPart({ model, facts }, { part: "motor", itemId: NEW, replacesId: OTHER });
    expect(swapped.axes).toEqual(["x", "z"]);
    expect(swapped.facts).toEqual([]);
    expect(motors(swapped)).toEqual([NEW, OLD, NEW]);
  });

  test("leaves alone where the very part is fitted already", () => {
    expect(swapPart({ model, facts: [] }, { part: "motor", itemId: OLD, replacesId: null }).axes).toEqual([
      "z",
    ]);
  });

  test("takes along what was measured on the part that leaves, and keeps it where the part stays", () => {
    const facts = [fact({ part: "motor", data: { resistance_ohm: 2.4 } })];
    const swapped = swapPart({ model, facts }, { part: "motor", itemId: NEW, replacesId: OLD });
    expect(swapped.facts).toEqual([{ ...facts[0], axis: "z" }]);
  });

  test("keeps the sense resistor of the board", () => {
    const facts = [fact({ part: "sense_resistor", axis: "x", data: { sense_resistance_ohm: 0.11 } })];
    expect(swapPart({ model, facts }, { part: "driver", itemId: NEW, replacesId: null }).facts).toEqual(
      facts,
    );
  });
});
