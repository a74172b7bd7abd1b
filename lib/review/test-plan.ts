import type { Assembly } from "@/lib/domain/assembly";
import type { ParameterName } from "@/lib/domain/parameters";
import { parameterDefinition } from "@/lib/domain/parameters";
import type { Policy } from "@/lib/domain/policy";
import type { LadderPlan, LadderTest, RunPlan, Test, TestPlan, TestSetting } from "@/lib/domain/test-sheets";
import { isLadder, LADDER_PARAMETERS, TEST_WORDS } from "@/lib/domain/test-sheets";
import { formatNumber, insideUnit, showText, shownUnit } from "@/lib/domain/units";
import type { ParameterValue } from "@/lib/domain/values";
import { peakFromRms } from "@/lib/physics/current-conventions";
import { radiusPerRadian } from "@/lib/physics/drive-train";
import { trialsNeeded } from "@/lib/physics/evidence/success-run";
import { forceTorque, reflectedInertia } from "@/lib/physics/load-torque";
import { axisModel } from "@/lib/rules/axis-model";
import type { AxisView, RuleInput } from "@/lib/rules/types";
import { ruleContext } from "@/lib/rules/view";
import { expectedReadings } from "./expected-readings";
import { heatPlan } from "./heat-plan";
import { predictedBoundary, type Boundary } from "./ladder-boundary";

/** What a plan is made from: what the machine is to run, and its hardware. */
export interface PlanInput {
  readonly parameters: readonly ParameterValue[];
  readonly assembly: Assembly;
  readonly policy: Policy;
  readonly axis: string;
  readonly test: Test;
}

/** What the person decides; null leaves it to the prediction. */
export interface PlanChoices {
  /** Unit of the setting in SI. */
  readonly start: number | null;
  readonly step: number | null;
  /** Shares of 1, for a run. */
  readonly reliability: number;
  readonly confidence: number;
  /** Full steps. */
  readonly repeatability: number | null;
}

export const PLAN_DEFAULTS: PlanChoices = {
  start: null,
  step: null,
  reliability: 0.9,
  confidence: 0.95,
  repeatability: null,
};

export type Planned =
  | { readonly ok: true; readonly plan: TestPlan }
  /** Start and step have to be given, and why. */
  | { readonly ok: false; readonly why: string };

/** The plan of a test on one axis with its expected readings. Values in SI, °C, K; null where the axis is not known. */
export function planTest(input: PlanInput, choices: PlanChoices = PLAN_DEFAULTS): Planned | null {
  const view = ruleContext(input).axes.find(({ axis }) => axis.toLowerCase() === input.axis.toLowerCase());
  if (!view) return null;
  const ladder = isLadder(input.test) ? ladderPlan({ input, view, test: input.test, choices }) : null;
  if (ladder?.ok === false) return ladder;
  const plan: Omit<TestPlan, "expected"> = {
    test: input.test,
    axisKind: view.kind,
    settings: settingsOf(view, input.test),
    ladder: ladder?.plan ?? null,
    run: TEST_WORDS[input.test].kind === "run" ? runPlan(choices) : null,
    heat: input.test === "heat_record" ? heatPlan(view) : null,
    ...stepsOf(view),
    repeatability: choices.repeatability,
    falls: carriesWeight(view),
  };
  return { ok: true, plan: { ...plan, expected: expectedReadings(plan, view) } };
}

function carriesWeight({ hardware: { load } }: AxisView): boolean {
  return (load?.incline_deg ?? 0) !== 0 || (load?.gravity_torque_nm ?? 0) !== 0;
}

const AT_TEST: Readonly<Record<Test, readonly ParameterName[]>> = {
  acceleration_ladder: ["run_current", "max_speed"],
  current_ladder: ["max_speed", "acceleration"],
  corner_ladder: ["run_current", "acceleration"],
  move_run: ["run_current", "max_speed", "acceleration"],
  corner_run: ["run_current", "corner_speed", "acceleration"],
  hold_run: ["hold_current"],
  heat_record: ["run_current", "hold_current"],
};

function settingsOf(view: AxisView, test: Test): TestSetting[] {
  return AT_TEST[test].flatMap((parameter) => {
    const found = view.parameter(parameter);
    return found ? [{ parameter, value: found.value, unit: found.unit, basis: found.basis }] : [];
  });
}

function runPlan({ reliability, confidence }: PlanChoices): RunPlan {
  return { reliability, confidence, trials: trialsNeeded({ reliability, confidence }) ?? 1 };
}

/** Travel of a full step, and the full steps of one belt tooth. */
function stepsOf({ hardware: { motor, drive_train } }: AxisView): Pick<TestPlan, "fullStep" | "toothSteps"> {
  const angle = motor?.step_angle_deg;
  const radius = drive_train ? radiusPerRadian(drive_train) : null;
  const fullStep = angle && radius ? (radius * angle * Math.PI) / 180 : null;
  const pitch = drive_train?.kind === "belt" ? drive_train.pitch_mm : undefined;
  return { fullStep, toothSteps: fullStep !== null && pitch ? (pitch * 1e-3) / fullStep : null };
}

interface LadderAsked {
  readonly input: RuleInput;
  readonly view: AxisView;
  readonly test: LadderTest;
  readonly choices: PlanChoices;
}

type PlannedLadder = { readonly ok: true; readonly plan: LadderPlan } | Refused;

interface Refused {
  readonly ok: false;
  readonly why: string;
}

function ladderPlan(asked: LadderAsked): PlannedLadder {
  const { view, test, choices } = asked;
  const { parameter, fails } = LADDER_PARAMETERS[test];
  const boundary = predictedBoundary(view, test);
  const set = view.parameter(parameter);
  const unit = set?.unit ?? insideUnit(parameterDefinition(parameter).dimension, view.kind);
  const levels = levelsOf({ boundary, choices, unit });
  if (!levels.ok) return levels;
  const { start, step } = levels;
  const why = [levels.why, ...farFromSetting(start, set)].join(" ");
  const plan: LadderPlan = {
    parameter,
    fails,
    unit,
    basis: set?.basis ?? null,
    set: set?.value ?? null,
    start,
    step,
    why,
    predicted: boundary.ok ? { careful: boundary.careful, farthest: boundary.farthest } : null,
    margin: wantedMargin(view, test, start),
    load: test === "acceleration_ladder" ? loadAtMotor(asked) : null,
    most: test === "current_ladder" ? ratedCurrent(asked, set?.basis ?? null) : null,
  };
  return { ok: true, plan };
}

/**
 * The step as a share of the predicted level: about the scatter of a threshold from trial to trial, at which an
 * up-and-down ladder is shortest. Common practice, no source.
 */
const STEP_SHARE = 0.06;

/** From here on nobody starts without having gone there by hand. Common practice, no source. */
const FAR = 2;

function farFromSetting(start: number, set: ParameterValue | undefined): string[] {
  if (!set || set.value <= 0) return [];
  const times = Math.max(start / set.value, set.value / start);
  if (times < FAR) return [];
  return [
    `The start is ${formatNumber(times, 2)} times away from the ${showText(set.value, set.unit)} in the text: go there by hand in several steps before the first trial, and stop where the machine itself must not go further.`,
  ];
}

interface LevelsAsked {
  readonly boundary: Boundary;
  readonly choices: PlanChoices;
  readonly unit: string;
}

type Levels =
  { readonly ok: true; readonly start: number; readonly step: number; readonly why: string } | Refused;

function levelsOf({ boundary, choices: { start, step }, unit }: LevelsAsked): Levels {
  if (start !== null && step !== null) {
    const why = boundary.ok ? "Start and step were chosen by hand." : handWords(boundary.why);
    return { ok: true, start, step, why };
  }
  if (!boundary.ok) return { ok: false, why: boundary.why };
  const { factor } = shownUnit(unit);
  const own = step ?? roundStep(STEP_SHARE * boundary.careful * factor) / factor;
  const first = start ?? Math.max(1, Math.round(boundary.careful / own)) * own;
  const words = "The start is the predicted boundary, the step about a twentieth of it.";
  const byHand = start === null && step === null ? "" : " One of them was changed by hand.";
  return { ok: true, start: first, step: own, why: `${words}${byHand}` };
}

function handWords(why: string): string {
  return `Start and step were chosen by hand, since no boundary can be predicted. ${why}`;
}

/** The largest of 1, 2 and 5 times a power of ten that is not above a value. */
function roundStep(value: number): number {
  const decade = 10 ** Math.floor(Math.log10(value));
  return [5, 2, 1].map((digit) => digit * decade).find((one) => one <= value * (1 + 1e-9)) ?? decade;
}

/** The policy's margin where the test runs: more above the voltage-limit speed. */
function wantedMargin(view: AxisView, test: LadderTest, start: number): number {
  const { policy } = view;
  const at = view.withValue(LADDER_PARAMETERS[test].parameter, start);
  const [peak, limit] = [at.quantity("peak_speed"), at.quantity("voltage_limit_speed")];
  const above = peak.ok && limit.ok && peak.value > limit.value;
  return above ? policy.torque_margin_above_limit_speed : policy.torque_margin_below_limit_speed;
}

function loadAtMotor({ input, view }: LadderAsked): LadderPlan["load"] {
  const model = axisModel(input, view.axis);
  if (!model.ok) return null;
  const { friction, steadyLoad, motorCount, radius, efficiency, motorInertia, movingInertia } = model.value;
  const force = (friction + Math.abs(steadyLoad)) / motorCount;
  return {
    torque: forceTorque({ force, radius, efficiency }),
    inertia: motorInertia + reflectedInertia(movingInertia, radius) / (motorCount * efficiency),
    radius,
  };
}

function ratedCurrent({ input, view }: LadderAsked, basis: ParameterValue["basis"]): number | null {
  const model = axisModel(input, view.axis);
  if (!model.ok || basis === null) return null;
  return basis === "peak" ? peakFromRms(model.value.ratedCurrent) : model.value.ratedCurrent;
}
