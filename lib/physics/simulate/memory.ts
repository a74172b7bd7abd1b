import type { ShaftModel } from "./axis";
import * as m from "./integrate";
import type { Stretch } from "./stretches";

/** The numbers of an axis in the order that the integration wants them, at time 0. */
export function memoryOf(shaft: ShaftModel): Float64Array {
  const memory = new Float64Array(m.MEMORY);
  memory[m.TEETH] = shaft.rotorTeeth;
  memory[m.PEAK_CURRENT] = shaft.peakCurrent;
  memory[m.VOLTAGE_RATE] = shaft.voltage / shaft.inductance;
  memory[m.RESISTANCE_RATE] = shaft.resistance / shaft.inductance;
  memory[m.EMF_RATE] = shaft.voltageConstant / shaft.inductance;
  memory[m.TORQUE_CONSTANT] = shaft.voltageConstant;
  memory[m.DAMPING] = shaft.damping;
  memory[m.STEADY] = shaft.steadyTorque;
  memory[m.FRICTION] = shaft.frictionTorque;
  memory[m.FRICTION_SPEED] = shaft.frictionSpeed;
  memory[m.DETENT] = shaft.detentTorque;
  memory[m.ROTOR_INERTIA] = shaft.rotorInertia;
  memory[m.LOAD_INERTIA] = shaft.loadInertia;
  memory[m.STIFFNESS] = shaft.couplingStiffness;
  memory[m.COUPLING_DAMPING] = shaft.couplingDamping;
  memory[m.BROKE_TIME] = -1;
  return memory;
}

/** Puts the command at the start of a stretch; lengths over `radius` (m/rad) are angles of the shaft. */
export function enterStretch(memory: Float64Array, { segment, step }: Stretch, radius: number): void {
  memory[m.FROM_ANGLE] = segment.position / radius;
  memory[m.FROM_SPEED] = segment.speed / radius;
  memory[m.FROM_ACCELERATION] = segment.acceleration / radius;
  memory[m.FROM_JERK] = segment.jerk / radius;
  memory[m.FROM_TIME] = segment.start;
  memory[m.STEP] = step;
  memory[m.STEPS_DONE] = 0;
}

/**
 * Puts the axis at rest under its steady load: the rotor behind the command by the angle at which the magnet carries the
 * load (a full step at most; what is too heavy falls from there), currents as commanded.
 */
export function putAtRest(memory: Float64Array, shaft: ShaftModel): void {
  const angle = -restAngle(shaft) / shaft.rotorTeeth;
  memory[m.CURRENT_A] = shaft.peakCurrent;
  memory[m.ANGLE] = angle;
  memory[m.LOAD_ANGLE] = shaft.loadInertia > 0 ? angle - shaft.steadyTorque / shaft.couplingStiffness : angle;
}

const HALVINGS = 60;

/** Electrical angle, rad, with T·sin δ + T_d·sin 4·δ = load, sought by halving between −π/2 and π/2. */
function restAngle({ torque, detentTorque, steadyTorque }: ShaftModel): number {
  let low = -Math.PI / 2;
  let high = Math.PI / 2;
  for (let count = 0; count < HALVINGS; count += 1) {
    const middle = (low + high) / 2;
    if (torque * Math.sin(middle) + detentTorque * Math.sin(4 * middle) < steadyTorque) low = middle;
    else high = middle;
  }
  return (low + high) / 2;
}
