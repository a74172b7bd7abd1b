import { peakFromRms } from "@/lib/physics/current-conventions";
import { firstMicrostepShare } from "@/lib/physics/microstep-fidelity";
import { exceeds, hint, judged } from "./assessment";
import type { Assessment } from "./assessment";
import { currentParameters } from "./candidates";
import { axisRule } from "./check";
import { fromText, gather } from "./data";
import { isClosedLoop, notCovered } from "./quantities/open-loop";
import { readsOf } from "./quantities/table";
import { plain, show, showPeak } from "./show";
import type { AxisView } from "./types";

function assess(axis: AxisView): Assessment {
  const decay = axis.hardware.driver?.decay_mode;
  // Mixed and fast decay can bring the current down within a cycle: the check has a meaning for slow decay only.
  if (decay !== undefined && decay !== "slow") return null;
  if (isClosedLoop(axis.hardware)) return notCovered(axis.axis);
  const parts = gather({
    least: axis.quantity("minimum_current_peak"),
    current: axis.quantity("winding_current_rms"),
    microsteps: fromText(axis, "microsteps", "positive"),
  });
  if (!parts.ok) return parts;
  const { least, current, microsteps } = parts.values;
  const asked = peakFromRms(current) * firstMicrostepShare(microsteps);
  const applies = exceeds(least, asked);
  return judged(hint({ value: least, applies, nearLimit: asked, unit: "A" }), {
    assumed: parts.assumed,
    sentence: () =>
      applies
        ? `The first microstep asks for ${showPeak(asked)}, less than the ${showPeak(least)} that the driver can bring the current down to: the current is flat where it crosses zero.`
        : `The first microstep asks for ${showPeak(asked)}, and the driver can bring the current down to ${showPeak(least)}.`,
    formula: () =>
      `${parts.formula("least")} ${applies ? ">" : "≤"} ${showPeak(peakFromRms(current))} · sin(90° / ${plain(microsteps)}) = ${show(asked, "A")}`,
  });
}

export const MICROSTEP_CURRENT = axisRule({
  id: "microstep-current",
  title: "Current of the first microstep",
  compares:
    "The lowest current that the driver can regulate in slow decay with the current of the first microstep.",
  formula: "t_min·f·V/R ≤ I_pk·sin(90°/microsteps)",
  source: "Driver data sheets: the shortest on-time of a slow-decay chopper",
  needs: [...readsOf("minimum_current_peak", "winding_current_rms"), "microsteps", "driver.feedback"],
  margin: "near where the lowest current is the greater one, never over",
  caution: null,
  parameters: (axis) => ["microsteps", ...currentParameters(axis, "run_current")],
  assess,
});
