import { joinWords } from "@/lib/domain/sentences";
import { highestSupplyVoltage, voltageAfterBraking } from "@/lib/physics/supply";
import { exceeds, judged, judgeUpper, upperSign } from "./assessment";
import type { Assessment } from "./assessment";
import { weakestDriver } from "./braking-voltage";
import { lower } from "./candidates";
import type { Candidate } from "./clearing";
import { machineRule } from "./check";
import { bothMissing, gather, given, merged, missing, supplyTolerance, supplyVoltage } from "./data";
import { lowering, LOWERING_READS } from "./quantities/lowering";
import type { Lowering } from "./quantities/lowering";
import { readsOf } from "./quantities/table";
import { plain, show } from "./show";
import type { AxisView, Datum, Missing, RuleContext } from "./types";

const NEAR = 0.9;

/** The loads that go down, or everything that is missing of them; null where no weight lies along any axis. */
function lowered({ axes }: RuleContext): readonly Lowering[] | Missing | null {
  const found = axes.map(lowering).filter((one) => one !== null);
  const lacks = found.flatMap((one) => (one.ok ? [] : [one]));
  if (lacks.length > 0) return lacks.reduce(bothMissing);
  return found.length === 0 ? null : found.flatMap((one) => (one.ok ? [one] : []));
}

function assess(context: RuleContext): Assessment {
  const [first] = context.axes;
  const loads = lowered(context);
  if (!first || loads === null) return null;
  const { weakest, needs } = weakestDriver(context);
  const energy = "ok" in loads ? loads : given(total(loads));
  // Where nothing comes back the capacitor does not matter.
  const needless = energy.ok && energy.value === 0;
  const parts = gather({
    voltage: supplyVoltage(first),
    tolerance: supplyTolerance(first),
    energy,
    capacitance: needless ? given(1) : capacitance(first),
  });
  if (!parts.ok) return { ...parts, needs: merged(parts.needs, needs) };
  const highest = highestSupplyVoltage(parts.values.voltage, parts.values.tolerance);
  const farads = parts.values.capacitance * 1e-6;
  const value = voltageAfterBraking({ voltage: highest, energy: parts.values.energy, capacitance: farads });
  // One driver that is not known may be the weakest; a voltage above a known one is too high all the same.
  if (weakest === null || (needs.length > 0 && !exceeds(value, weakest.volts))) return missing(...needs);
  const verdict = judgeUpper({ value, limit: weakest.volts, near: NEAR * weakest.volts, unit: "V" });
  const all = "ok" in loads ? [] : loads;
  return judged(verdict, {
    assumed: all.map(({ assumed }) => assumed).reduce(merged, parts.assumed),
    sentence: () =>
      needless
        ? `${subject(all)} feeds nothing back while it is lowered: copper and drivers take what the weight gives. The bus stays at ${show(value, "V")} at most.`
        : `${subject(all)} feeds ${plain(parts.values.energy)} J back while it is lowered over its travel at its highest speed, and the bus can rise to ${show(value, "V")}; the driver of axis ${weakest.axis} stands ${show(weakest.volts, "V")} at most.`,
    formula: () =>
      `E = ${all.map(({ formula }) => formula()).join(" + ")}; ${needless ? "" : `√((${show(highest, "V")})² + 2 · ${plain(parts.values.energy)} J / ${plain(parts.values.capacitance)} µF) = `}${show(value, "V")} ${upperSign(verdict)} ${show(weakest.volts, "V")}`,
  });
}

/** µF */
function capacitance({ assembly: { supply } }: AxisView): Datum {
  const stated = supply?.bus_capacitance_uf;
  return stated === undefined ? missing("supply.bus_capacitance_uf") : given(stated);
}

function total(loads: readonly Lowering[]): number {
  return loads.reduce((sum, { energy }) => sum + energy, 0);
}

function subject(loads: readonly Lowering[]): string {
  return `The load of ${loads.length === 1 ? "axis" : "axes"} ${joinWords(loads.map(({ axis }) => axis))}`;
}

/** The speed of the axis that feeds back most first. */
function candidates({ axes }: RuleContext): Candidate[] {
  const energy = (axis: (typeof axes)[number]) => {
    const found = lowering(axis);
    return found?.ok === true ? found.energy : 0;
  };
  return axes
    .filter((axis) => energy(axis) > 0)
    .sort((one, other) => energy(other) - energy(one))
    .flatMap((axis) => lower(axis, "max_speed"));
}

export const LOWERING_VOLTAGE = machineRule({
  id: "lowering-voltage",
  title: "Bus voltage after lowering a load",
  compares:
    "The bus voltage after all raised loads have gone down their travel, their power fed back into the capacitor, with the least absolute maximum of the drivers.",
  formula:
    "√((V·(1 + tolerance))² + 2·E/C) ≤ V_absolute,max; E = Σ max(0, (max(|W|, |W + F_ext|) − F_f)·v·η − n·(2·I²·R20 + 2·I²·R_on + P_q))·d/v",
  source:
    "Balance of power: m·g·h times the efficiency less the losses, into the energy of a capacitor; windings cold, nothing taken by the supply or by other axes",
  needs: [
    ...LOWERING_READS,
    ...readsOf("peak_speed", "winding_current_rms"),
    "supply.voltage_v",
    "supply.tolerance",
    "supply.bus_capacitance_uf",
    "driver.absolute_max_v",
  ],
  margin: "near above 90 % of the absolute maximum, over above it",
  caution: null,
  parameters: ["max_speed", "acceleration", "run_current", "travel_min", "travel_max"],
  candidates,
  assess,
});
