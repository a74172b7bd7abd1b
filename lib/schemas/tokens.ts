import { z } from "zod";
import { roleSchema, scopeSchema, SCOPES } from "@/lib/domain/roles";
import { answeredInstant, nameSchema } from "./codes";

export const TOKEN_DAYS_MAX = 366;

export const createTokenSchema = z.object({
  name: nameSchema,
  role: roleSchema,
  /** What the role cannot do is cut off; missing: all that the role can do. */
  scopes: z.array(scopeSchema).min(1, "Choose at least one scope.").max(SCOPES.length).optional(),
  days: z
    .number("Say for how many days.")
    .int("Whole days.")
    .min(1, "At least 1 day.")
    .max(TOKEN_DAYS_MAX, `At most ${TOKEN_DAYS_MAX} days.`)
    .default(90),
});
export type CreateToken = z.input<typeof createTokenSchema>;

export const tokenQuery = z.object({
  /** `standing`: neither revoked nor expired. */
  state: z.enum(["standing", "all"]).default("all"),
});
export type TokenQuery = z.infer<typeof tokenQuery>;

export const tokenViewSchema = z.object({
  id: z.uuid(),
  name: z.string(),
  role: roleSchema,
  scopes: z.array(scopeSchema),
  /** The token's last four characters. */
  hint: z.string(),
  ownerId: z.uuid(),
  ownerName: z.string(),
  createdAt: answeredInstant,
  expiresAt: answeredInstant,
  revokedAt: answeredInstant.nullable(),
  lastUsedAt: answeredInstant.nullable(),
  state: z.enum(["standing", "revoked", "expired", "owner left"]),
});
export type TokenView = z.infer<typeof tokenViewSchema>;
export const tokenListSchema = z.object({ items: z.array(tokenViewSchema) });
export type TokenList = z.infer<typeof tokenListSchema>;

export const newTokenSchema = tokenViewSchema.extend({
  /** Shown this once; only its hash is kept. */
  token: z.string(),
});
export type NewToken = z.infer<typeof newTokenSchema>;
