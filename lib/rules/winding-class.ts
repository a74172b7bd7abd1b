import { CLASS_AMBIENT, thermalClassLimits } from "@/lib/physics/motor-heat";
import { judged, judgeTemperature, unbounded, upperSign } from "./assessment";
import type { Assessment } from "./assessment";
import { currentParameters, lowerCurrent } from "./candidates";
import { axisRule } from "./check";
import { axisPath, missing } from "./data";
import { readsOf } from "./quantities/table";
import { show } from "./show";
import type { AxisView } from "./types";

const NEAR = 10;

function assess(axis: AxisView): Assessment {
  const letter = axis.hardware.motor?.thermal_class;
  if (letter === undefined) return missing(axisPath(axis, "motor.thermal_class"));
  const { hotSpot, rise } = thermalClassLimits(letter);
  const limit = CLASS_AMBIENT + rise;
  const winding = axis.quantity("winding_c");
  if (!winding.ok && winding.runaway === true && winding.needs.length === 0)
    return judged(unbounded(limit, limit - NEAR), {
      assumed: [],
      sentence: () => winding.reason,
      formula: () => "R_th·2·I²·R ≥ 254.5 K",
    });
  if (!winding.ok) return winding;
  const { value, assumed } = winding;
  const verdict = judgeTemperature({ value, limit, near: limit - NEAR });
  return judged(verdict, {
    assumed,
    sentence: () =>
      `The winding settles at ${show(value, "°C")} in the mean; thermal class ${letter} allows ${show(limit, "°C")} there, so that its hot spot stays below ${show(hotSpot, "°C")}.`,
    formula: () =>
      `${winding.formula()} ${upperSign(verdict)} ${CLASS_AMBIENT} °C + ${rise} K = ${show(limit, "°C")}`,
  });
}

export const WINDING_CLASS = axisRule({
  id: "winding-class",
  title: "Thermal class of the winding",
  compares: "The settled mean winding temperature with what the insulation's thermal class allows.",
  formula: "T ≤ 40 °C + rise of the class: A 60, E 75, B 80, F 105, H 125 K",
  source:
    "IEC 60085 (classes) and IEC 60034-1 (rise by resistance over 40 °C; A and E from memory); the hot spot lies 5 to 15 K above the mean",
  needs: [...readsOf("winding_c"), "motor.thermal_class"],
  margin: "near less than 10 K below the limit, over above it",
  caution: null,
  parameters: (axis) => currentParameters(axis, "run_current"),
  candidates: lowerCurrent,
  assess,
});
