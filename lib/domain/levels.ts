import { z } from "zod";

/** The four outcomes of a check. A caution or a hint is a `near`; `cannot` is never shown as good. */
export const LEVELS = ["over", "near", "cannot", "within"] as const;
export const levelSchema = z.enum(LEVELS);
export type Level = z.infer<typeof levelSchema>;

export const LEVEL_WORDS: Record<Level, string> = {
  over: "over limit",
  near: "near limit",
  cannot: "cannot check",
  within: "within limits",
};

/** Sort key, gravest first. */
export function levelRank(level: Level): number {
  return LEVELS.indexOf(level);
}

/** The gravest of some levels; `within` for none. */
export function gravest(levels: Iterable<Level>): Level {
  let worst: Level = "within";
  for (const level of levels) if (levelRank(level) < levelRank(worst)) worst = level;
  return worst;
}
