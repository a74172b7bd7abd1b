import { joinWords } from "@/lib/domain/sentences";
import { fullStepRate } from "@/lib/physics/step-rate";
import { exceeds, hint, judged } from "./assessment";
import type { Assessment } from "./assessment";
import { currentParameters } from "./candidates";
import { axisRule } from "./check";
import { gather, hardware, OUT_OF_RANGE } from "./data";
import { GEOMETRY_READS, radius, speedUnit } from "./quantities/geometry";
import { dwellSpeeds } from "./quantities/motion";
import { readsOf } from "./quantities/table";
import { show } from "./show";
import type { AxisView } from "./types";

const BAND = 0.2;

function liesNear(rate: number, frequency: number): boolean {
  return !exceeds(Math.abs(rate - frequency), BAND * frequency);
}

/** A speed at which the axis dwells on its resonance, or on half of it. */
interface Hit {
  /** m/s */
  readonly speed: number;
  /** Hz of full steps at that speed. */
  readonly rate: number;
  /** Hz */
  readonly frequency: number;
}

function assess(axis: AxisView): Assessment {
  const parts = gather({
    rate: axis.quantity("full_step_rate"),
    resonance: axis.quantity("resonance_hz"),
    peak: axis.quantity("peak_speed"),
    radius: radius(axis),
    stepAngle: hardware(axis, "motor", "step_angle_deg"),
  });
  if (!parts.ok) return parts;
  const { rate, resonance, peak, radius: r, stepAngle } = parts.values;
  const dwells = dwellSpeeds(axis, peak).map((speed) => ({
    speed,
    rate: fullStepRate(speed / r, stepAngle),
  }));
  if (!dwells.every((dwell) => Number.isFinite(dwell.rate))) return OUT_OF_RANGE;
  const hits = dwells.flatMap((dwell) => hitOf(dwell, resonance));
  // The value is the rate of the cruise, as the quantities have it, also where the reference run is the matter.
  return judged(hint({ value: rate, applies: hits.length > 0, nearLimit: null, unit: "Hz" }), {
    assumed: parts.assumed,
    sentence: () =>
      hits.length === 0
        ? `The axis dwells at ${joinWords(dwells.map((dwell) => show(dwell.rate, "Hz")))} of full steps, clear of its resonance at ${show(resonance, "Hz")} and of half of it.`
        : `${hits.map((hit) => hitWords(axis, hit, resonance)).join(" ")} Vibration is likely; try it on the machine.`,
    formula: () => `${parts.formula("rate")}; ${parts.formula("resonance")}`,
  });
}

/** Where nothing moves or nothing holds there is nothing to excite. */
function hitOf(dwell: { readonly speed: number; readonly rate: number }, resonance: number): Hit[] {
  if (!(resonance > 0)) return [];
  const frequency = [resonance, resonance / 2].find((own) => liesNear(dwell.rate, own));
  return frequency === undefined ? [] : [{ ...dwell, frequency }];
}

function hitWords(axis: AxisView, { speed, rate, frequency }: Hit, resonance: number): string {
  const own = frequency === resonance ? "its resonance" : "half its resonance";
  return `At ${show(speed, speedUnit(axis))} the axis dwells at ${show(rate, "Hz")} of full steps, within 20 % of ${own} at ${show(frequency, "Hz")}.`;
}

export const RESONANCE = axisRule({
  id: "resonance",
  title: "Cruising at a resonance",
  compares:
    "The full-step rate at the highest speed reached, and at the reference run speed, with the rotor's resonance and half of it.",
  formula: "|f − f_n| ≤ 0.2·f_n or |f − f_n/2| ≤ 0.2·f_n/2; f_n = √(Nr·Th(I)/J)/2π",
  source: "Acarnley, Stepping Motors; damping is not known, so that this can only hint",
  needs: [...readsOf("full_step_rate", "resonance_hz"), ...GEOMETRY_READS, "reference_run_speed"],
  margin: "near within 20 % of the resonance or of half of it, never over",
  caution: null,
  coupled: true,
  parameters: (axis) => [
    "max_speed",
    "acceleration",
    "reference_run_speed",
    ...currentParameters(axis, "run_current"),
  ],
  assess,
});
