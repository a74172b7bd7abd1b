import { magneticStiffness, naturalFrequency } from "@/lib/physics/resonance";
import { allowedJump } from "@/lib/physics/start-stop";
import { rotorTeeth } from "@/lib/physics/drive-train";
import { bothMissing, computed, gather, hardware, merged } from "../data";
import { plain, show } from "../show";
import type { QuantityDefinition } from "./definition";
import { GEOMETRY_READS, speedUnit } from "./geometry";
import { INERTIA_READS, LOAD_TORQUE_READS, loadTorque, totalInertia } from "./load";
import { driven, HOLDING_READS, holdingTorque } from "./torque";

export const START_STOP_SPEED: QuantityDefinition = {
  reads: [...HOLDING_READS, ...LOAD_TORQUE_READS, ...INERTIA_READS, ...GEOMETRY_READS],
  from: ["winding_current_rms", "voltage_limit_speed"],
  compute: (axis) => {
    const motor = driven(axis);
    const parts = gather({
      holding: holdingTorque(axis, axis.quantity("winding_current_rms")),
      loadTorque: loadTorque(axis),
      inertia: totalInertia(axis),
    });
    if (!motor.ok) return parts.ok ? motor : bothMissing(motor, parts);
    if (!parts.ok) return parts;
    const { holding, loadTorque: load, inertia } = parts.values;
    const teeth = motor.motor.rotorTeeth;
    const { jump, torque } = allowedJump({
      motor: motor.motor,
      holdingTorque: holding,
      loadTorque: load,
      inertia,
    });
    const speed = jump * motor.radius;
    return computed(
      speed,
      merged(motor.assumed, parts.assumed),
      () =>
        `0.5 · jump that ${show(torque, "N·m")} catches against ${show(load, "N·m")} with J = ${plain(inertia)} kg·m², Nr = ${plain(teeth)}: ${show(speed, speedUnit(axis))}`,
    );
  },
};

export const RESONANCE: QuantityDefinition = {
  reads: [...HOLDING_READS, ...INERTIA_READS, ...GEOMETRY_READS, "motor.step_angle_deg"],
  from: ["winding_current_rms"],
  compute: (axis) => {
    const parts = gather({
      holding: holdingTorque(axis, axis.quantity("winding_current_rms")),
      inertia: totalInertia(axis),
      stepAngle: hardware(axis, "motor", "step_angle_deg"),
    });
    if (!parts.ok) return parts;
    const { holding, inertia, stepAngle } = parts.values;
    const teeth = rotorTeeth(stepAngle);
    const frequency = naturalFrequency(magneticStiffness(holding, teeth), inertia);
    return computed(
      frequency,
      parts.assumed,
      () =>
        `√(${plain(teeth)} · ${show(holding, "N·m")} / ${plain(inertia)} kg·m²) / 2π = ${show(frequency, "Hz")}`,
    );
  },
};
