import { showQuantity } from "@/lib/domain/units";

/** Decimals that a value without unit gets: a torque margin reads 0.91. */
const RATIO_STEP = 0.01;

/**
 * Two values of one quantity as a person compares them, "51 → 57 °C", with no more digits than tell them apart; the
 * later value alone where the earlier one is not known. `unit` is the inside unit.
 */
export function shownPair(was: number | null, toBe: number, unit: string): string {
  if (was === null) return join(shown(toBe, unit, 3));
  for (const digits of [unit === "" || unit === "°C" ? 2 : 3, 4, 6]) {
    const [one, other] = [shown(was, unit, digits), shown(toBe, unit, digits)];
    if (one.number !== other.number || one.unit !== other.unit)
      return one.unit === other.unit ? `${one.number} → ${join(other)}` : `${join(one)} → ${join(other)}`;
  }
  return join(shown(toBe, unit, 6));
}

interface Shown {
  readonly number: string;
  readonly unit: string;
}

/** At two digits temperatures are whole degrees and ratios have two decimals, whatever their size. */
function shown(value: number, unit: string, digits: number): Shown {
  if (digits === 2 && unit === "°C") return { number: String(Math.round(value)), unit };
  if (digits === 2) return showQuantity(Math.round(value / RATIO_STEP) * RATIO_STEP, unit, 4);
  return showQuantity(value, unit, digits);
}

function join({ number, unit }: Shown): string {
  return unit === "" ? number : `${number} ${unit}`;
}
