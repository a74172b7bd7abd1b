import { peakFromRms } from "../current-conventions";
import { voltageConstant } from "../pull-out";
import { holdingTorqueAt } from "../static-torque";

/** A belt, or a long screw, between motor and load. */
export interface Compliance {
  /** N/m between the motor's pulley and the load (N·m/rad at the output of a rotary axis), more than 0. */
  readonly stiffness: number;
  /** Damping of load against motor, share of the critical one. */
  readonly dampingRatio: number;
}

/**
 * One axis for the simulation in time. On a rotary axis lengths are rad, forces N·m and the mass kg·m² at the output.
 * Positive loads act against the direction of the move.
 */
export interface SimulatedAxis {
  /** V */
  readonly supplyVoltage: number;
  /** Ω of one winding with everything in series. */
  readonly resistance: number;
  /** H */
  readonly inductance: number;
  /** N·m at rated current, both phases on. */
  readonly holdingTorque: number;
  /** A rms */
  readonly ratedCurrent: number;
  /** A rms as set; what is above the rated current adds nothing. */
  readonly runCurrent: number;
  readonly rotorTeeth: number;
  /** Rotor and drive train at one motor's shaft, kg·m². */
  readonly motorInertia: number;
  readonly motorCount: number;
  /** Travel for one radian of the motor, m. */
  readonly radius: number;
  /** Moving mass, kg. */
  readonly movingInertia: number;
  /** Share of 1. */
  readonly efficiency: number;
  /** N */
  readonly friction: number;
  /** External load and weight, N. */
  readonly steadyLoad: number;
  /** N·m, 0 for none. */
  readonly detentTorque: number;
  /**
   * Damping of the rotor's swing about the commanded motion, share of the critical one. Stands for eddy currents, grease
   * and what the driver takes out; no data sheet has it, and results depend on it.
   */
  readonly dampingRatio: number;
  /** Null: motor and load are one body. */
  readonly compliance: Compliance | null;
}

/** The axis as one motor sees it: everything at its shaft, angles in rad, torques in N·m, inertias in kg·m². */
export interface ShaftModel {
  /** V, Ω, H */
  readonly voltage: number;
  readonly resistance: number;
  readonly inductance: number;
  /** Ke, V·s/rad, peak of one phase. */
  readonly voltageConstant: number;
  /** A */
  readonly peakCurrent: number;
  readonly rotorTeeth: number;
  /** Torque of both phases at the set current, N·m. */
  readonly torque: number;
  /** Of the body that holds the rotor: with the load where there is no compliance. */
  readonly rotorInertia: number;
  /** Of the body behind the compliance, 0 where there is none. */
  readonly loadInertia: number;
  /** Undamped swing of the whole inertia in the magnetic spring, rad/s. */
  readonly naturalRate: number;
  /** N·m·s/rad against the speed relative to the command. */
  readonly damping: number;
  /** N·m that act at all speeds. */
  readonly steadyTorque: number;
  /** N·m that act against the motion. */
  readonly frictionTorque: number;
  /** rad/s at which 71 % of the friction acts. */
  readonly frictionSpeed: number;
  readonly detentTorque: number;
  /** N·m/rad and N·m·s/rad between rotor and load; 0 where they are one body. */
  readonly couplingStiffness: number;
  readonly couplingDamping: number;
}

/** Speed at which friction is near its full value, as a share of ω_n times a full step: small beside every move's speed. */
const FRICTION_SHARE = 0.02;

/**
 * The axis at the shaft of one of its n motors: J = Jm + m·r²/(n·η), friction F·r/(n·η), as the required torque of the
 * checks has it. A steady load S counts S·r/η against the motion and S·r·η with it: its mean stands among the steady
 * torque, half the difference joins the friction. ω_n = √(Nr·T/J). Source: energy balance of a drive train.
 */
export function shaftModel(axis: SimulatedAxis): ShaftModel {
  const { radius: r, motorCount: n, efficiency, rotorTeeth, compliance } = axis;
  const ke = voltageConstant(axis.holdingTorque, axis.ratedCurrent);
  const current = Math.min(axis.runCurrent, axis.ratedCurrent);
  const torque = holdingTorqueAt({ ...axis, current });
  const load = (axis.movingInertia * r ** 2) / (n * efficiency);
  const inertia = axis.motorInertia + load;
  const naturalRate = Math.sqrt((rotorTeeth * torque) / inertia);
  const steady = (axis.steadyLoad * r) / n;
  return {
    voltage: axis.supplyVoltage,
    resistance: axis.resistance,
    inductance: axis.inductance,
    voltageConstant: ke,
    peakCurrent: peakFromRms(current),
    rotorTeeth,
    torque,
    rotorInertia: compliance ? axis.motorInertia : inertia,
    loadInertia: compliance ? load : 0,
    naturalRate,
    damping: 2 * axis.dampingRatio * naturalRate * inertia,
    steadyTorque: (steady * (1 / efficiency + efficiency)) / 2,
    frictionTorque:
      (axis.friction * r) / (n * efficiency) + (Math.abs(steady) * (1 / efficiency - efficiency)) / 2,
    frictionSpeed: (FRICTION_SHARE * naturalRate * Math.PI) / (2 * rotorTeeth),
    detentTorque: axis.detentTorque,
    ...coupling({ compliance, load, motor: axis.motorInertia, radius: r, motors: n }),
  };
}

function coupling(input: {
  readonly compliance: Compliance | null;
  readonly load: number;
  readonly motor: number;
  readonly radius: number;
  readonly motors: number;
}): Pick<ShaftModel, "couplingStiffness" | "couplingDamping"> {
  const { compliance, load, motor, radius, motors } = input;
  if (!compliance) return { couplingStiffness: 0, couplingDamping: 0 };
  const couplingStiffness = (compliance.stiffness * radius ** 2) / motors;
  const reduced = (load * motor) / (load + motor);
  return {
    couplingStiffness,
    couplingDamping: 2 * compliance.dampingRatio * Math.sqrt(couplingStiffness * reduced),
  };
}

/**
 * Undamped frequency, Hz, at which load and motor swing against each other through the compliance; null where they are
 * one body. Source: two masses on a spring, √(K·(1/J1 + 1/J2))/2π.
 */
export function couplingFrequency({
  couplingStiffness,
  rotorInertia,
  loadInertia,
}: ShaftModel): number | null {
  if (loadInertia === 0) return null;
  return Math.sqrt(couplingStiffness * (1 / rotorInertia + 1 / loadInertia)) / (2 * Math.PI);
}
