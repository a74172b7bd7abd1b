import { couplingFrequency, type ShaftModel } from "./axis";
import { REGULATOR_RATE } from "./integrate";

/** s; the chopper's mean over a period says nothing about shorter times. */
const LONGEST_STEP = 20e-6;
/** Steps per radian of the fastest swing, and per time constant of the fastest decay. */
const STEPS_PER_RADIAN = 5;
const STEPS_PER_DECAY = 2;

/**
 * Step, s, at which the integration is good to 0.1 %: at most 20 µs, a fifth of a radian of the fastest of the electrical
 * angle (Nr·ω at the highest shaft speed, rad/s), the rotor's swing and the compliance's; half the shortest time constant
 * of regulator, winding (L/R), damping and friction. Source: held against an independent integrator in the tests.
 */
export function chosenStep(shaft: ShaftModel, highestSpeed: number): number {
  const { rotorTeeth, naturalRate, resistance, inductance, rotorInertia, loadInertia } = shaft;
  const rotor = Math.sqrt((rotorTeeth * (shaft.torque + 4 * shaft.detentTorque)) / rotorInertia);
  const coupling = 2 * Math.PI * (couplingFrequency(shaft) ?? 0);
  const swings = [rotorTeeth * highestSpeed, naturalRate, rotor, coupling];
  const lightest = loadInertia > 0 ? Math.min(rotorInertia, loadInertia) : rotorInertia;
  const rubbed = loadInertia > 0 ? loadInertia : rotorInertia;
  const decays = [
    REGULATOR_RATE,
    resistance / inductance,
    shaft.damping / rotorInertia,
    shaft.couplingDamping / lightest,
    shaft.frictionTorque / (shaft.frictionSpeed * rubbed),
  ];
  return Math.min(
    LONGEST_STEP,
    1 / (STEPS_PER_RADIAN * Math.max(...swings)),
    1 / (STEPS_PER_DECAY * Math.max(...decays)),
  );
}
