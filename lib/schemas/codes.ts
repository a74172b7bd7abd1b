import { z } from "zod";

/** The short name that stands on drawings and labels. */
export const codeSchema = z
  .string()
  .trim()
  .regex(
    /^[A-Za-z0-9][A-Za-z0-9._-]{1,39}$/,
    "A code has 2 to 40 letters, digits, dots, hyphens or underscores, and starts with a letter or a digit.",
  );

export const nameSchema = z
  .string()
  .trim()
  .min(1, "Give it a name.")
  .max(200, "A name has 200 characters at most.");

/** Why something is done; kept in the record. */
export const reasonSchema = z
  .string()
  .trim()
  .min(3, "Say why, in a few words.")
  .max(1000, "A reason has 1000 characters at most.");

/** An instant as answered: always UTC. */
export const answeredInstant = z.string();

/** Where data come from. */
export const evidenceSchema = z
  .string()
  .trim()
  .min(3, "Say where this comes from: who read or measured it, where and when.")
  .max(1000, "The evidence has 1000 characters at most.");

/** Takes out of use, or (false) back into use. */
export const retireSchema = z.object({ retired: z.boolean().default(true) });
