import { describe, expect, it } from "vitest";
import { heatRecordOf } from "@/components/axis/heat-record-lines";

describe("a heating record as typed", () => {
  it("is one reading a line, minutes and °C, with point or comma", () => {
    expect(heatRecordOf("0 24\n\n 10 41,5\n20;49.0\n")).toEqual({
      ok: true,
      readings: [
        { time: 0, temperature: 24 },
        { time: 600, temperature: 41.5 },
        { time: 1200, temperature: 49 },
      ],
    });
  });

  it.each(["0 24\n10", "0 24\n10 x", "0 24\n-1 30", "0 24\n1 2 3"])(
    "names the line that is none: %j",
    (typed) => {
      const read = heatRecordOf(typed);
      expect(read.ok ? "" : read.sentence).toContain("Line 2 is not a time and a temperature");
    },
  );
});
