import { exceeds, hint, judged } from "./assessment";
import type { Assessment } from "./assessment";
import { currentParameters } from "./candidates";
import { axisRule } from "./check";
import { gather } from "./data";
import { readsOf } from "./quantities/table";
import { show } from "./show";
import type { AxisView } from "./types";

const BAND = 0.2;

function liesNear(rate: number, frequency: number): boolean {
  return !exceeds(Math.abs(rate - frequency), BAND * frequency);
}

function assess(axis: AxisView): Assessment {
  const parts = gather({ rate: axis.quantity("full_step_rate"), resonance: axis.quantity("resonance_hz") });
  if (!parts.ok) return parts;
  const { rate, resonance } = parts.values;
  // Where nothing moves or nothing holds there is nothing to excite.
  const hit =
    resonance > 0 ? [resonance, resonance / 2].find((frequency) => liesNear(rate, frequency)) : undefined;
  return judged(hint({ value: rate, applies: hit !== undefined, nearLimit: null, unit: "Hz" }), {
    assumed: parts.assumed,
    sentence: () =>
      hit === undefined
        ? `The axis cruises at ${show(rate, "Hz")} of full steps, clear of its resonance at ${show(resonance, "Hz")} and of half of it.`
        : `The axis cruises at ${show(rate, "Hz")} of full steps, within 20 % of ${hit === resonance ? "its resonance" : "half its resonance"} at ${show(hit, "Hz")}: vibration is likely; try it on the machine.`,
    formula: () => `${parts.formula("rate")}; ${parts.formula("resonance")}`,
  });
}

export const RESONANCE = axisRule({
  id: "resonance",
  title: "Cruising at a resonance",
  compares: "The full-step rate at the highest speed reached with the rotor's resonance and half of it.",
  formula: "|f − f_n| ≤ 0.2·f_n or |f − f_n/2| ≤ 0.2·f_n/2; f_n = √(Nr·Th(I)/J)/2π",
  source: "Acarnley, Stepping Motors; damping is not known, so that this can only hint",
  needs: readsOf("full_step_rate", "resonance_hz"),
  margin: "near within 20 % of the resonance or of half of it, never over",
  caution: null,
  coupled: true,
  parameters: (axis) => ["max_speed", "acceleration", ...currentParameters(axis, "run_current")],
  assess,
});
