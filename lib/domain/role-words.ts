import type { Role, Scope } from "./roles";

/** What a role comes to the desk for. */
export const ROLE_WORDS: Record<Role, string> = {
  viewer: "sees everything, changes nothing",
  technician: "records what machines run, puts approved texts onto them and proves them",
  engineer: "proposes changes and keeps the catalog, besides what a technician does",
  approver: "decides on changes, besides what an engineer does",
  admin: "manages people, sites, policy and tokens, and never signs",
};

/** What a token may do within a scope. */
export const SCOPE_WORDS: Record<Scope, string> = {
  check: "check a text without keeping it",
  read: "read what the desk shows",
  readings: "report what a machine runs",
  propose: "draft, edit, comment on and submit changes",
};
