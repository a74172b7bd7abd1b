import { microstepsToMove } from "@/lib/physics/microstep-fidelity";
import { exceeds, hint, judged } from "./assessment";
import type { Assessment } from "./assessment";
import { currentParameters } from "./candidates";
import { axisRule } from "./check";
import { fromText, gather, motorCount } from "./data";
import { GEOMETRY_READS, radius } from "./quantities/geometry";
import { frictionForce } from "./quantities/static-position";
import { isClosedLoop, notCovered } from "./quantities/open-loop";
import { readsOf } from "./quantities/table";
import { HOLDING_READS, holdingTorque } from "./quantities/torque";
import { plain, show } from "./show";
import type { AxisView } from "./types";

const FOURTH = 0.25;

function assess(axis: AxisView): Assessment {
  if (isClosedLoop(axis.hardware)) return notCovered(axis.axis);
  const parts = gather({
    holding: holdingTorque(axis, axis.quantity("winding_current_rms")),
    force: frictionForce(axis),
    microsteps: fromText(axis, "microsteps", "positive"),
    motors: motorCount(axis),
    radius: radius(axis),
  });
  if (!parts.ok) return parts;
  const { holding, microsteps } = parts.values;
  const friction = (parts.values.force / parts.values.motors) * parts.values.radius;
  if (holding === 0) return null;
  const steps = microstepsToMove({ microsteps, friction, holdingTorque: holding });
  const value = Number.isFinite(steps) ? steps : null;
  const applies = exceeds(steps, FOURTH * microsteps);
  return judged(hint({ value, applies, nearLimit: FOURTH * microsteps, unit: "" }), {
    assumed: parts.assumed,
    sentence: () =>
      value === null
        ? `Friction of ${show(friction, "N·m")} at the motor is greater than its torque of ${show(holding, "N·m")}: no microstep moves the load.`
        : `${plain(Math.ceil(value))} of ${plain(microsteps)} microsteps pass before friction of ${show(friction, "N·m")} at the motor gives way.${applies ? " More microsteps bring smoothness, not accuracy." : ""}`,
    formula: () =>
      `${plain(microsteps)} / 90° · asin(${show(friction, "N·m")} / ${show(holding, "N·m")})${value === null ? "" : ` = ${plain(value)}`} ${applies ? ">" : "≤"} ${plain(microsteps)} / 4`,
  });
}

export const MICROSTEP_FRICTION = axisRule({
  id: "microstep-friction",
  title: "Microsteps against friction",
  compares: "The microsteps that pass before friction gives way with a quarter of a full step.",
  formula: "(N/90°)·asin(T_f/Th(I)) ≤ N/4",
  source:
    "Torque of a microstep, Th·sin(90°/N) (Micromo/Faulhaber, Microstepping: Myths and Realities); a quarter is the product's choice",
  needs: [
    ...readsOf("winding_current_rms"),
    ...HOLDING_READS,
    ...GEOMETRY_READS,
    "axis.motor_count",
    "load.friction_n",
    "load.friction_nm",
    "microsteps",
    "driver.feedback",
  ],
  margin: "near where more than a quarter of a full step passes first, never over",
  caution: null,
  parameters: (axis) => ["microsteps", ...currentParameters(axis, "run_current")],
  assess,
});
