import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { DEFAULT_POLICY } from "@/lib/domain/policy";
import { answerPictures, changeMaps, readBefore } from "@/lib/review/axis-pictures";
import type { AxisPictures, AxisPicturesRequest, ChangeMaps } from "@/lib/review/axis-pictures";
import { roundTicks, roundUp, samplePlaces } from "@/lib/review/plot-range";
import { CONTINUOUS } from "@/lib/review/temperature-course";
import { exampleAssembly, exampleAxis, EXAMPLE_TEXT, parametersOf, texts } from "../rules/world";
import type { Texts } from "../rules/world";

const assembly = { ...exampleAssembly(), axes: [exampleAxis("x"), exampleAxis("y")] };
const inputOf = (x: Texts, y: Texts = EXAMPLE_TEXT) => ({
  parameters: [...parametersOf(x, assembly, "x"), ...parametersOf(y, assembly, "y")],
  assembly,
  policy: DEFAULT_POLICY,
});
const faster = texts({ acceleration: { typed: 9000, unit: "mm/s^2", factor: 1e-3 } });

describe("the maps of a change", () => {
  it("are those of the axes whose boundary or point moves", () => {
    const axes = (after: ReturnType<typeof inputOf>) =>
      changeMaps(inputOf(EXAMPLE_TEXT), after).map(({ axis }) => axis);
    expect(axes(inputOf(faster))).toEqual(["x"]);
    expect(axes(inputOf(faster, faster))).toEqual(["x", "y"]);
    expect(axes(inputOf(EXAMPLE_TEXT))).toEqual([]);
    expect(axes(inputOf(texts({ microsteps: { typed: 32, unit: null } })))).toEqual([]);
  });

  it("are those of every axis where nothing is there before", () => {
    const maps = changeMaps(null, inputOf(EXAMPLE_TEXT));
    expect(maps.map(({ axis, was }) => [axis, was])).toEqual([
      ["x", null],
      ["y", null],
    ]);
  });
});

const KEY_TABLE = {
  rules: [
    { key: "axis.{axis}.run_ma", parameter: "run_current", unit: "mA", basis: "rms" },
    { key: "axis.{axis}.top_speed", parameter: "max_speed", unit: "mm/s" },
    { key: "axis.{axis}.accel", parameter: "acceleration", unit: "mm/s²" },
  ],
} as const;
const fileOf = (accel: number) => ({
  path: "gantry.conf",
  format: "lines" as const,
  text: `[axis.x]\nrun_ma = 800\ntop_speed = 300\naccel = ${accel}\n`,
});
const textsOf = (accel: number) => ({
  files: [fileOf(accel)],
  keyTable: { rules: [...KEY_TABLE.rules] },
  assembly,
  policy: DEFAULT_POLICY,
});

describe("the worker's answer", () => {
  it("reads was and to be out of the two texts, the one before given or not", () => {
    const request = { kind: "change", id: 7, base: [fileOf(3000)], texts: textsOf(9000) } as const;
    const answer = answerPictures(request) as ChangeMaps;
    const [map] = answer.maps;
    expect(answer.id).toBe(7);
    expect(map?.was?.ok && map.was.point?.acceleration).toBe(3);
    expect(map?.toBe.ok && map.toBe.point?.acceleration).toBe(9);
    expect(answerPictures(request, readBefore(request))).toEqual(answer);
  });

  it("holds what is tried beside what the text says in all three pictures", () => {
    const request: AxisPicturesRequest = {
      kind: "axis",
      id: 1,
      axis: "X",
      texts: textsOf(3000),
      tried: { acceleration: 9, run_current: 1.2 },
      duty: CONTINUOUS,
    };
    const { map, torque, heat, now } = answerPictures(request) as AxisPictures;
    expect(map.was?.ok && map.was.point?.acceleration).toBe(3);
    expect(map.toBe.ok && map.toBe.point?.acceleration).toBe(9);
    expect(
      torque.toBe.ok && torque.was?.ok && torque.toBe.available[0]! / torque.was.available[0]!,
    ).toBeCloseTo(1.5, 9);
    expect(heat.toBe.ok && heat.toBe.current).toBeCloseTo(1.2, 12);
    expect(heat.was?.ok && heat.was.current).toBeCloseTo(0.8, 12);
    expect(now).toContainEqual({ parameter: "acceleration", value: 3, unit: "m/s²", basis: null });
  });

  it("has nothing before where no number is tried", () => {
    const request: AxisPicturesRequest = {
      kind: "axis",
      id: 1,
      axis: "x",
      texts: textsOf(3000),
      tried: {},
      duty: CONTINUOUS,
    };
    const { map, torque, heat } = answerPictures(request) as AxisPictures;
    expect([map.was, torque.was, heat.was]).toEqual([null, null, null]);
  });
});

describe("the scale of a picture", () => {
  it("ends at a round number no smaller than what it has to hold, and less than twice as large", () => {
    fc.assert(
      fc.property(fc.double({ min: 1e-6, max: 1e9, noNaN: true }), (value) => {
        const end = roundUp(value);
        expect(end).toBeGreaterThanOrEqual(value * (1 - 1e-9));
        expect(end).toBeLessThan(value * 2);
      }),
      { numRuns: 300, seed: 11 },
    );
    expect(roundUp(0)).toBe(1);
  });

  it("has round ticks within its ends", () => {
    expect(roundTicks(0, 1000, 5)).toEqual([0, 200, 400, 600, 800, 1000]);
    expect(roundTicks(-10, 45, 5)).toEqual([0, 20, 40]);
    expect(roundTicks(3, 3, 5)).toEqual([]);
  });

  it("is read at a jump on both of its sides", () => {
    const places = samplePlaces(10, 4, [3, 12]);
    expect(places).toEqual([0, 2.5, 3, 3 * (1 + 1e-6), 5, 7.5, 10]);
  });
});
