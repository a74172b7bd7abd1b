import { z } from "zod";
import { parameterNameSchema } from "./parameters";

/** What a test sheet can test on an axis. */
export const TESTS = [
  "acceleration_ladder",
  "current_ladder",
  "corner_ladder",
  "move_run",
  "corner_run",
  "hold_run",
  "heat_record",
] as const;
export const testSchema = z.enum(TESTS);
export type Test = z.infer<typeof testSchema>;

/** `ladder`: levels up and down to the failing one; `run`: trials at one setting; `heat`: temperatures over time. */
export type TestKind = "ladder" | "run" | "heat";

interface TestWords {
  readonly kind: TestKind;
  readonly title: string;
  /** One trial, as the technician does it. */
  readonly trial: string;
}

export const TEST_WORDS: Readonly<Record<Test, TestWords>> = {
  acceleration_ladder: {
    kind: "ladder",
    title: "Acceleration ladder",
    trial:
      "Set the acceleration to the level. Run the reference. Move out and back over the whole travel at the set speed, then return to the reference and read how far the axis stands off.",
  },
  current_ladder: {
    kind: "ladder",
    title: "Run current ladder",
    trial:
      "Set the run current to the level. Run the reference. Move out and back over the whole travel at the set speed and acceleration, then return to the reference and read how far the axis stands off.",
  },
  corner_ladder: {
    kind: "ladder",
    title: "Corner speed ladder",
    trial:
      "Set the corner speed to the level. Run the reference. Run a path with twenty sharp corners on this axis, then return to the reference and read how far the axis stands off.",
  },
  move_run: {
    kind: "run",
    title: "Moves at the setting",
    trial:
      "Run the reference. Move out and back over the whole travel at the set speed and acceleration, then return to the reference and read how far the axis stands off.",
  },
  corner_run: {
    kind: "run",
    title: "Corners at the setting",
    trial:
      "Run the reference. Run a path with twenty sharp corners on this axis at the set corner speed, then return to the reference and read how far the axis stands off.",
  },
  hold_run: {
    kind: "run",
    title: "Holding at standstill",
    trial:
      "Run the reference, go to mid-travel and stand still under load with the holding current for one minute. Return to the reference and read how far the axis stands off.",
  },
  heat_record: {
    kind: "heat",
    title: "Heat record",
    trial:
      "Let the axis stand at its run current, or run its duty, and note the temperatures at the start, after 30 min, and until they rise by less than 1 K in 30 min.",
  },
};

/** Setting that a ladder steps through. */
export const LADDER_PARAMETERS = {
  acceleration_ladder: { parameter: "acceleration", fails: "above" },
  current_ladder: { parameter: "run_current", fails: "below" },
  corner_ladder: { parameter: "corner_speed", fails: "above" },
} as const;
export type LadderTest = keyof typeof LADDER_PARAMETERS;

export function isLadder(test: Test): test is LadderTest {
  return test in LADDER_PARAMETERS;
}

const settingSchema = z.object({
  parameter: parameterNameSchema,
  value: z.number(),
  unit: z.string(),
  basis: z.enum(["peak", "rms"]).nullable(),
});
export type TestSetting = z.infer<typeof settingSchema>;

export const HEAT_PLACES = ["case", "winding", "driver", "mount"] as const;
export type HeatPlace = (typeof HEAT_PLACES)[number];
export const HEAT_PLACE_WORDS: Readonly<Record<HeatPlace, string>> = {
  case: "motor case",
  winding: "winding",
  driver: "driver",
  mount: "mount",
};

const ladderPlanSchema = z.object({
  parameter: parameterNameSchema,
  unit: z.string(),
  basis: z.enum(["peak", "rms"]).nullable(),
  start: z.number().positive(),
  step: z.number().positive(),
  fails: z.enum(["above", "below"]),
  /** What the text sets; null where it does not state it. */
  set: z.number().nullable(),
  /** Level at which the torque is just enough by the careful formula, and by the true pull-out at most. */
  predicted: z.object({ careful: z.number(), farthest: z.number().nullable() }).nullable(),
  /** Where start and step come from. */
  why: z.string(),
  /** Torque margin that the policy wants, share of 1. */
  margin: z.number(),
  /** Load at each motor, N·m, kg·m² and m (rad) per rad; null where it is not known. */
  load: z.object({ torque: z.number(), inertia: z.number(), radius: z.number() }).nullable(),
  /** The largest value that may be recommended (the rated current); null without one. */
  most: z.number().nullable(),
});
export type LadderPlan = z.infer<typeof ladderPlanSchema>;

const runPlanSchema = z.object({
  trials: z.number().int().positive(),
  /** Shares of 1. */
  reliability: z.number(),
  confidence: z.number(),
});
export type RunPlan = z.infer<typeof runPlanSchema>;

const heatPlanSchema = z.object({
  /** Rises above ambient, K; `after30` null where the time constant is not known. */
  expected: z.array(
    z.object({
      place: z.enum(HEAT_PLACES),
      settledRise: z.number(),
      riseAfter30: z.number().nullable(),
      tolerance: z.number(),
    }),
  ),
  /** °C at which the prediction was made. */
  ambientC: z.number().nullable(),
});
export type HeatPlan = z.infer<typeof heatPlanSchema>;

/** A test sheet's plan as it was made and printed; nothing changes it afterwards. Values in SI, °C, K. */
export const testPlanSchema = z.object({
  test: testSchema,
  axisKind: z.enum(["linear", "rotary"]),
  settings: z.array(settingSchema),
  ladder: ladderPlanSchema.nullable(),
  run: runPlanSchema.nullable(),
  heat: heatPlanSchema.nullable(),
  /** The expected readings with their tolerance, in sentences. */
  expected: z.array(z.string()),
  /** Travel of one full step, m (rad); null where it is not known. */
  fullStep: z.number().nullable(),
  /** Full steps of one belt tooth. */
  toothSteps: z.number().nullable(),
  /** What the reference repeats to, full steps; null where nobody has measured it. */
  repeatability: z.number().nullable(),
  /** A raised load falls when the holding current is cut. */
  falls: z.boolean(),
});
export type TestPlan = z.infer<typeof testPlanSchema>;

export const DEVIATION_UNITS = ["full steps", "mm", "deg"] as const;

export const trialTemperatureSchema = z.object({
  place: z.enum(HEAT_PLACES),
  celsius: z.number().min(-60, "At least −60 °C.").max(400, "At most 400 °C."),
  /** How it was measured. */
  by: z.enum(["sensor", "resistance"]),
});
export type TrialTemperature = z.infer<typeof trialTemperatureSchema>;

/** One trial or reading of a test sheet, as the page makes it; its id is made there, so that it is stored once. */
export const trialSchema = z.object({
  id: z.uuid(),
  /** Rung of a ladder; null on other sheets. */
  rung: z.number().int().min(-10_000).max(10_000).nullable(),
  /** Null: a reading of temperatures without a trial. */
  result: z.enum(["pass", "fail"]).nullable(),
  /** How far the axis stood off after the reference run, as typed. */
  deviation: z.object({ value: z.number().min(-1e6).max(1e6), unit: z.enum(DEVIATION_UNITS) }).nullable(),
  temperatures: z.array(trialTemperatureSchema).max(8),
  ambientC: z.number().min(-60).max(100).nullable(),
  /** Minutes since the current was switched on; heat records. */
  minutes: z.number().min(0).max(10_000).nullable(),
  note: z.string().trim().max(500),
  /** By the clock of the device that it was entered on. */
  doneAt: z.iso.datetime({ offset: true }),
});
export type Trial = z.infer<typeof trialSchema>;

/** A deviation in full steps; null where the travel of a full step is not known. */
export function inFullSteps(
  { value, unit }: NonNullable<Trial["deviation"]>,
  fullStep: number | null,
): number | null {
  if (unit === "full steps") return value;
  if (fullStep === null) return null;
  return (unit === "mm" ? value * 1e-3 : (value * Math.PI) / 180) / fullStep;
}

/** TS-0042 */
export function sheetLabel(number: number): string {
  return `TS-${String(number).padStart(4, "0")}`;
}
