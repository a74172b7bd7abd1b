import { describe, expect, test } from "vitest";
import type { FloorRow } from "@/lib/domain/floor";
import type { FloorCounts } from "@/lib/schemas/floor";
import { floorHeading, floorSubtitle } from "@/components/machines/floor-words";

const counts = (more: Partial<FloorCounts> = {}): FloorCounts => ({
  inService: 248,
  offBaseline: 0,
  notRead: 0,
  outOfService: 0,
  over: 0,
  onDeviation: 0,
  nextDeviationEnd: null,
  ...more,
});

describe("the heading of the floor", () => {
  test.each([
    [{ offBaseline: 6, notRead: 1 }, "6 of 248 machines are off baseline, 1 not read"],
    [{ offBaseline: 1 }, "1 of 248 machines is off baseline"],
    [{ notRead: 3 }, "No machine is off baseline; 3 of 248 machines not fully read"],
    [{}, "All 248 machines are on baseline"],
    [{ inService: 1 }, "The machine is on baseline"],
    [{ inService: 0 }, "No machine is in service here"],
  ])("of %o", (more, words) => {
    expect(floorHeading(counts(more))).toBe(words);
  });
});

describe("the line below it", () => {
  const row = (serial: string, sentence: string): FloorRow => ({
    machineId: serial,
    serial,
    modelId: "m",
    modelName: "Label drafter 2",
    siteName: "North hall",
    standing: "over",
    sentence,
    cells: {},
  });
  const now = new Date("2026-03-01T22:00:00Z");

  test("names the first two machines over a limit, the deviation that ends first, and what is out of service", () => {
    const rows = [
      row("LD-117", "X torque margin 0.91 → 0.07"),
      row("DG-104", "Z may fall"),
      row("DG-1", "third"),
    ];
    const words = floorSubtitle(
      counts({ over: 3, onDeviation: 4, nextDeviationEnd: "2026-03-10", outOfService: 2 }),
      rows,
      now,
    );
    expect(words).toBe(
      "3 over limit: LD-117 X torque margin 0.91 → 0.07; DG-104 Z may fall. 4 run on permitted deviations, one ends in 9 days. 2 out of service.",
    );
  });

  test("says where none is over a limit, and what ends today", () => {
    expect(floorSubtitle(counts({ onDeviation: 1, nextDeviationEnd: "2026-03-01" }), [], now)).toBe(
      "None is over a limit. 1 runs on a permitted deviation, which ends today.",
    );
  });
});
