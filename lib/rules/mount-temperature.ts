import { judged, judgeTemperature, unbounded, upperSign } from "./assessment";
import type { Assessment } from "./assessment";
import { currentParameters, lowerCurrent } from "./candidates";
import { axisRule } from "./check";
import { gather, hardware } from "./data";
import { readsOf } from "./quantities/table";
import { show } from "./show";
import type { AxisView } from "./types";

const OVER = 10;
const NEAR = 20;

function assess(axis: AxisView): Assessment {
  const motorCase = axis.quantity("case_c");
  const softening = hardware(axis, "mount", "softening_c");
  if (softening.ok && !motorCase.ok && motorCase.runaway === true && motorCase.needs.length === 0)
    return judged(unbounded(softening.value - OVER, softening.value - NEAR), {
      assumed: softening.assumed,
      sentence: () => motorCase.reason,
      formula: () => "R_th·2·I²·R ≥ 254.5 K",
    });
  const parts = gather({ motorCase, softening });
  if (!parts.ok) return parts;
  const { motorCase: value } = parts.values;
  const limit = parts.values.softening - OVER;
  const verdict = judgeTemperature({ value, limit, near: parts.values.softening - NEAR });
  return judged(verdict, {
    assumed: parts.assumed,
    sentence: () =>
      `The motor's case settles at ${show(value, "°C")}; its mount softens at ${show(parts.values.softening, "°C")}, so at most ${show(limit, "°C")} are allowed.`,
    formula: () => `${parts.formula("motorCase")} ${upperSign(verdict)} ${show(limit, "°C")}`,
  });
}

export const MOUNT_TEMPERATURE = axisRule({
  id: "mount-temperature",
  title: "Temperature of the mount",
  compares:
    "The settled temperature of the motor's case with the softening temperature of its mount less 10 K.",
  formula: "T_case = Ta + R_case·P ≤ T_soft − 10 K",
  source: "ISO 75 heat deflection at 1.8 MPa; printed parts creep below it, hence 10 K",
  needs: [...readsOf("case_c"), "mount.softening_c"],
  margin: "near less than 20 K below softening, over less than 10 K below it",
  caution: null,
  parameters: (axis) => currentParameters(axis, "run_current"),
  candidates: lowerCurrent,
  assess,
});
