import { conservativePullOut, voltageConstant, voltageLimitSpeed } from "@/lib/physics/pull-out";
import { shaftModel, type SimulatedAxis } from "@/lib/physics/simulate/axis";
import { integrate } from "@/lib/physics/simulate/integrate";
import { enterStretch, memoryOf, putAtRest } from "@/lib/physics/simulate/memory";
import {
  sCurveProfile,
  trapezoidProfile,
  type MoveProfile,
  type ProfileSegment,
} from "@/lib/physics/simulate/profile";

/** A carriage on a belt: a frame-17 motor, 24 V, 0.6 kg; invented. */
export const CARRIAGE: SimulatedAxis = {
  supplyVoltage: 24,
  resistance: 2.6,
  inductance: 3e-3,
  holdingTorque: 0.45,
  ratedCurrent: 1.5,
  runCurrent: 1,
  rotorTeeth: 50,
  motorInertia: 5.4e-6,
  motorCount: 1,
  radius: 6.366e-3,
  movingInertia: 0.6,
  efficiency: 0.9,
  friction: 4,
  steadyLoad: 3,
  detentTorque: 0.012,
  dampingRatio: 0.1,
  compliance: null,
};

/** States at the end of each segment, and the state at rest that they start from, with steps of at most `size` seconds. */
export function ownStates(input: {
  readonly axis: SimulatedAxis;
  readonly segments: readonly ProfileSegment[];
  readonly size: number;
}): { readonly start: number[]; readonly states: number[][] } {
  const { axis, segments, size } = input;
  const shaft = shaftModel(axis);
  const memory = memoryOf(shaft);
  const length = axis.compliance ? 6 : 4;
  putAtRest(memory, shaft);
  const start = [...memory.slice(0, length)];
  const states = segments.map((segment) => {
    const steps = Math.ceil(segment.duration / size);
    enterStretch(memory, { segment, steps, step: segment.duration / steps }, axis.radius);
    integrate(memory, steps, new Float32Array(0));
    return [...memory.slice(0, length)];
  });
  return { start, states };
}

/** Numbers from 0 to 1, the same for the same seed (Park and Miller's multiplicative generator). */
export function seeded(seed: number): () => number {
  let state = seed;
  return () => {
    state = (state * 48271) % 2147483647;
    return state / 2147483647;
  };
}

export interface GeneratedMove {
  readonly axis: SimulatedAxis;
  /** The same move at another share of its acceleration and jerk. */
  readonly profileAt: (share: number) => MoveProfile;
  readonly words: string;
}

/**
 * A short move that asks for 0.5 to 1.5 times the torque which the closed form leaves at its highest speed; the
 * inertia is chosen to that end. Trapezoid or S-curve, one body or two.
 */
export function generatedMove(chance: () => number): GeneratedMove {
  const between = (low: number, high: number): number => low + (high - low) * chance();
  const motor = motorOf(between);
  const peak = Math.SQRT2 * motor.runCurrent;
  const driven = {
    voltage: motor.supplyVoltage,
    resistance: motor.resistance,
    inductance: motor.inductance,
    voltageConstant: voltageConstant(motor.holdingTorque, motor.ratedCurrent),
    rotorTeeth: motor.rotorTeeth,
    peakCurrent: peak,
  };
  const speed = Math.min(voltageLimitSpeed(driven) * between(0.4, 2), 250);
  const ramp = between(0.01, 0.03);
  // Nothing may be left of the conservative form where the true motor still pulls.
  const available = Math.max(conservativePullOut(driven, speed), 0.15 * driven.voltageConstant * peak);
  const load = available * between(0, 0.4);
  const use = between(0.5, 1.5);
  const inertia = (Math.max(0.05, use - load / available) * available * ramp) / speed;
  const rotor = inertia * between(0.2, 0.6);
  const compliance = chance() < 0.33 ? complianceOf({ rotor, inertia, between }) : null;
  const curve = chance() < 0.5;
  const cruise = between(0.005, 0.02);
  const profileAt = (share: number): MoveProfile => {
    const limits = { distance: speed * (ramp + cruise), speed, acceleration: (speed / ramp) * share };
    return curve
      ? sCurveProfile({ ...limits, jerk: (limits.acceleration / (ramp * 0.3)) * share })
      : trapezoidProfile(limits);
  };
  const axis: SimulatedAxis = {
    ...motor,
    motorInertia: rotor,
    movingInertia: inertia - rotor,
    friction: load * 0.5,
    steadyLoad: load * 0.5,
    compliance,
  };
  const words = `${curve ? "S-curve" : "trapezoid"} to ${speed.toFixed(0)} rad/s in ${(ramp * 1000).toFixed(1)} ms, torque asked ${use.toFixed(2)} of the available, ${compliance ? "compliant" : "stiff"}`;
  return { axis, profileAt, words };
}

type Between = (low: number, high: number) => number;

function motorOf(between: Between) {
  const holdingTorque = between(0.1, 2);
  const ratedCurrent = between(0.7, 3);
  const resistance = between(1.5, 4) / ratedCurrent;
  return {
    supplyVoltage: between(12, 48),
    resistance,
    inductance: resistance * between(0.8e-3, 2.5e-3),
    holdingTorque,
    ratedCurrent,
    runCurrent: ratedCurrent * between(0.5, 1),
    rotorTeeth: 50,
    motorCount: 1,
    radius: 1,
    efficiency: between(0.8, 1),
    detentTorque: holdingTorque * between(0, 0.04),
    dampingRatio: between(0.05, 0.2),
  };
}

function complianceOf({ rotor, inertia, between }: { rotor: number; inertia: number; between: Between }) {
  const reduced = (rotor * (inertia - rotor)) / inertia;
  return { stiffness: reduced * (2 * Math.PI * between(150, 500)) ** 2, dampingRatio: between(0.02, 0.1) };
}
