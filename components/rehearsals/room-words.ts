import type { HottestRoom } from "@/lib/domain/rehearsals";
import { needWords } from "@/lib/domain/need-words";
import { joinWords } from "@/lib/domain/sentences";
import { axisWord } from "@/lib/review/axis-word";
import { ruleTitle } from "@/lib/rules/titles";

type Check = HottestRoom["alwaysOver"][number];

/** "X mount temperature" */
export function checkWords({ ruleId, axis }: Check): string {
  const title = ruleTitle(ruleId);
  const lower = `${title.charAt(0).toLowerCase()}${title.slice(1)}`;
  return axis === null ? lower : `${axisWord(axis)} ${lower}`;
}

/** What limits the room, and what does not for it is over limit anyway; sentences. */
export function roomNotes({ kind, limitedBy, alwaysOver }: HottestRoom): string[] {
  const notes: string[] = [];
  if (limitedBy) notes.push(`Limited by ${checkWords(limitedBy)}.`);
  if (kind === "any") notes.push("No check limits it up to there.");
  if (alwaysOver.length > 0) notes.push(`Over limit in any room: ${joinWords(alwaysOver.map(checkWords))}.`);
  return notes;
}

/** The data that checks of heat lacked; null where they lacked none. */
export function roomLack({ needs }: HottestRoom): string | null {
  return needs.length === 0 ? null : `Missing: ${joinWords(needs.map((path) => needWords(path).words))}.`;
}
