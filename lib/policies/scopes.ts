import type { Role, Scope } from "@/lib/domain/roles";
import { SCOPES } from "@/lib/domain/roles";
import { POLICY_TABLE } from "./table";

/** The scopes in which a role may do anything at all. */
export function scopesOf(role: Role): Scope[] {
  const rows = Object.values(POLICY_TABLE);
  return SCOPES.filter((scope) => rows.some((row) => row.scope === scope && row.roles.includes(role)));
}
