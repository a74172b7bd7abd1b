import { findingKey } from "@/lib/domain/findings";
import { findingSubject } from "@/lib/review/finding-words";
import type { FindingComparison } from "@/lib/review/types";
import { LevelMark } from "@/components/ui/level-mark";

export interface ClearedFindingsProps {
  readonly cleared: FindingComparison["cleared"];
}

/** Findings that a change clears: the sentence before, struck, and the level it has now. */
export function ClearedFindings({ cleared }: ClearedFindingsProps) {
  if (cleared.length === 0) return null;
  return (
    <ul className="cleared" aria-label="Cleared findings">
      {cleared.map(({ was, toBe }) => (
        <li key={findingKey(was)}>
          <span className="cleared-levels">
            <LevelMark level={was.level} word={false} />
            <span aria-hidden="true">→</span>
            <span className="visually-hidden">, now </span>
            <LevelMark level={toBe?.level ?? "within"} />
          </span>
          {findingSubject(was)}: <del>{was.sentence}</del>
          {toBe && <span> {toBe.sentence}</span>}
        </li>
      ))}
    </ul>
  );
}
