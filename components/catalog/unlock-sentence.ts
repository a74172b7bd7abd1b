import { joinWords } from "@/lib/domain/sentences";
import { unlockedBy } from "@/lib/rules/unlocks";
import type { FieldSubject } from "./field-groups";

const SHOWN_TITLES = 5;

/** What an empty field keeps from being checked. */
export function unlockSentence(titles: readonly string[]): string | null {
  if (titles.length === 0) return null;
  const more = titles.length - SHOWN_TITLES;
  const shown = titles.slice(0, SHOWN_TITLES);
  const words = more > 0 ? [...shown, `${more} more`] : shown;
  return `Empty. Would unlock: ${joinWords(words)}.`;
}

/** Titles of the checks that can use a field of a form. */
export function unlocksOf(subject: FieldSubject, path: string): string[] {
  return subject === "sense_resistor" ? unlockedBy("driver", `set_point.${path}`) : unlockedBy(subject, path);
}
