import { spawnSync } from "node:child_process";
import { mkdtempSync, rmSync } from "node:fs";
import { tmpdir } from "node:os";
import path from "node:path";
import { shaftModel, type SimulatedAxis } from "@/lib/physics/simulate/axis";
import * as m from "@/lib/physics/simulate/integrate";
import { enterStretch, memoryOf } from "@/lib/physics/simulate/memory";
import type { ProfileSegment } from "@/lib/physics/simulate/profile";
import { referenceMove } from "../support/reference-move";
import { CARRIAGE } from "../support/simulated-axes";

/** One second of move at 20 µs. */
const SECOND: ProfileSegment = { start: 0, duration: 1, position: 0, speed: 0, acceleration: 0.4, jerk: 0 };
const STEPS = 50_000;
/** Steps in one call, as the product does them. */
const PART = 500;
const ROUNDS = 6;
const RUNS = 5;

/** Start and end of what both loops read, in the order of C's `struct axis`. */
const FIRST = m.TEETH;
const LAST = m.COUPLING_DAMPING;

const AXES: readonly [string, SimulatedAxis][] = [
  ["one body", { ...CARRIAGE, steadyLoad: 0 }],
  ["belt", { ...CARRIAGE, steadyLoad: 0, compliance: { stiffness: 1e5, dampingRatio: 0.05 } }],
];

function ready(axis: SimulatedAxis): Float64Array {
  const memory = memoryOf(shaftModel(axis));
  enterStretch(memory, { segment: SECOND, steps: STEPS, step: SECOND.duration / STEPS }, axis.radius);
  memory[m.CURRENT_A] = m.at(memory, m.PEAK_CURRENT);
  memory[m.SAMPLE_IN] = Infinity;
  return memory;
}

/** ns a step of the fastest of some runs, and the state at the end. */
interface Measured {
  readonly perStep: number;
  readonly state: readonly number[];
}

function ownLoop(axis: SimulatedAxis): Measured {
  const none = new Float32Array(0);
  let perStep = Infinity;
  let memory = ready(axis);
  for (let run = 0; run < RUNS; run += 1) {
    memory = ready(axis);
    const start = performance.now();
    for (let done = 0; done < STEPS; done += PART) m.integrate(memory, PART, none);
    perStep = Math.min(perStep, ((performance.now() - start) * 1e6) / STEPS);
  }
  return { perStep, state: [...memory.slice(m.CURRENT_A, m.SPEED + 1)] };
}

function loopInC(program: string, axis: SimulatedAxis): Measured {
  const memory = ready(axis);
  const constants = [...memory.slice(FIRST, LAST + 1)];
  constants[m.FRICTION_SPEED - FIRST] = m.at(memory, m.FRICTION_SPEED) ** 2;
  const command = [m.FROM_SPEED, m.FROM_ACCELERATION, m.FROM_JERK, m.STEP].map((place) =>
    m.at(memory, place),
  );
  const words = [RUNS, STEPS, ...constants, ...command].map(String);
  const { stdout, status } = spawnSync(program, words, { encoding: "utf8" });
  if (status !== 0) throw new Error("The loop in C did not run.");
  const [perStep = NaN, ...state] = stdout.trim().split(" ").map(Number);
  return { perStep, state: state.slice(0, m.SPEED + 1) };
}

/** Fastest of several rounds in which both take turns, so that a busy machine slows both alike. */
function inTurns(works: readonly (() => Measured)[]): Measured[] {
  const rounds = Array.from({ length: ROUNDS }, () => works.map((work) => work()));
  return works.map((_, index) => {
    const results = rounds.map((round) => round[index]!);
    return { ...results[0]!, perStep: Math.min(...results.map(({ perStep }) => perStep)) };
  });
}

/** Compiles the loop in C; null where there is no compiler. */
function compiled(folder: string, flags: readonly string[]): string | null {
  const program = path.join(folder, `move${flags.join("")}`);
  const { status } = spawnSync("cc", ["-O2", ...flags, "-o", program, "tests/bench/move.c", "-lm"]);
  return status === 0 ? program : null;
}

function compared(folder: string, [name, axis]: readonly [string, SimulatedAxis]): string[] {
  const same = compiled(folder, []);
  const library = compiled(folder, ["-DLIBRARY_SINE"]);
  if (same === null || library === null)
    return [`  ${name}: ${ownLoop(axis).perStep.toFixed(0)} ns a step; no C compiler here to compare with`];
  const [own, inC, withLibrary] = inTurns([
    () => ownLoop(axis),
    () => loopInC(same, axis),
    () => loopInC(library, axis),
  ]) as [Measured, Measured, Measured];
  const apart = Math.max(...own.state.map((value, index) => Math.abs(value - inC.state[index]!)));
  if (!(apart < 1e-6)) throw new Error(`The loop in C ends elsewhere, by ${apart}.`);
  return [
    `  ${name}: ${own.perStep.toFixed(0)} ns a step; in C at -O2 ${inC.perStep.toFixed(0)} ns, with the library's sine ${withLibrary.perStep.toFixed(0)} ns`,
    `    ratio ${(own.perStep / inC.perStep).toFixed(2)} to the same loop in C (at most 1.5), ${(own.perStep / withLibrary.perStep).toFixed(2)} to C with the library's sine; states apart by ${apart.toExponential(0)}`,
  ];
}

function odexTime(axis: SimulatedAxis): { readonly ms: number; readonly evaluations: number } {
  const start = performance.now();
  const { evaluations } = referenceMove({
    axis,
    segments: [SECOND],
    start: [shaftModel(axis).peakCurrent, 0, 0, 0],
    tolerance: 1e-8,
  });
  return { ms: performance.now() - start, evaluations };
}

/** One second of virtual move at 20 µs steps, beside the same loop in C and beside odex at a tolerance of 1e-8. */
export function runMoveBench(): string[] {
  const folder = mkdtempSync(path.join(tmpdir(), "keepstep-move-"));
  try {
    const lines = AXES.flatMap((axis) => compared(folder, axis));
    const [, axis] = AXES[0]!;
    const own = (ownLoop(axis).perStep * STEPS) / 1e6;
    const { ms, evaluations } = odexTime(axis);
    return [
      `1 s of virtual move at 20 µs, fastest of ${ROUNDS * RUNS} runs`,
      ...lines,
      `    odex at 1e-8: ${ms.toFixed(0)} ms and ${evaluations} evaluations for what takes ${own.toFixed(1)} ms here, ratio ${(ms / own).toFixed(0)}`,
    ];
  } finally {
    rmSync(folder, { recursive: true });
  }
}
