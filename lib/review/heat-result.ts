import {
  HEAT_PLACE_WORDS,
  HEAT_PLACES,
  type HeatPlan,
  type HeatPlace,
  type Trial,
} from "@/lib/domain/test-sheets";
import { formatNumber } from "@/lib/domain/units";
import { temperatureAfter } from "@/lib/physics/evidence/heating";

const HALF_AN_HOUR = 30 * 60;

interface Measured {
  readonly rise: number;
  readonly ambient: number;
  readonly minutes: number | null;
}

/** What the temperatures of a heat record say beside the expected ones, newest of each place; K and °C. */
export function heatSentences(plan: HeatPlan, trials: readonly Trial[]): string[] {
  const measured = trials.some(({ temperatures }) => temperatures.length > 0);
  if (!measured) return ["No temperature is entered yet."];
  return HEAT_PLACES.flatMap((place) => {
    const newest = newestAt(place, trials);
    if (!newest) return [];
    return newest.rise === null
      ? [
          `${name(place)}: ${formatNumber(newest.celsius)} °C; without the ambient it says nothing of the rise.`,
        ]
      : [comparison(plan, place, { rise: newest.rise, ambient: newest.ambient, minutes: newest.minutes })];
  });
}

function newestAt(place: HeatPlace, trials: readonly Trial[]) {
  for (const { temperatures, ambientC, minutes } of [...trials].reverse()) {
    const found = temperatures.find((one) => one.place === place);
    if (!found) continue;
    const ambient = ambientC ?? lastAmbient(trials);
    const { celsius } = found;
    if (ambient === null) return { celsius, rise: null };
    return { celsius, rise: celsius - ambient, ambient, minutes };
  }
  return null;
}

function lastAmbient(trials: readonly Trial[]): number | null {
  return trials.findLast(({ ambientC }) => ambientC !== null)?.ambientC ?? null;
}

function comparison({ expected }: HeatPlan, place: HeatPlace, { rise, ambient, minutes }: Measured): string {
  const when = minutes === null ? "" : ` after ${formatNumber(minutes)} min`;
  const head = `${name(place)}: ${formatNumber(rise)} K above ${formatNumber(ambient)} °C${when}`;
  const own = expected.find((one) => one.place === place);
  if (!own) return `${head}; nothing is predicted for this place.`;
  const due = expectedAt(own, minutes);
  const words = due.settled
    ? `${formatNumber(due.rise)} K expected once settled`
    : `${formatNumber(due.rise)} K expected by then, ${formatNumber(own.settledRise)} K once settled`;
  const apart = rise - due.rise;
  const side = apart > 0 ? "hotter" : "cooler";
  return Math.abs(apart) <= own.tolerance
    ? `${head}; ${words}: within ${formatNumber(own.tolerance)} K.`
    : `${head}; ${words}: ${formatNumber(Math.abs(apart))} K ${side}, more than the ${formatNumber(own.tolerance)} K of its tolerance. Check current, sense resistor and airflow before anything is changed.`;
}

/** The rise expected after a time; the settled one where the time or the time constant is not known. */
function expectedAt({ settledRise, riseAfter30 }: HeatPlan["expected"][number], minutes: number | null) {
  if (minutes === null || riseAfter30 === null || settledRise <= 0)
    return { rise: settledRise, settled: true };
  const timeConstant = -HALF_AN_HOUR / Math.log1p(-riseAfter30 / settledRise);
  const rise = temperatureAfter({ start: 0, settled: settledRise, time: minutes * 60, timeConstant });
  return { rise, settled: false };
}

function name(place: HeatPlace): string {
  const words = HEAT_PLACE_WORDS[place];
  return `${words.charAt(0).toUpperCase()}${words.slice(1)}`;
}
