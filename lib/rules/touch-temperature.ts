import { formatNumber } from "@/lib/domain/units";
import { touchTime } from "@/lib/physics/touch";
import { exceeds, hint, judged } from "./assessment";
import type { Assessment } from "./assessment";
import { currentParameters } from "./candidates";
import { axisRule } from "./check";
import { readsOf } from "./quantities/table";
import { show } from "./show";
import type { AxisView } from "./types";

/** °C above which bare metal burns within seconds. */
const HOT = 60;

function assess(axis: AxisView): Assessment {
  const motorCase = axis.quantity("case_c");
  if (!motorCase.ok)
    return motorCase.runaway === true && motorCase.needs.length === 0
      ? unsettled(motorCase.reason)
      : motorCase;
  const { value, assumed } = motorCase;
  const hot = exceeds(value, HOT);
  return judged(hint({ value, applies: hot, nearLimit: HOT, unit: "°C" }), {
    assumed,
    sentence: () =>
      hot
        ? `The motor's case settles at ${show(value, "°C")}, hotter than the ${HOT} °C at which bare metal burns the skin within seconds.`
        : `The motor's case settles at ${show(value, "°C")}, no hotter than ${HOT} °C.${toHold(value)}`,
    formula: () => `${motorCase.formula()} ${hot ? ">" : "≤"} ${HOT} °C`,
  });
}

/** °C from which a case is hot to hold: bare metal burns within ten minutes. */
const HOT_TO_HOLD = 48;

function toHold(temperature: number): string {
  const time = touchTime(temperature);
  if (temperature < HOT_TO_HOLD || time === null) return "";
  const words = time < 60 ? `${formatNumber(time, 2)} s` : `${formatNumber(time / 60, 2)} min`;
  return ` It is hot to hold: bare metal burns the skin after about ${words}.`;
}

function unsettled(reason: string): Assessment {
  return judged(hint({ value: null, applies: true, nearLimit: HOT, unit: "°C" }), {
    assumed: [],
    sentence: () => reason,
    formula: () => "R_th·2·I²·R ≥ 254.5 K",
  });
}

export const TOUCH_TEMPERATURE = axisRule({
  id: "touch-temperature",
  title: "Touch temperature of the motor",
  compares: "The settled temperature of the motor's case with 60 °C.",
  formula: "T_case = Ta + R_case·P ≤ 60 °C",
  source:
    "ISO 13732-1 (burn thresholds for bare metal, from memory; it sets no limits); 60 °C is the product's choice for a touch of seconds",
  needs: readsOf("case_c"),
  margin: "near above 60 °C, never over",
  caution: "Hot surface: guard it or warn of it, and let it cool before hands go there.",
  parameters: (axis) => currentParameters(axis, "run_current"),
  assess,
});
