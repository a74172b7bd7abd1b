import type { MergeChoice } from "@/lib/review/merge-types";

/** What is taken, as a person says it: the proposal is `ours`, the text in force `theirs`. */
export function choiceWords(choice: MergeChoice, todayLabel: string): string {
  const words: Readonly<Record<MergeChoice, string>> = {
    ours: "as proposed",
    theirs: `as ${todayLabel} has it`,
    base: "as it was before both",
    both: "both, the proposal's lines first",
  };
  return words[choice];
}
