import { z } from "zod";

export const ROLES = ["viewer", "technician", "engineer", "approver", "admin"] as const;
export const roleSchema = z.enum(ROLES);
export type Role = z.infer<typeof roleSchema>;

export const SCOPES = ["check", "read", "readings", "propose"] as const;
export const scopeSchema = z.enum(SCOPES);
export type Scope = z.infer<typeof scopeSchema>;

/** Who acts. A token has its role's rights cut to its scopes and never signs; jobs act as the system. */
export type Actor =
  | {
      readonly kind: "person";
      readonly id: string;
      readonly name: string;
      readonly role: Role;
      readonly sessionId: string;
    }
  | {
      readonly kind: "token";
      readonly id: string;
      readonly name: string;
      readonly role: Role;
      readonly scopes: readonly Scope[];
      /** The person who made the token; whoever proposes through it counts as the author. */
      readonly ownerId: string;
    }
  | { readonly kind: "system"; readonly id: null; readonly name: string };

export const SYSTEM: Actor = { kind: "system", id: null, name: "system" };
