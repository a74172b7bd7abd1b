import type { Explanation, TellingMeasurement } from "@/lib/physics/fingerprint";
import { formatNumber } from "@/lib/domain/units";

export const EXPLANATION_WORDS: Readonly<Record<Explanation, string>> = {
  as_predicted: "Nothing but the spread of the catalog data",
  peak_for_rms: "A peak current taken for rms, or rms for peak",
  hold_current: "It stood on hold current",
  sense_resistor: "A sense resistor off by two",
  other_winding: "A motor with another winding",
  less_airflow: "Less air at the motor",
};

/** What the factor of an explanation does: "twice the current, 4 times the copper loss". */
export function factorWords(explanation: Explanation, factor: number): string {
  const times = `${formatNumber(factor, 2)} times`;
  if (explanation === "as_predicted") return "as set";
  if (explanation === "other_winding") return `${times} the winding resistance`;
  if (explanation === "less_airflow") return `${times} the thermal resistance from case to air`;
  return `${times} the current, ${formatNumber(factor ** 2, 2)} times the copper loss`;
}

export const TELLING_WORDS: Readonly<
  Record<TellingMeasurement, { readonly act: string; readonly unit: string }>
> = {
  winding_current: {
    act: "Measure the current in one phase while the axis stands as it stood for the temperature: the root of the sum of the squares of both phases over √2 is the rms current.",
    unit: "A",
  },
  cold_resistance: {
    act: "Measure the resistance of one winding at the unplugged motor, cold, and take it to 20 °C.",
    unit: "Ω",
  },
  winding: {
    act: "Measure the winding temperature by its resistance, cold and hot, once the motor has settled.",
    unit: "°C",
  },
  case: { act: "Measure the temperature of the motor case once it has settled.", unit: "°C" },
};
