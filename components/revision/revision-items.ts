import { openStretch, type OutlineStretch } from "@/lib/diff/outline";
import type { RevisionLine } from "@/lib/diff/types";

/** What a long revision lists: lines, and breaks in the place of closed stretches. */
export type RevisionItem =
  | { readonly kind: "line"; readonly line: RevisionLine }
  | { readonly kind: "break"; readonly stretch: number; readonly count: number };

interface ListOptions {
  /** Closed stretches that were opened, by index. */
  readonly opened: ReadonlySet<number>;
  /** Lines to leave out. */
  readonly folded: (line: RevisionLine) => boolean;
  /** Lines of the new text; asked for once something is opened. */
  readonly toBe: () => readonly string[];
}

/** The rows of a long revision, as opened and folded. */
export function revisionItems(
  stretches: readonly OutlineStretch[],
  { opened, folded, toBe }: ListOptions,
): RevisionItem[] {
  const items: RevisionItem[] = [];
  stretches.forEach((stretch, index) => {
    if (stretch.closed && !opened.has(index))
      items.push({ kind: "break", stretch: index, count: stretch.count });
    else
      for (const line of stretch.closed ? openStretch(stretch, toBe()) : stretch.lines)
        if (!folded(line)) items.push({ kind: "line", line });
  });
  return items;
}
