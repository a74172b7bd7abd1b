import { conductionLoss } from "@/lib/physics/driver-heat";
import { windingPower } from "@/lib/physics/motor-heat";
import { loweringEnergy, loweringPower } from "@/lib/physics/supply";
import { gather, hardware, motorCount } from "../data";
import { plain, show } from "../show";
import type { AxisView, Missing } from "../types";
import { CONNECTION_READS } from "./current";
import { externalForce, frictionForce } from "./static-position";
import { FORCE_READS, weight } from "./load";
import { travel, TRAVEL_READS } from "./motion";
import { isClosedLoop, notCovered } from "./open-loop";
import { speedUnit } from "./geometry";

/** What an axis feeds back while its load goes down along the whole travel. */
export interface Lowering {
  readonly ok: true;
  readonly axis: string;
  /** J */
  readonly energy: number;
  readonly assumed: readonly string[];
  readonly formula: () => string;
}

export const LOWERING_READS = [
  ...FORCE_READS,
  ...CONNECTION_READS,
  ...TRAVEL_READS,
  "drive_train.efficiency",
  "motor.resistance_ohm",
  "driver.rds_on_ohm",
  "driver.quiescent_power_w",
  "driver.feedback",
  "axis.motor_count",
] as const;

/** °C; a winding that is still cold takes least of what comes back. */
const COLD = 20;

/**
 * The lowering of one axis, or what is missing for it; null where no weight lies along it. An external force counts where
 * it adds to the weight, since it need not always act. Losses are those of a cold start: the windings at 20 °C, the
 * drivers at the temperature at which their resistance is stated, without switching loss.
 */
export function lowering(axis: AxisView): Lowering | Missing | null {
  const along = weight(axis);
  if (along.ok && along.value === 0) return null;
  if (isClosedLoop(axis.hardware)) return notCovered(axis.axis);
  const parts = gather({
    along,
    external: externalForce(axis),
    friction: frictionForce(axis),
    efficiency: hardware(axis, "drive_train", "efficiency"),
    speed: axis.quantity("peak_speed"),
    travel: travel(axis),
    current: axis.quantity("winding_current_rms"),
    resistance: hardware(axis, "motor", "resistance_ohm"),
    onResistance: hardware(axis, "driver", "rds_on_ohm"),
    quiescent: hardware(axis, "driver", "quiescent_power_w"),
    motors: motorCount(axis),
  });
  if (!parts.ok) return parts;
  const { along: own, external, friction, efficiency, speed, current, resistance, motors } = parts.values;
  const pull = Math.max(Math.abs(own), Math.abs(own + external)) - friction;
  const copper = motors * windingPower({ current, resistanceAt20: resistance, temperature: COLD });
  const drivers = motors * (conductionLoss(parts.values) + parts.values.quiescent);
  const power = loweringPower({ pull, speed, efficiency, losses: copper + drivers });
  const energy = loweringEnergy({ power, speed, travel: parts.values.travel });
  return {
    ok: true,
    axis: axis.axis,
    energy,
    assumed: parts.assumed,
    formula: () =>
      `max(0, ${show(pull, axis.kind === "rotary" ? "N·m" : "N")} · ${show(speed, speedUnit(axis))} · ${plain(efficiency)} − ${show(copper, "W")} copper − ${show(drivers, "W")} drivers) · d/v = ${plain(energy)} J`,
  };
}
