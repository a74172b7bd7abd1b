import type { Action } from "@/lib/domain/actions";
import type { Role, Scope } from "@/lib/domain/roles";

const EVERYBODY: readonly Role[] = ["viewer", "technician", "engineer", "approver", "admin"];
const TECHNICIAN_UP: readonly Role[] = ["technician", "engineer", "approver"];
const ENGINEER_UP: readonly Role[] = ["engineer", "approver"];
const KEEPERS: readonly Role[] = ["engineer", "approver", "admin"];
const APPROVERS: readonly Role[] = ["approver"];
const ADMINS: readonly Role[] = ["admin"];

export interface PolicyRow {
  readonly roles: readonly Role[];
  /** Scope that lets a token do it; null: only a person may. */
  readonly scope: Scope | null;
}

const row = (roles: readonly Role[], scope: Scope | null): PolicyRow => ({ roles, scope });

/** The one table of who may do what. An admin manages and never signs; a token never signs. */
export const POLICY_TABLE: Readonly<Record<Action, PolicyRow>> = {
  "floor.read": row(EVERYBODY, "read"),
  "machines.read": row(EVERYBODY, "read"),
  "machines.write": row(KEEPERS, null),
  "machines.hardware": row([...TECHNICIAN_UP, "admin"], null),
  "readings.read": row(EVERYBODY, "read"),
  "readings.create": row(TECHNICIAN_UP, "readings"),
  "check.run": row(EVERYBODY, "check"),
  "changes.read": row(EVERYBODY, "read"),
  "changes.create": row(ENGINEER_UP, "propose"),
  "changes.edit": row(ENGINEER_UP, "propose"),
  "changes.comment": row(TECHNICIAN_UP, "propose"),
  "changes.submit": row(ENGINEER_UP, "propose"),
  "changes.take_back": row(ENGINEER_UP, "propose"),
  "changes.decide": row(APPROVERS, null),
  "changes.resume": row(ENGINEER_UP, null),
  "changes.withdraw": row(ENGINEER_UP, null),
  "changes.release": row(ENGINEER_UP, null),
  "changes.back_out": row(APPROVERS, null),
  "verifications.create": row(TECHNICIAN_UP, null),
  "test_sheets.read": row(EVERYBODY, "read"),
  "test_sheets.write": row(TECHNICIAN_UP, null),
  "catalog.read": row(EVERYBODY, "read"),
  "catalog.write": row(KEEPERS, null),
  "models.write": row(KEEPERS, null),
  "key_tables.write": row(KEEPERS, null),
  "checks.read": row(EVERYBODY, "read"),
  "rehearsals.read": row(EVERYBODY, "read"),
  "rehearsals.start": row(ENGINEER_UP, null),
  "record.read": row(EVERYBODY, "read"),
  "sites.write": row(ADMINS, null),
  "policies.read": row(EVERYBODY, "read"),
  "policies.write": row(ADMINS, null),
  "users.read": row(ADMINS, null),
  "users.write": row(ADMINS, null),
  "tokens.read": row(ADMINS, null),
  "tokens.write": row(ADMINS, null),
  "mail.read": row(EVERYBODY, null),
  "account.write": row(EVERYBODY, null),
  "search.read": row(EVERYBODY, "read"),
};
