import { exceeds, hint, judged } from "./assessment";
import type { Assessment } from "./assessment";
import { axisRule } from "./check";
import { gather, hardware } from "./data";
import { GEOMETRY_READS, radius, speedUnit } from "./quantities/geometry";
import { dwellSpeeds } from "./quantities/motion";
import { readsOf } from "./quantities/table";
import { show } from "./show";
import type { AxisView } from "./types";

const BAND = 0.2;

interface Excitation {
  readonly words: string;
  /** m/s */
  readonly speed: number;
  readonly frequency: number;
}

/** What shakes the load at a speed: each full step, each fourth of them, each tooth of the belt. */
function excitations(
  axis: AxisView,
  input: { speed: number; radius: number; stepAngle: number },
): Excitation[] {
  const { speed, radius: r, stepAngle } = input;
  const fullSteps = (speed / r) * (360 / stepAngle / (2 * Math.PI));
  const pitch = hardware(axis, "drive_train", "pitch_mm");
  const belt = axis.hardware.drive_train?.kind === "belt" && pitch.ok ? [pitch.value / 1000] : [];
  return [
    { words: "full steps come", speed, frequency: fullSteps },
    { words: "every fourth full step comes", speed, frequency: fullSteps / 4 },
    ...belt.map((length) => ({ words: "belt teeth come", speed, frequency: speed / length })),
  ];
}

function assess(axis: AxisView): Assessment {
  if (axis.kind === "rotary") return null;
  const resonance = axis.quantity("axis_resonance_hz");
  if (!resonance.ok) return resonance;
  const parts = gather({
    resonance,
    peak: axis.quantity("peak_speed"),
    radius: radius(axis),
    stepAngle: hardware(axis, "motor", "step_angle_deg"),
  });
  if (!parts.ok) return parts;
  const { resonance: own, peak, radius: r, stepAngle } = parts.values;
  const all = dwellSpeeds(axis, peak).flatMap((speed) => excitations(axis, { speed, radius: r, stepAngle }));
  const hit = all.find(({ frequency }) => !exceeds(Math.abs(frequency - own), BAND * own));
  return judged(hint({ value: own, applies: hit !== undefined, nearLimit: null, unit: "Hz" }), {
    assumed: parts.assumed,
    sentence: () =>
      hit === undefined
        ? `Load and drive train swing at ${show(own, "Hz")}; nothing that returns at the speeds at which the axis dwells lies within 20 % of it.`
        : `At ${show(hit.speed, speedUnit(axis))} ${hit.words} at ${show(hit.frequency, "Hz")}, near the ${show(own, "Hz")} at which load and drive train swing: vibration is likely, verify it on the machine.`,
    formula: () => resonance.formula(),
  });
}

export const AXIS_RESONANCE = axisRule({
  id: "axis-resonance",
  title: "Resonance of belt or screw",
  compares:
    "The frequency at which the load swings on its belt or screw with what returns at the speeds at which the axis dwells.",
  formula: "|f − f_axis| ≤ 0.2·f_axis; f_axis = √(k/m)/2π, belt k = c·b·(1/L1 + 1/L2) at L1 = L2",
  source:
    "Harmonic oscillator; belt after Gates Mectrol, Timing Belt Theory (constant from memory); belts stiffen with load, so that this can only hint",
  needs: [
    ...readsOf("axis_resonance_hz", "peak_speed"),
    ...GEOMETRY_READS,
    "motor.step_angle_deg",
    "reference_run_speed",
  ],
  margin: "near within 20 % of the resonance, never over",
  caution: null,
  parameters: () => ["max_speed", "acceleration", "reference_run_speed"],
  assess,
});
