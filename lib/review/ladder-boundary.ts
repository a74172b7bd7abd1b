import type { LadderTest } from "@/lib/domain/test-sheets";
import { LADDER_PARAMETERS } from "@/lib/domain/test-sheets";
import { parameterLabel } from "@/lib/domain/parameters";
import { showText } from "@/lib/domain/units";
import { ALLOWED_SHARE_OF_JUMP } from "@/lib/physics/start-stop";
import { missingSentence } from "@/lib/rules/missing-words";
import type { AxisView } from "@/lib/rules/types";

/** Level of a setting at which steps are lost, as predicted. */
export type Boundary =
  | {
      readonly ok: true;
      /** By the careful pull-out formula, unit of the setting. */
      readonly careful: number;
      /** By the largest true pull-out that the formula may stand for; null where it is not bounded. */
      readonly farthest: number | null;
    }
  | { readonly ok: false; readonly why: string };

/**
 * The careful pull-out formula gives 0.74 to 1.00 of the true one, so at a reckoned margin of −0.26 the true torque may
 * still be just enough. Source: simulations of the phase equations, see `conservativePullOut`.
 */
const FARTHEST_MARGIN = 0.74 - 1;

/**
 * Where a ladder is expected to turn: the acceleration or current at which the torque margin is 0; the corner speed
 * that a settled rotor just follows. Values in the unit of the setting in the text.
 */
export function predictedBoundary(view: AxisView, test: LadderTest): Boundary {
  const { parameter, fails } = LADDER_PARAMETERS[test];
  if (test === "corner_ladder") return cornerBoundary(view);
  const set = view.parameter(parameter);
  if (!set || set.value <= 0)
    return { ok: false, why: `Not in the text: ${parameterLabel(parameter).toLowerCase()}.` };
  const margin = view.quantity("torque_margin");
  if (!margin.ok) return { ok: false, why: missingSentence(margin, view.axis) };
  const at = (level: number): number | null => {
    const found = view.withValue(parameter, level).quantity("torque_margin");
    return found.ok ? found.value : null;
  };
  const search = { at, set: set.value, fails };
  const careful = crossing({ ...search, target: 0 });
  if (careful === null) return { ok: false, why: noBoundary(parameter, set.value, set.unit) };
  return { ok: true, careful, farthest: crossing({ ...search, target: FARTHEST_MARGIN }) };
}

function noBoundary(parameter: Parameters<typeof parameterLabel>[0], value: number, unit: string): string {
  return `Between a thousandth and a thousand times the ${parameterLabel(parameter).toLowerCase()} of ${showText(value, unit)} in the text the torque margin does not pass 0: it is not this setting that decides.`;
}

function cornerBoundary(view: AxisView): Boundary {
  const allowed = view.quantity("start_stop_speed");
  if (!allowed.ok) return { ok: false, why: missingSentence(allowed, view.axis) };
  if (allowed.value === 0) return { ok: false, why: "The load torque leaves no speed jump at all." };
  return { ok: true, careful: allowed.value, farthest: allowed.value / ALLOWED_SHARE_OF_JUMP };
}

interface Search {
  readonly at: (level: number) => number | null;
  readonly set: number;
  readonly fails: "above" | "below";
  readonly target: number;
}

/** Share by which the bracket widens, and how often: up to a thousand times the setting. */
const WIDEN = 1.3;
const WIDENINGS = 27;
const HALVINGS = 48;

/** The level at which the margin passes the target; null where it does not near the setting. */
function crossing({ at, set, fails, target }: Search): number | null {
  const harder = fails === "above" ? WIDEN : 1 / WIDEN;
  const enough = (level: number): boolean => (at(level) ?? -Infinity) >= target;
  const failing = widened(set, harder, (level) => !enough(level));
  const safe = widened(set, 1 / harder, enough);
  if (failing === null || safe === null) return null;
  let [good, bad] = [safe, failing];
  for (let halving = 0; halving < HALVINGS; halving += 1) {
    const middle = (good + bad) / 2;
    if (enough(middle)) good = middle;
    else bad = middle;
  }
  return good;
}

function widened(from: number, by: number, found: (level: number) => boolean): number | null {
  let level = from;
  for (let widening = 0; widening <= WIDENINGS; widening += 1, level *= by) if (found(level)) return level;
  return null;
}
