import type { Assembly } from "@/lib/domain/assembly";
import type { KeyTable } from "@/lib/domain/key-table";
import type { Policy } from "@/lib/domain/policy";
import { couplingFrequency } from "@/lib/physics/simulate/axis";
import type { MoveOutcome } from "@/lib/physics/simulate/outcome";
import { sCurveProfile, trapezoidProfile } from "@/lib/physics/simulate/profile";
import { startMove, type MoveInput, type MoveRun } from "@/lib/physics/simulate/run";
import { strongestSwing, type Swing } from "@/lib/physics/simulate/swing";
import { axisModel, type AxisModel } from "@/lib/rules/axis-model";
import { missingSentence } from "@/lib/rules/missing-words";
import { mapFiles, parseFile } from "./check";
import { currentMoments, moveMoments, type CurrentMoment, type MoveMoment } from "./move-traces";
import type { ConfigurationFile } from "./types";

export interface MoveBasis {
  readonly axis: string;
  readonly files: readonly ConfigurationFile[];
  readonly keyTable: KeyTable;
  readonly assembly: Assembly;
  readonly policy: Policy;
}

/** What a configuration says of a move of the axis; or a sentence that names what is missing for it. */
export type MoveStart =
  | {
      readonly ok: true;
      readonly model: MovedAxis;
      /** Paths of the defaults that the numbers rest on. */
      readonly assumed: readonly string[];
    }
  | { readonly ok: false; readonly reason: string };

/** m/s and m/s² (rad/s and rad/s²), both more than 0. */
export type MovedAxis = AxisModel & { readonly maxSpeed: number; readonly acceleration: number };

/** The numbers of an axis for a virtual move, from its configuration and hardware. */
export function moveStart({ axis, ...input }: MoveBasis): MoveStart {
  const { parameters } = mapFiles(input.files.map(parseFile), input);
  const found = axisModel({ parameters, assembly: input.assembly, policy: input.policy }, axis);
  if (!found.ok) return { ok: false, reason: missingSentence(found, axis) };
  const { maxSpeed, acceleration } = found.value;
  if (maxSpeed === null || acceleration === null) {
    const needs = [
      ...(maxSpeed === null ? [`axes.${axis}.max_speed`] : []),
      ...(acceleration === null ? [`axes.${axis}.acceleration`] : []),
    ];
    return { ok: false, reason: missingSentence({ ok: false, needs, reason: "" }, axis) };
  }
  if (maxSpeed <= 0 || acceleration <= 0)
    return { ok: false, reason: "Maximum speed and acceleration in the text must be more than 0." };
  return { ok: true, model: { ...found.value, maxSpeed, acceleration }, assumed: found.assumed };
}

/** What a person chooses of a virtual move; SI, m or rad. */
export interface MoveChoice {
  readonly curve: "trapezoid" | "s-curve";
  readonly distance: number;
  /** Used by the S-curve. */
  readonly jerk: number | null;
  readonly dampingRatio: number;
  /** N/m (N·m/rad at the output) between motor and load; null: one body. */
  readonly stiffness: number | null;
}

/** Detent torque of a motor whose data sheet has none, N·m; said on the page. */
const NO_DETENT = 0;

/** The simulation's input: the axis moves against its load, the worse direction; the load swings with the same damping. */
export function moveInput(model: MovedAxis, choice: MoveChoice): MoveInput {
  const limits = { distance: choice.distance, speed: model.maxSpeed, acceleration: model.acceleration };
  const { stiffness, dampingRatio } = choice;
  return {
    axis: {
      ...model,
      steadyLoad: Math.abs(model.steadyLoad),
      detentTorque: model.detentTorque ?? NO_DETENT,
      dampingRatio,
      compliance: stiffness === null ? null : { stiffness, dampingRatio },
    },
    profile:
      choice.curve === "s-curve" && choice.jerk !== null
        ? sCurveProfile({ ...limits, jerk: choice.jerk })
        : trapezoidProfile(limits),
  };
}

/** What is told of a finished virtual move. */
export interface MoveReport {
  readonly outcome: MoveOutcome;
  readonly swing: Swing | null;
  /** Hz: of the rotor with all inertia in its magnetic spring; of the load on its compliance. */
  readonly naturalFrequency: number;
  readonly couplingFrequency: number | null;
  /** Set peak current, A. */
  readonly peakCurrent: number;
  /** m/s */
  readonly peakSpeed: number;
  /** s of one integration step, and their number. */
  readonly step: number;
  readonly steps: number;
  readonly moments: readonly MoveMoment[];
  /** Currents around the largest lag; where steps were lost, around the moment of that. */
  readonly currents: readonly CurrentMoment[];
}

/** From the page to the worker that simulates, and back. */
export type MoveAnswer =
  | { readonly kind: "progress"; readonly share: number }
  | { readonly kind: "done"; readonly report: MoveReport }
  | { readonly kind: "refused"; readonly reason: string };

/** Steps between two words of progress: a few milliseconds. */
const PART = 20_000;
/** Electrical turns of the currents that are drawn. */
const TURNS_DRAWN = 6;

/** Simulates a move and tells of its progress on the way. */
export function runMove(input: MoveInput, tell: (answer: MoveAnswer) => void): void {
  const run = startMove(input);
  if (!run) {
    tell({ kind: "refused", reason: "The numbers are out of the range that can be simulated." });
    return;
  }
  while (run.advance(PART)) tell({ kind: "progress", share: run.stepsDone() / run.steps });
  const outcome = run.outcome();
  if (outcome) tell({ kind: "done", report: reportOf({ input, run, outcome }) });
}

function reportOf(finished: { input: MoveInput; run: MoveRun; outcome: MoveOutcome }): MoveReport {
  const { input, run, outcome } = finished;
  const recording = run.recording();
  const naturalFrequency = run.shaft.naturalRate / (2 * Math.PI);
  const centre = outcome.broke?.time ?? outcome.largestLag.time;
  const turn = (2 * Math.PI * input.axis.radius) / (input.axis.rotorTeeth * input.profile.peakSpeed);
  const around = (TURNS_DRAWN / 2) * turn;
  return {
    outcome,
    swing: strongestSwing({
      recording,
      frequency: naturalFrequency,
      until: outcome.broke?.time ?? outcome.time,
    }),
    naturalFrequency,
    couplingFrequency: couplingFrequency(run.shaft),
    peakCurrent: run.shaft.peakCurrent,
    peakSpeed: input.profile.peakSpeed,
    step: run.step,
    steps: run.steps,
    moments: moveMoments(recording, input.axis.radius),
    currents: currentMoments(recording, centre - around, centre + around),
  };
}
