import { voltageAfterBraking } from "@/lib/physics/supply";
import { exceeds, judged, judgeUpper, upperSign } from "./assessment";
import type { Assessment } from "./assessment";
import { lower } from "./candidates";
import type { Candidate } from "./clearing";
import { machineRule } from "./check";
import { hardware, merged, missing } from "./data";
import { axisEnergy, uncountedEnergy } from "./quantities/braking";
import { readsOf } from "./quantities/table";
import { show } from "./show";
import type { RuleContext } from "./types";

const NEAR = 0.9;

interface Weakest {
  readonly axis: string;
  readonly volts: number;
}

/** The driver that stands least, and the paths of those that are not known. */
export function weakestDriver({ axes }: RuleContext): {
  readonly weakest: Weakest | null;
  readonly needs: readonly string[];
} {
  const found = axes.map((axis) => ({ axis: axis.axis, most: hardware(axis, "driver", "absolute_max_v") }));
  const weakest = found.reduce<Weakest | null>(
    (least, { axis, most }) =>
      most.ok && (least === null || most.value < least.volts) ? { axis, volts: most.value } : least,
    null,
  );
  return { weakest, needs: found.flatMap(({ most }) => (most.ok ? [] : most.needs)) };
}

function assess(context: RuleContext): Assessment {
  if (context.axes.length === 0) return null;
  const bus = context.quantity("bus_voltage_after_braking");
  const { weakest, needs } = weakestDriver(context);
  if (!bus.ok) return { ...bus, needs: merged(bus.needs, needs) };
  // One driver that is not known may be the weakest; a voltage above a known one is too high all the same.
  if (weakest === null || (needs.length > 0 && !exceeds(bus.value, weakest.volts))) return missing(...needs);
  const near = NEAR * weakest.volts;
  const verdict = judgeUpper({ value: bus.value, limit: weakest.volts, near, unit: "V" });
  const whole = withAllRotors(context, bus.value);
  const level = verdict.level === "within" && exceeds(whole, near) ? "near" : verdict.level;
  return judged(
    { ...verdict, level },
    {
      assumed: bus.assumed,
      sentence: () =>
        `When all axes brake from their highest speed the bus can rise to ${show(bus.value, "V")}; the driver of axis ${weakest.axis} stands ${show(weakest.volts, "V")} at most.${rotorsNote(bus.value, whole)}`,
      formula: () => `${bus.formula()} ${upperSign(verdict)} ${show(weakest.volts, "V")}`,
    },
  );
}

/**
 * Bus voltage, V, with the rotors too that axes with shared motors do not count: √(V² + 2·E/C). Source: energy of a
 * capacitor.
 */
function withAllRotors({ axes, input }: RuleContext, voltage: number): number {
  const energy = axes.map(uncountedEnergy).reduce((sum, each) => sum + each, 0);
  const capacitance = input.assembly.supply?.bus_capacitance_uf;
  // Without the capacitor the voltage to begin with is not known either.
  return capacitance === undefined
    ? voltage
    : voltageAfterBraking({ voltage, energy, capacitance: capacitance * 1e-6 });
}

function rotorsNote(counted: number, whole: number): string {
  return exceeds(whole, counted)
    ? ` Axes that share two motors count one each here: with the rotors of both it is ${show(whole, "V")}.`
    : "";
}

/** The speed of the axis with the most kinetic energy first. */
function candidates({ axes }: RuleContext): Candidate[] {
  const energy = (axis: (typeof axes)[number]) => {
    const found = axisEnergy(axis);
    return found.ok ? found.value : 0;
  };
  return [...axes]
    .sort((one, other) => energy(other) - energy(one))
    .flatMap((axis) => lower(axis, "max_speed"));
}

export const BRAKING_VOLTAGE = machineRule({
  id: "braking-voltage",
  title: "Bus voltage after braking",
  compares:
    "The bus voltage after all axes have braked into the capacitor with the least absolute maximum of the drivers.",
  formula: "√((V·(1 + tolerance))² + 2·E/C) ≤ V_absolute,max; E = Σ (½·m·v² + ½·n·Jm·(v/r)²)",
  source: "Kinetic energy into the energy of a capacitor, nothing lost on the way",
  needs: [...readsOf("bus_voltage_after_braking"), "driver.absolute_max_v", "axis.coupled_with"],
  margin:
    "near above 90 % of the absolute maximum (with rotors too that axes on shared motors do not count), over above it",
  caution: null,
  parameters: ["max_speed", "acceleration"],
  candidates,
  assess,
});
