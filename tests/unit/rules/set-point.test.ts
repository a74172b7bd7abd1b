import { describe, expect, it } from "vitest";
import type { SetPoint } from "@/lib/domain/assembly";
import { axisModel } from "@/lib/rules/axis-model";
import { assemblyWith, EXAMPLE_TEXT, texts, textsWithout, world } from "./world";
import type { Texts } from "./world";

const SCALE: SetPoint = {
  method: "digital_scale",
  full_scale_v: 0.325,
  internal_resistance_ohm: 0.02,
  steps: 32,
  sense_resistance_ohm: 0.11,
  sense_resistor_rating_w: 0.5,
};

function withSetPoint(text: Texts, setPoint: SetPoint) {
  return world(
    text,
    assemblyWith((axis) => (axis.driver!.set_point = setPoint)),
  );
}

const volts = (typed: number): Texts => ({ reference_voltage: { typed, unit: "V" } });
const amps = (typed: number): Texts => ({ run_current: { typed, unit: "A", basis: "rms" } });
const register = (typed: number): Texts => ({ current_scale: { typed, unit: null } });
const NO_CURRENT = textsWithout("run_current");

describe("the winding current from a set-point", () => {
  it("follows Vref/(gain·Rs), a peak: 0.9 V / (8 · 0.1 Ω) / √2", () => {
    const found = world({ ...NO_CURRENT, ...volts(0.9) });
    expect(found.quantity("winding_current_rms")).toBeCloseTo(1.125 / Math.SQRT2, 12);
    expect(found.finding("set-point")).toMatchObject({ level: "within", limit: null });
  });

  it("follows a transconductance stated as rms: 0.5 A/V · 1.2 V", () => {
    const found = withSetPoint(
      { ...NO_CURRENT, ...volts(1.2) },
      { method: "transconductance", gain_a_per_v: 0.5, basis: "rms" },
    );
    expect(found.quantity("winding_current_rms")).toBeCloseTo(0.6, 12);
  });

  it("follows the register step, always a peak: 0.8·(17 + 1)/32·0.325 V/(0.11 Ω + 0.02 Ω)/√2", () => {
    const found = withSetPoint({ ...NO_CURRENT, ...register(17) }, { ...SCALE, overall_scale: 0.8 });
    expect(found.quantity("winding_current_rms")).toBeCloseTo((0.8 * (18 / 32) * 2.5) / Math.SQRT2, 12);
  });

  it("takes the hold current from its own register step", () => {
    const text = {
      ...NO_CURRENT,
      ...register(17),
      hold_current: undefined,
      hold_scale: { typed: 7, unit: null },
    };
    const { hold_current: _, ...stated } = text;
    expect(withSetPoint(stated, SCALE).quantity("hold_current_rms")).toBeCloseTo(2.5 / 4 / Math.SQRT2, 12);
  });

  it("takes a hold current in per cent as a share of the run current", () => {
    expect(world().quantity("hold_current_rms")).toBeCloseTo(0.4, 12);
  });

  it("does not exist for a set-point of a driver whose method nobody knows", () => {
    const found = withSetPoint({ ...NO_CURRENT, ...volts(0.9) }, { gain: 8, sense_resistance_ohm: 0.1 });
    expect(found.finding("run-current-motor").needs).toEqual(["axes.x.driver.set_point.method"]);
  });
});

describe("a text that states a current and sets one", () => {
  it("is within where they agree to 7 %, and the stated one is used", () => {
    const found = world(texts({ ...amps(0.8), ...volts(0.9) }));
    expect(found.finding("set-point")).toMatchObject({ level: "within", limit: 0.07 });
    expect(found.quantity("winding_current_rms")).toBe(0.8);
  });

  it("is over where they differ by more than 7 %, and neither is used", () => {
    const found = world(texts({ ...amps(0.8), ...volts(1) }));
    const { level, value } = found.finding("set-point");
    expect(level).toBe("over");
    expect(value).toBeCloseTo(1 - 0.8 / (1.25 / Math.SQRT2), 12);
    expect(found.quantity("winding_current_rms")).toBeUndefined();
    expect(found.finding("run-current-motor")).toMatchObject({
      level: "cannot",
      needs: ["axes.x.run_current", "axes.x.reference_voltage"],
    });
  });

  it("is over beside a set-point of nothing", () => {
    const found = world(texts({ ...amps(0.8), ...volts(0) }));
    expect(found.finding("set-point")).toMatchObject({ level: "over", value: null, margin: null });
    expect(found.quantity("winding_current_rms")).toBeUndefined();
  });

  it("is cleared by lowering the greater of the two", () => {
    const set = world(texts({ ...amps(0.8), ...volts(1) })).finding("set-point").clearingValue!;
    expect(set).toMatchObject({ parameter: "reference_voltage", unit: "V", axis: "x" });
    expect(set.value).toBeCloseTo(0.8 * Math.SQRT2 * 0.8, 6);
    const stated = world(texts({ ...amps(1.2), ...volts(0.9) })).finding("set-point").clearingValue!;
    expect(stated.parameter).toBe("run_current");
    expect(stated.value).toBeCloseTo(1.125 / Math.SQRT2, 6);
  });

  it("clears a stated peak current in its own basis", () => {
    const text = texts({ run_current: { typed: 1.7, unit: "A", basis: "peak" }, ...volts(0.9) });
    expect(world(text).finding("set-point").clearingValue!.value).toBeCloseTo(1.125, 6);
  });
});

describe("the register step", () => {
  const at = (step: number, setPoint: SetPoint = SCALE) =>
    withSetPoint({ ...NO_CURRENT, ...register(step) }, setPoint).finding("set-point");

  it.each([
    [31, "within"],
    [16, "within"],
    [15, "near"],
    [0, "near"],
    [32, "over"],
  ] as const)("of %i in 32 is %s", (step, level) => {
    expect(at(step)).toMatchObject({ level, value: step, limit: 31 });
  });

  it("above full scale is cleared by its last step", () => {
    expect(at(40).clearingValue).toEqual({ axis: "x", parameter: "current_scale", value: 31, unit: "" });
  });

  it("that the text lacks cannot be checked", () => {
    expect(withSetPoint(EXAMPLE_TEXT, SCALE).finding("set-point")).toMatchObject({
      level: "cannot",
      needs: ["axes.x.current_scale"],
    });
  });

  it("leads, and other troubles of the set-point follow in its sentence", () => {
    const text = { ...NO_CURRENT, ...register(40), sense_resistance: { typed: 0.22, unit: "Ω" } };
    const { level, sentence, clearingValue } = withSetPoint(text, SCALE).finding("set-point");
    expect(level).toBe("over");
    expect(sentence).toContain("the register ends there");
    expect(sentence).toContain("a sense resistance of 0.22 Ω, the machine has 0.11 Ω");
    expect(clearingValue).toBeNull();
  });
});

describe("a driver recorded without a sense resistor", () => {
  const without = (text: Texts, setPoint: SetPoint = { method: "direct" }) =>
    withSetPoint(text, { ...setPoint, sense_resistance_ohm: 0 });

  it("has its torque checked, with nothing for a resistor in R, and no resistor to heat", () => {
    const found = without(texts({}));
    expect(found.has("sense-resistor")).toBe(false);
    expect(["within", "near", "over"]).toContain(found.finding("torque-margin").level);
    // By hand: 2.1 Ω at the temperature of the winding, 0.25 Ω of the bridge, and no more.
    const hot = 2.1 * ((234.5 + found.quantity("winding_c")!) / 254.5) + 0.25;
    const model = axisModel(found.input, "x");
    expect(model.ok && model.value.resistance).toBeCloseTo(hot, 12);
  });

  it("gets no current from a reference voltage, which would be divided by nothing", () => {
    const found = without(
      { ...NO_CURRENT, ...volts(0.9) },
      { method: "reference_voltage", gain: 8, basis: "peak" },
    );
    for (const ruleId of ["run-current-motor", "set-point"])
      expect(found.finding(ruleId)).toMatchObject({
        level: "cannot",
        needs: ["axes.x.driver.set_point.sense_resistance_ohm"],
        sentence: expect.stringContaining("without a sense resistor"),
      });
  });

  it("gets its current from a register step over its internal resistance alone", () => {
    const found = without({ ...NO_CURRENT, ...register(15) }, { ...SCALE, internal_resistance_ohm: 0.25 });
    // By hand: 16/32 of 0.325 V over 0.25 Ω is a peak of 0.65 A.
    expect(found.quantity("winding_current_rms")).toBeCloseTo(0.65 / Math.SQRT2, 12);
    const nothing = without({ ...NO_CURRENT, ...register(15) }, { ...SCALE, internal_resistance_ohm: 0 });
    expect(nothing.quantity("winding_current_rms")).toBeUndefined();
  });

  it("cannot be held against a resistance that the text reckons with", () => {
    const found = without(texts({ sense_resistance: { typed: 0.1, unit: "ohm" } }));
    expect(found.finding("set-point")).toMatchObject({
      level: "cannot",
      sentence: expect.stringContaining("recorded without a sense resistor"),
    });
    const agreed = without(texts({ sense_resistance: { typed: 0, unit: "ohm" }, ...volts(0.9) }), {
      method: "transconductance",
      gain_a_per_v: 1.25,
      basis: "peak",
    });
    expect(agreed.finding("set-point").level).toBe("within");
  });
});

describe("a sense resistance in the text", () => {
  const stated = (ohm: number, setPoint: SetPoint, text: Texts = EXAMPLE_TEXT) =>
    withSetPoint({ ...text, sense_resistance: { typed: ohm * 1000, unit: "mΩ", factor: 1e-3 } }, setPoint);
  const DIRECT: SetPoint = { method: "direct", sense_resistance_ohm: 0.1, sense_resistor_rating_w: 0.5 };

  it.each([
    [0.1, "within"],
    [0.101, "within"],
    [0.1011, "near"],
    [0.107, "near"],
    [0.1071, "over"],
    [0.09, "over"],
  ] as const)("of %f Ω beside the machine's 0.1 Ω is %s", (ohm, level) => {
    expect(stated(ohm, DIRECT).finding("set-point").level).toBe(level);
  });

  it("says what the winding then really carries, and is cleared by the machine's own", () => {
    const found = stated(0.12, DIRECT);
    const { sentence, clearingValue } = found.finding("set-point");
    expect(sentence).toContain("carries 0.96 A rms in place of 0.8 A rms");
    expect(clearingValue).toEqual({ axis: "x", parameter: "sense_resistance", value: 0.1, unit: "Ω" });
    expect(found.quantity("sense_resistor_power")).toBeCloseTo(2 * 0.8 ** 2 * 0.1, 12);
  });

  it("counts the internal resistance of a register-step driver: (0.15 + 0.02)/(0.11 + 0.02)", () => {
    const { value } = stated(0.15, SCALE, { ...NO_CURRENT, ...register(20) }).finding("set-point");
    expect(value).toBeCloseTo(0.17 / 0.13 - 1, 12);
  });

  it("does not stand in for the machine's own", () => {
    const { sense_resistance_ohm: _, ...unread } = SCALE;
    const found = stated(0.11, unread, { ...NO_CURRENT, ...register(20) });
    expect(found.quantity("winding_current_rms")).toBeUndefined();
    expect(found.finding("set-point").needs).toEqual(["axes.x.driver.set_point.sense_resistance_ohm"]);
  });

  it("moves no current where the driver has no sense resistor, and is near at most", () => {
    const setPoint: SetPoint = {
      method: "transconductance",
      gain_a_per_v: 0.5,
      basis: "peak",
      sense_resistance_ohm: 0.1,
    };
    expect(stated(0.2, setPoint, { ...NO_CURRENT, ...volts(1.2) }).finding("set-point")).toMatchObject({
      level: "near",
      value: 0,
    });
  });
});
