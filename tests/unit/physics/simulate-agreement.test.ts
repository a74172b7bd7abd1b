import { describe, expect, it } from "vitest";
import { shaftModel, type SimulatedAxis } from "@/lib/physics/simulate/axis";
import { sCurveProfile, trapezoidProfile, type MoveProfile } from "@/lib/physics/simulate/profile";
import { simulateMove } from "@/lib/physics/simulate/run";
import { chosenStep } from "@/lib/physics/simulate/step-size";
import { stretchesOf } from "@/lib/physics/simulate/stretches";
import { cutSegments, referenceMove } from "../../support/reference-move";
import { CARRIAGE, generatedMove, ownStates, seeded, type GeneratedMove } from "../../support/simulated-axes";

/** Of the independent integrator, odex (Gragg-Bulirsch-Stoer extrapolation after Hairer and Wanner). */
const TOLERANCE = 1e-8;
const SETTLE = 0.01;

/** Largest difference of the states, each over its scale: peak current, a full step, the highest speed. */
function deviation(axis: SimulatedAxis, profile: MoveProfile): number {
  const segments = cutSegments(profile, 4);
  const shaft = shaftModel(axis);
  const highest = profile.peakSpeed / axis.radius;
  const { start, states } = ownStates({ axis, segments, size: chosenStep(shaft, highest) });
  const reference = referenceMove({ axis, segments, start, tolerance: TOLERANCE });
  const fullStep = Math.PI / (2 * axis.rotorTeeth);
  const scales = [shaft.peakCurrent, shaft.peakCurrent, fullStep, highest, fullStep, highest];
  const differences = states.flatMap((state, index) =>
    state.map((value, place) => Math.abs(value - reference.states[index]![place]!) / scales[place]!),
  );
  return Math.max(...differences);
}

const LIMITS = { distance: 0.05, speed: 0.4, acceleration: 8 };
const SMOOTH: readonly [string, SimulatedAxis, MoveProfile][] = [
  ["a trapezoid far below the supply's limit", { ...CARRIAGE, supplyVoltage: 200 }, trapezoidProfile(LIMITS)],
  ["an S-curve", { ...CARRIAGE, supplyVoltage: 200 }, sCurveProfile({ ...LIMITS, jerk: 300 })],
  ["a slow move at 24 V", CARRIAGE, trapezoidProfile({ ...LIMITS, distance: 0.01, speed: 0.15 })],
  [
    "a stiff belt",
    { ...CARRIAGE, supplyVoltage: 200, compliance: { stiffness: 2e5, dampingRatio: 0.05 } },
    trapezoidProfile(LIMITS),
  ],
  [
    "a soft belt",
    { ...CARRIAGE, supplyVoltage: 200, compliance: { stiffness: 1e4, dampingRatio: 0.02 } },
    sCurveProfile({ ...LIMITS, jerk: 300 }),
  ],
  [
    "a light rotor at high speed",
    { ...CARRIAGE, supplyVoltage: 200, movingInertia: 0.02, friction: 1 },
    trapezoidProfile({ distance: 0.08, speed: 1.2, acceleration: 40 }),
  ],
];

describe("the integration beside an independent integrator", () => {
  for (const [name, axis, profile] of SMOOTH)
    it(`agrees within 0.1 % on ${name}`, () => {
      expect(deviation(axis, profile)).toBeLessThan(1e-3);
    });

  it("agrees within 0.1 % where the supply clips the voltage", () => {
    expect(deviation(CARRIAGE, trapezoidProfile({ ...LIMITS, speed: 0.5 }))).toBeLessThan(1e-3);
  });
});

const CASES = 200;

function ownVerdict({ axis, profileAt }: GeneratedMove, share: number): "kept" | "lost" {
  const result = simulateMove({ axis, profile: profileAt(share), settle: SETTLE });
  if (!result) throw new Error("The generated numbers are out of range.");
  return result.outcome.verdict;
}

function referenceVerdict({ axis, profileAt }: GeneratedMove): "kept" | "lost" {
  const profile = profileAt(1);
  const size = chosenStep(shaftModel(axis), profile.peakSpeed / axis.radius);
  const segments = stretchesOf({ profile, settle: SETTLE, size }).map(({ segment }) => segment);
  const { start } = ownStates({ axis, segments: [], size });
  const { slipped, states } = referenceMove({ axis, segments, start, tolerance: TOLERANCE });
  if (slipped) return "lost";
  const lag = axis.rotorTeeth * (profile.distance / axis.radius - states.at(-1)![2]!);
  return Math.abs(lag) > Math.PI ? "lost" : "kept";
}

describe("the verdict on lost steps", () => {
  it("is the independent integrator's in every generated case more than 2 % of acceleration from a change of verdict", () => {
    const chance = seeded(20_261);
    const verdicts: string[] = [];
    const nearer: string[] = [];
    const differing: string[] = [];
    while (verdicts.length < CASES) {
      const move = generatedMove(chance);
      const verdict = ownVerdict(move, 1);
      const near = ownVerdict(move, 0.98) !== verdict || ownVerdict(move, 1.02) !== verdict;
      const reference = referenceVerdict(move);
      if (near) nearer.push(`${move.words}: ${verdict}, by the other integrator ${reference}`);
      else verdicts.push(verdict);
      if (!near && verdict !== reference) differing.push(`${move.words}: ${verdict}, not ${reference}`);
    }
    const kept = verdicts.filter((verdict) => verdict === "kept").length;
    console.log([`${CASES} cases, ${kept} kept; nearer than 2 %: ${nearer.length}`, ...nearer].join("\n  "));
    expect(differing).toEqual([]);
    expect(Math.min(kept, CASES - kept)).toBeGreaterThan(CASES / 4);
  }, 180_000);
});
