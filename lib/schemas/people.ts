import { z } from "zod";
import { PASSWORD_MAX, PASSWORD_MIN } from "@/lib/domain/password";
import { roleSchema } from "@/lib/domain/roles";
import { answeredInstant, nameSchema, reasonSchema } from "./codes";
import { paged, pageQuery } from "./common";

const emailSchema = z
  .string()
  .trim()
  .toLowerCase()
  .pipe(z.email("This is not an e-mail address.").max(200, "An e-mail address has 200 characters at most."));

/** Length alone; what else makes a password is said by lib/domain/password, which knows whose it is. */
const newPasswordSchema = z
  .string()
  .min(PASSWORD_MIN, `A password has at least ${PASSWORD_MIN} characters.`)
  .max(PASSWORD_MAX, `A password has at most ${PASSWORD_MAX} characters.`);

const siteIdSchema = z.uuid("Choose a site.").nullable();

export const createUserSchema = z.object({
  email: emailSchema,
  name: nameSchema,
  role: roleSchema,
  /** Where a technician works; null: at every site. */
  siteId: siteIdSchema.default(null),
  password: newPasswordSchema,
});
export type CreateUser = z.infer<typeof createUserSchema>;

export const updateUserSchema = z.object({
  email: emailSchema,
  name: nameSchema,
  role: roleSchema,
  siteId: siteIdSchema,
});
export type UpdateUser = z.infer<typeof updateUserSchema>;

/** Shuts a person out, or (false) lets them in again. */
export const deactivateSchema = z.object({ deactivated: z.boolean().default(true), reason: reasonSchema });
export type Deactivate = z.infer<typeof deactivateSchema>;

export const resetPasswordSchema = z.object({ password: newPasswordSchema, reason: reasonSchema });
export type ResetPassword = z.infer<typeof resetPasswordSchema>;

export const changePasswordSchema = z.object({
  currentPassword: z.string().min(1, "Type the password you have now.").max(PASSWORD_MAX),
  password: newPasswordSchema,
});
export type ChangePassword = z.infer<typeof changePasswordSchema>;

export const userQuery = pageQuery.extend({
  /** Part of a name or an e-mail address. */
  q: z.string().trim().max(200).optional(),
  active: z.enum(["yes", "no", "all"]).default("all"),
});
export type UserQuery = z.infer<typeof userQuery>;

export const userViewSchema = z.object({
  id: z.uuid(),
  email: z.string(),
  name: z.string(),
  role: roleSchema,
  active: z.boolean(),
  siteId: z.uuid().nullable(),
  createdAt: answeredInstant,
  /** Sessions that are open at this moment. */
  openSessions: z.number(),
  lastSignInAt: answeredInstant.nullable(),
});
export type UserView = z.infer<typeof userViewSchema>;
export const userPageSchema = paged(userViewSchema);
export type UserPage = z.infer<typeof userPageSchema>;

export const accountViewSchema = z.object({
  id: z.uuid(),
  name: z.string(),
  email: z.string(),
  role: roleSchema,
  siteId: z.uuid().nullable(),
  siteName: z.string().nullable(),
});
export type AccountView = z.infer<typeof accountViewSchema>;

export const endedSessionsSchema = z.object({ endedSessions: z.number() });
export type EndedSessions = z.infer<typeof endedSessionsSchema>;
