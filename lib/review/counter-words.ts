import { joinWords } from "@/lib/domain/sentences";
import { formatNumber } from "@/lib/domain/units";
import { ruleTitle } from "@/lib/rules/titles";
import type { CheckPlace, Conflict } from "@/lib/solve/types";
import type { CounterEdit } from "./counter-proposal";
import { onAxis } from "./axis-word";

/** "X torque margin", "Bus voltage after braking". */
export function checkWords({ ruleId, axis }: CheckPlace): string {
  const title = ruleTitle(ruleId);
  return onAxis(axis, `${title[0]?.toLowerCase() ?? ""}${title.slice(1)}`);
}

/** Why a conflict cannot be solved by values, in one sentence. */
export function conflictSentence({ checks }: Conflict, leastShare: number): string {
  const names = joinWords(checks.map(checkWords));
  const reach = `values down to ${formatNumber(leastShare * 100, 3)}\u00a0% of the present ones and currents up to their ratings`;
  return checks.length === 1
    ? `${names}: no value of the text clears it (tried: ${reach}). It takes other hardware, or another key.`
    : `${names} contradict each other: whatever clears one is over limit for another (tried: ${reach}).`;
}

/** What a counter-proposal comes to, in one sentence. */
export function counterSentence({ moves, cleared, left, conflicts }: CounterEdit): string {
  if (moves.length === 0 && left.length === 0) return "Nothing is over limit; there is nothing to clear.";
  if (moves.length === 0)
    return conflicts.length > 0
      ? "No change of values clears these findings."
      : "No change of values that the text can hold was found that clears these findings.";
  const clears = `clears ${cleared.length === 1 ? "the finding" : `${cleared.length} findings`} over limit`;
  return left.length === 0
    ? `The smallest change that ${clears}.`
    : `The smallest change that ${clears}; ${left.length} stay over limit and get no graver.`;
}
