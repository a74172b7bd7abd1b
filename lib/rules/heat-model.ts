import { gather, hardware, missing, motorAmbient } from "./data";
import type { AxisView, Datum, Missing, RuleInput } from "./types";
import { ruleContext } from "./view";

/** What heats the motor of one axis, and how its heat leaves. */
export interface HeatModel {
  /** As the assembly spells it. */
  readonly axis: string;
  /** A rms in one winding. */
  readonly current: number;
  /** A rms at standstill; null where the text does not say. */
  readonly holdCurrent: number | null;
  /** Ω of one winding as connected, at 20 °C. */
  readonly resistanceAt20: number;
  /** K/W, winding to ambient and case to ambient; null where not stated. */
  readonly windingResistance: number | null;
  readonly caseResistance: number | null;
  /** Air around the motor, °C; null where not stated. */
  readonly ambient: number | null;
}

export interface KnownHeatModel {
  readonly ok: true;
  readonly value: HeatModel;
  /** Paths of the defaults that the numbers rest on. */
  readonly assumed: readonly string[];
}

/** The numbers of the motor's heat of one axis (its name without regard to case), or what is missing for any of it. */
export function heatModel(input: RuleInput, axis: string): KnownHeatModel | Missing {
  const view = ruleContext(input).axes.find((known) => known.axis.toLowerCase() === axis.toLowerCase());
  return view === undefined ? missing(`axes.${axis}`) : modelOf(view);
}

function modelOf(view: AxisView): KnownHeatModel | Missing {
  const parts = gather({
    current: view.quantity("winding_current_rms"),
    resistanceAt20: hardware(view, "motor", "resistance_ohm"),
  });
  if (!parts.ok) return parts;
  return {
    ok: true,
    assumed: parts.assumed,
    value: {
      axis: view.axis,
      ...parts.values,
      holdCurrent: valueOf(view.quantity("hold_current_rms")),
      windingResistance: valueOf(hardware(view, "motor", "winding_to_ambient_k_per_w")),
      caseResistance: valueOf(hardware(view, "motor", "case_to_ambient_k_per_w")),
      ambient: valueOf(motorAmbient(view)),
    },
  };
}

function valueOf(found: Datum): number | null {
  return found.ok ? found.value : null;
}
