import { z } from "zod";

export const CHANGE_STATES = [
  "draft",
  "evaluation",
  "approved",
  "implementation",
  "verified",
  "declined",
  "deferred",
  "withdrawn",
  "superseded",
  "backed_out",
] as const;
export const changeStateSchema = z.enum(CHANGE_STATES);
export type ChangeState = z.infer<typeof changeStateSchema>;

export const CHANGE_STATE_WORDS: Record<ChangeState, string> = {
  draft: "draft",
  evaluation: "in evaluation",
  approved: "approved",
  implementation: "in implementation",
  verified: "verified",
  declined: "declined",
  deferred: "deferred",
  withdrawn: "withdrawn",
  superseded: "superseded",
  backed_out: "backed out",
};

/** The only moves there are. */
const MOVES: Record<ChangeState, readonly ChangeState[]> = {
  draft: ["evaluation", "withdrawn"],
  evaluation: ["approved", "declined", "deferred", "draft", "withdrawn"],
  deferred: ["evaluation"],
  approved: ["implementation", "evaluation", "withdrawn", "superseded", "backed_out"],
  implementation: ["verified", "superseded", "backed_out"],
  verified: [],
  declined: [],
  withdrawn: [],
  superseded: [],
  backed_out: [],
};

export function mayMove(from: ChangeState, to: ChangeState): boolean {
  return MOVES[from].includes(to);
}

export const CHANGE_CLASSES = ["I", "II"] as const;
export const changeClassSchema = z.enum(CHANGE_CLASSES);
export type ChangeClass = z.infer<typeof changeClassSchema>;

export const CHANGE_CLASS_WORDS: Record<ChangeClass, string> = {
  I: "class I: touches fit, function or safety limits",
  II: "class II: touches none of them",
};
