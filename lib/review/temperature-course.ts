import type { Level } from "@/lib/domain/levels";
import { temperatureAfter } from "@/lib/physics/evidence/heating";
import { windingSteadyState } from "@/lib/physics/motor-heat";
import { dutyCurrent, timeToReach } from "@/lib/physics/thermal-course";
import { axisPath, gather, given, hardware, missing, motorAmbient } from "@/lib/rules/data";
import { DRIVER_JUNCTION } from "@/lib/rules/driver-junction";
import { missingSentence } from "@/lib/rules/missing-words";
import { MOUNT_TEMPERATURE } from "@/lib/rules/mount-temperature";
import type { AxisView, Datum, Missing, Rule, RuleContext } from "@/lib/rules/types";
import { WINDING_TEMPERATURE } from "@/lib/rules/winding-temperature";
import { axisOf } from "./operating-map";
import type { NoSide } from "./operating-map";
import { roundUp } from "./plot-range";

/** What a motor is asked over hours. */
export interface DutyCycle {
  /** Share of the time moving at run current, 0 to 1; the rest it stands on hold current. */
  readonly share: number;
  /** s that the picture shows; null for five time constants. */
  readonly span: number | null;
}

export const CONTINUOUS: DutyCycle = { share: 1, span: null };

export type HeatedPart = "winding" | "case" | "junction";

/** One part that warms. Temperatures in °C. */
export interface HeatedCourse {
  readonly part: HeatedPart;
  /** One for each time; empty where only the settled value is known. */
  readonly temperatures: readonly number[];
  readonly settled: number | null;
  /** Where the check says over limit; null where it has none or does not know it. */
  readonly limit: number | null;
  /** s until the limit is passed; null where it never is, or where the course is not known. */
  readonly passesLimit: number | null;
  readonly level: Level;
  /** Why there is no value, no course or no limit; empty where all is known. */
  readonly note: string;
}

export interface HeatSide {
  readonly ok: true;
  /** Air around the motor, °C: the motor starts as cold as that. */
  readonly ambient: number;
  /** Current that heats as much as the cycle does, A rms. */
  readonly current: number;
  readonly parts: readonly HeatedCourse[];
}

/** Temperatures of one axis over time. */
export interface TemperatureCourse {
  readonly axis: string;
  /** s, rising from 0. */
  readonly times: readonly number[];
  readonly timeEnd: number;
  /** °C */
  readonly low: number;
  readonly high: number;
  /** s; null where the motor's is not known, and nothing is drawn over time. */
  readonly timeConstant: number | null;
  readonly was: HeatSide | NoSide | null;
  readonly toBe: HeatSide | NoSide;
}

const PLACES = 120;
/** s that are shown where the time constant is not known. */
const HOUR = 3600;

interface Asked {
  readonly duty: DutyCycle;
  readonly times: readonly number[];
  readonly timeConstant: number | null;
}

/** Temperatures of winding, case and driver junction of an axis from a cold start, with the side before where there is one. */
export function temperatureCourse(input: {
  readonly axis: string;
  readonly was: RuleContext | null;
  readonly toBe: RuleContext;
  readonly duty: DutyCycle;
}): TemperatureCourse {
  const { axis, was, toBe, duty } = input;
  const view = axisOf(toBe, axis);
  const timeConstant = view?.hardware.motor?.thermal_time_constant_s ?? null;
  const timeEnd = duty.span ?? (timeConstant === null ? HOUR : 5 * timeConstant);
  const times = Array.from({ length: PLACES + 1 }, (_, index) => (timeEnd * index) / PLACES);
  const asked = { duty, times, timeConstant };
  const sides = { was: was && sideIn(was, axis, asked), toBe: sideIn(toBe, axis, asked) };
  return { axis: view?.axis ?? axis, times, timeEnd, timeConstant, ...range(sides), ...sides };
}

function sideIn(context: RuleContext, axis: string, asked: Asked): HeatSide | NoSide {
  const view = axisOf(context, axis);
  if (!view) return { ok: false, sentence: `Nothing is known of the hardware of axis ${axis}.` };
  const heating = gather({ current: cycleCurrent(view, asked.duty.share), ambient: motorAmbient(view) });
  if (!heating.ok) return { ok: false, sentence: missingSentence(heating, view.axis) };
  const { current, ambient } = heating.values;
  const motor = { context, view, asked, current, ambient };
  return {
    ok: true,
    ambient,
    current,
    parts: [motorPart({ ...motor, part: "winding" }), motorPart({ ...motor, part: "case" }), junction(motor)],
  };
}

/** A rms; the hold current matters only where the axis stands at all. */
function cycleCurrent(view: AxisView, share: number): Datum {
  const runCurrent = view.quantity("winding_current_rms");
  if (share >= 1) return runCurrent;
  const parts = gather({ runCurrent, holdCurrent: view.quantity("hold_current_rms") });
  return parts.ok ? given(dutyCurrent({ ...parts.values, share }), parts.assumed) : parts;
}

interface Heated {
  readonly context: RuleContext;
  readonly view: AxisView;
  readonly asked: Asked;
  readonly current: number;
  readonly ambient: number;
}

function motorPart(heated: Heated & { readonly part: "winding" | "case" }): HeatedCourse {
  const { part, asked, ambient, view } = heated;
  const settled = settledOf(heated);
  const limit = limitOf(heated, part === "winding" ? WINDING_TEMPERATURE : MOUNT_TEMPERATURE);
  if (!settled.ok)
    return {
      ...unknown(part, limit),
      level: settled.runaway === true ? "over" : "cannot",
      note: wordsOf(settled, view),
    };
  const { timeConstant, times } = asked;
  const course = (constant: number) => ({ start: ambient, settled: settled.value, timeConstant: constant });
  return {
    part,
    settled: settled.value,
    limit: limit.value,
    level: levelOf(settled.value, limit),
    temperatures:
      timeConstant === null ? [] : times.map((time) => temperatureAfter({ ...course(timeConstant), time })),
    passesLimit:
      timeConstant === null || limit.value === null
        ? null
        : timeToReach({ ...course(timeConstant), temperature: limit.value }),
    note: [
      timeConstant === null ? wordsOf(missing(axisPath(view, "motor.thermal_time_constant_s")), view) : "",
      limit.note,
    ]
      .filter((words) => words !== "")
      .join(" "),
  };
}

/** Settled temperature of winding or case at the cycle's current, °C. */
function settledOf({ view, part, current, ambient }: Heated & { readonly part: "winding" | "case" }): Datum {
  const thermal = gather({
    resistanceAt20: hardware(view, "motor", "resistance_ohm"),
    thermalResistance: hardware(view, "motor", "winding_to_ambient_k_per_w"),
    ...(part === "case" ? { ofCase: hardware(view, "motor", "case_to_ambient_k_per_w") } : {}),
  });
  if (!thermal.ok) return thermal;
  const winding = windingSteadyState({ ...thermal.values, current, ambient });
  if (!winding) return RUNAWAY;
  const { ofCase } = thermal.values;
  return given(ofCase === undefined ? winding.temperature : ambient + ofCase * winding.power);
}

const RUNAWAY: Missing = {
  ok: false,
  needs: [],
  reason: "It never settles: the loss of the copper grows faster with temperature than the heat leaves.",
  runaway: true,
};

/** The driver's own time constant is in no catalog: it follows within a minute or so, and its settled value is the line. */
function junction(heated: Heated): HeatedCourse {
  const { view } = heated;
  const settled = view.quantity("driver_junction_c");
  const limit = limitOf(heated, DRIVER_JUNCTION);
  if (!settled.ok)
    return {
      ...unknown("junction", limit),
      level: settled.runaway === true ? "over" : "cannot",
      note: wordsOf(settled, view),
    };
  return {
    part: "junction",
    temperatures: [],
    settled: settled.value,
    limit: limit.value,
    passesLimit: null,
    level: levelOf(settled.value, limit),
    note: [FAST_DRIVER, limit.note].filter((words) => words !== "").join(" "),
  };
}

const FAST_DRIVER =
  "The driver's time constant is not known: the line is its settled temperature while the axis moves at run current.";

interface Limit {
  readonly value: number | null;
  readonly near: number | null;
  readonly note: string;
}

function limitOf({ context, view }: Heated, rule: Rule): Limit {
  const [verdict] = rule.judge({ ...context, axes: [view] });
  if (!verdict) return { value: null, near: null, note: "" };
  const { assessment } = verdict;
  if (!assessment.ok) return { value: null, near: null, note: wordsOf(assessment, view) };
  return { value: assessment.limit, near: assessment.nearLimit, note: "" };
}

function levelOf(settled: number, { value, near }: Limit): Level {
  if (value === null) return "cannot";
  if (settled > value) return "over";
  return near !== null && settled > near ? "near" : "within";
}

function unknown(part: HeatedPart, limit: Limit): Omit<HeatedCourse, "level" | "note"> {
  return { part, temperatures: [], settled: null, limit: limit.value, passesLimit: null };
}

function wordsOf(lack: Missing, view: AxisView): string {
  return missingSentence(lack, view.axis);
}

function range(sides: {
  readonly was: HeatSide | NoSide | null;
  readonly toBe: HeatSide | NoSide;
}): Pick<TemperatureCourse, "low" | "high"> {
  const known = [sides.was, sides.toBe].flatMap((side) => (side?.ok ? [side] : []));
  const values = known.flatMap(({ parts }) =>
    parts.flatMap(({ settled, limit }) => [settled ?? 0, limit ?? 0]),
  );
  const low = Math.min(0, ...known.map(({ ambient }) => ambient));
  return { low: Math.floor(low / 10) * 10, high: roundUp(1.08 * Math.min(400, Math.max(50, ...values))) };
}
