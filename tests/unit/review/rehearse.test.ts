import { describe, expect, test } from "vitest";
import { hottestRoom } from "@/lib/review/hottest-room";
import { rehearse, warmer } from "@/lib/review/rehearse";
import { check, input, TEXT } from "./support/gantry";

const today = input(TEXT);

describe("a rehearsal on one machine", () => {
  test("finds nothing graver where nothing is another", () => {
    const found = rehearse({ today, toBe: today.assembly, axes: [], room: "today" });
    expect(found.graver).toEqual([]);
    expect(found.toBe).toBe(found.was);
  });

  test("lists what is graver than today in a warmer room, the gravest first, with both values", () => {
    const found = rehearse({ today, toBe: warmer(today.assembly, 60), axes: [], room: "today" });
    expect(found.graver.length).toBeGreaterThan(0);
    const levels = found.graver.map(({ toBe }) => toBe);
    expect(levels[0]).toBe("over");
    expect([...levels].sort((a, b) => (a === b ? 0 : a === "over" ? -1 : 1))).toEqual(levels);
    const winding = found.graver.find(
      ({ ruleId }) => ruleId === "winding-temperature" || ruleId === "mount-temperature",
    )!;
    expect(winding.value! - winding.valueWas!).toBeGreaterThan(60);
  });

  test("asks for the hottest room of today's hardware on a warm day", () => {
    const found = rehearse({ today, toBe: warmer(today.assembly, 60), axes: [], room: "today" });
    const { parameters } = check(TEXT);
    expect(found.hottestRoom).toEqual(
      hottestRoom({ parameters, assembly: today.assembly, policy: today.policy }),
    );
  });

  test("leaves a room unknown whose temperature nobody has stated", () => {
    const { ambient_c: _, ...nowhere } = today.assembly;
    expect(warmer(nowhere, 10)).toEqual(nowhere);
    const found = rehearse({
      today: { ...today, assembly: nowhere },
      toBe: nowhere,
      axes: [],
      room: "today",
    });
    expect(found.graver).toEqual([]);
  });

  test("calls a check that can no longer be made graver than one that could", () => {
    const toBe = {
      ...today.assembly,
      axes: today.assembly.axes.map((axis) => ({ ...axis, motor: {} })),
    };
    const found = rehearse({ today, toBe, axes: ["x", "z"], room: "to_be" });
    const torque = found.graver.filter(({ ruleId }) => ruleId === "torque-margin");
    expect(torque.map(({ toBe: level }) => level)).toContain("cannot");
    expect(found.axes).toEqual(["x", "z"]);
  });
});
