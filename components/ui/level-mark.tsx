import type { ReactNode } from "react";
import { LEVEL_WORDS, type Level } from "@/lib/domain/levels";

export interface LevelMarkProps {
  readonly level: Level;
  /** The word beside the mark; without it the mark carries the word as its text alternative. */
  readonly word?: boolean | undefined;
}

const SHAPES: Record<Level, ReactNode> = {
  over: <rect x="1" y="1" width="10" height="10" fill="currentColor" stroke="currentColor" />,
  near: (
    <>
      <rect x="1" y="1" width="10" height="10" fill="none" stroke="currentColor" strokeWidth="1.3" />
      <rect x="1" y="1" width="5" height="10" fill="currentColor" />
    </>
  ),
  within: <rect x="1" y="1" width="10" height="10" fill="none" stroke="currentColor" strokeWidth="1.3" />,
  cannot: (
    <>
      <rect x="1" y="1" width="10" height="10" fill="none" stroke="currentColor" />
      <path d="M1 5 5 1M1 9 9 1M3 11l8-8M7 11l4-4" stroke="currentColor" strokeWidth="0.9" />
    </>
  ),
};

/** Over: solid square; near: half-filled; within: outlined; cannot check: hatched. Shape and word, never colour alone. */
export function LevelMark({ level, word = true }: LevelMarkProps) {
  const spoken = word ? { "aria-hidden": true } : { role: "img", "aria-label": LEVEL_WORDS[level] };
  return (
    <span className={`level level-${level}`}>
      <svg width="12" height="12" viewBox="0 0 12 12" {...spoken}>
        {SHAPES[level]}
      </svg>
      {word && <span className="level-word">{LEVEL_WORDS[level]}</span>}
    </span>
  );
}
