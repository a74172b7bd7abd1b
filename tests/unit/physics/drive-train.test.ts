import { describe, expect, it } from "vitest";
import {
  fullStepsPerTurn,
  missingGeometry,
  radiusPerRadian,
  rotorTeeth,
  stepsPerTravel,
  travelPerMotorTurn,
} from "@/lib/physics/drive-train";

describe("travel of one motor turn", () => {
  it.each([
    ["a belt: pitch · teeth", { kind: "belt", pitch_mm: 2, teeth: 20 } as const, 0.04],
    ["a belt behind a gear of 4", { kind: "belt", pitch_mm: 2, teeth: 20, ratio: 4 } as const, 0.01],
    ["a screw: its lead", { kind: "screw", lead_mm: 8 } as const, 0.008],
    [
      "a rack: π · module · teeth",
      { kind: "rack", module_mm: 1, teeth: 20, ratio: 2 } as const,
      Math.PI * 0.01,
    ],
    ["a rotary axis: radians of the output", { kind: "rotary", ratio: 90 } as const, (2 * Math.PI) / 90],
  ])("of %s", (_words, driveTrain, travel) => {
    expect(travelPerMotorTurn(driveTrain)).toBeCloseTo(travel, 12);
    expect(radiusPerRadian(driveTrain)).toBeCloseTo(travel / (2 * Math.PI), 12);
    expect(missingGeometry(driveTrain)).toEqual([]);
  });

  it.each([
    ["no kind", {}, ["kind"]],
    ["a belt without its teeth", { kind: "belt", pitch_mm: 2 } as const, ["teeth"]],
    [
      "a belt of which only the lead of a screw is known",
      { kind: "belt", lead_mm: 8 } as const,
      ["pitch_mm", "teeth"],
    ],
    ["a screw without its lead", { kind: "screw", ratio: 1 } as const, ["lead_mm"]],
    ["a rack without its module", { kind: "rack", teeth: 20 } as const, ["module_mm"]],
  ])("is not known for %s", (_words, driveTrain, fields) => {
    expect(travelPerMotorTurn(driveTrain)).toBeNull();
    expect(missingGeometry(driveTrain)).toEqual(fields);
  });
});

describe("steps", () => {
  it("are 200 a turn and 50 teeth for 1.8°, 400 and 100 for 0.9°", () => {
    expect([fullStepsPerTurn(1.8), rotorTeeth(1.8)]).toEqual([200, 50]);
    expect([fullStepsPerTurn(0.9), rotorTeeth(0.9)]).toEqual([400, 100]);
  });
  it("count 80 in a millimetre for 16 microsteps on 40 mm a turn", () => {
    expect(stepsPerTravel({ stepAngleDeg: 1.8, microsteps: 16, travelPerTurn: 40 })).toBeCloseTo(80, 12);
  });
});
