import { describe, expect, it } from "vitest";
import { applyDeviations } from "@/lib/review/deviation-text";
import { ASSEMBLY, KEY_TABLE, TEXT, check, edited, files } from "./support/gantry";

const own = { files: files(TEXT), keyTable: KEY_TABLE, assembly: ASSEMBLY };

describe("applyDeviations", () => {
  it("writes a permitted value into the baseline's text and changes nothing else", () => {
    const {
      files: required,
      applied,
      refused,
    } = applyDeviations({
      ...own,
      deviations: [
        { axis: "x", parameter: "max_speed", value: 0.25, unit: "m/s" },
        { axis: "z", parameter: "run_current", value: 1.1, unit: "A", basis: "rms" },
      ],
    });
    expect(required[0]?.text).toBe(
      edited("x", "vmax = 300", "vmax = 250", edited("z", "amps = 1.2", "amps = 1.1")),
    );
    expect(applied.map(({ axis, parameter, line }) => [axis, parameter, line])).toEqual([
      ["x", "max_speed", 10],
      ["z", "run_current", 16],
    ]);
    expect(refused).toEqual([]);
  });

  it("writes a peak current in the basis that the text uses", () => {
    const { files: required } = applyDeviations({
      ...own,
      deviations: [{ axis: "x", parameter: "run_current", value: Math.SQRT2, unit: "A", basis: "peak" }],
    });
    const [current] = check(required[0]?.text ?? "").parameters.filter(
      ({ axis, parameter }) => axis === "x" && parameter === "run_current",
    );
    expect(current).toMatchObject({ basis: "rms", value: expect.closeTo(1, 6) });
  });

  it("says what the text has no place for and still writes the rest", () => {
    const { files: required, refused } = applyDeviations({
      ...own,
      deviations: [
        { axis: "x", parameter: "jerk", value: 100, unit: "m/s³" },
        { axis: "x", parameter: "corner_speed", value: 0.01, unit: "m/s" },
      ],
    });
    expect(required[0]?.text).toBe(edited("x", "corner = 12", "corner = 10"));
    expect(refused).toEqual([{ axis: "x", parameter: "jerk", reason: expect.stringMatching(/\S/) }]);
  });

  it("gives the baseline's files back where nothing deviates", () => {
    expect(applyDeviations({ ...own, deviations: [] }).files).toBe(own.files);
  });
});
