import type { Action } from "@/lib/domain/actions";
import type { Actor } from "@/lib/domain/roles";
import { POLICY_TABLE } from "./table";

export type Verdict = { readonly allowed: true } | { readonly allowed: false; readonly reason: string };

/** What bears on acts upon one change: who wrote it, who edited it last (a token stands for the person who made it). */
export interface ChangeSubject {
  readonly authorId: string | null;
  readonly lastEditorId: string | null;
}

const YES: Verdict = { allowed: true };
const no = (reason: string): Verdict => ({ allowed: false, reason });

/**
 * May this actor do this at all, whatever the object? Null stands for nobody: not signed in. The subject, where
 * given, adds what depends on the object: author and approver differ; only the author takes a proposal back.
 */
export function decide(actor: Actor | null, action: Action, subject?: ChangeSubject): Verdict {
  if (!actor) return no("Sign in first.");
  if (actor.kind === "system") return YES;
  const row = POLICY_TABLE[action];
  if (!row.roles.includes(actor.role)) return no(`The role ${actor.role} may not do this (${action}).`);
  if (actor.kind === "token") {
    if (row.scope === null) return no("A token may not do this: it takes a person who signs in.");
    if (!actor.scopes.includes(row.scope)) return no(`This token lacks the scope ${row.scope}.`);
  }
  return subject ? decideOnChange(actor, action, subject) : YES;
}

function decideOnChange(
  actor: Exclude<Actor, { kind: "system" }>,
  action: Action,
  subject: ChangeSubject,
): Verdict {
  const person = actor.kind === "token" ? actor.ownerId : actor.id;
  const signs = action === "changes.decide" || action === "changes.back_out";
  if (signs && person === subject.authorId)
    return no("You wrote this change: somebody else must decide on it.");
  if (signs && person === subject.lastEditorId)
    return no("You edited this proposal last: somebody else must decide on it.");
  if (action === "changes.take_back" && person !== subject.authorId)
    return no("Only its author takes a proposal back.");
  if (action === "changes.withdraw" && person !== subject.authorId && actor.role !== "approver")
    return no("Only its author or an approver withdraws a change.");
  return YES;
}

/** For showing or hiding an act; the service decides again. */
export function may(actor: Actor | null, action: Action, subject?: ChangeSubject): boolean {
  return decide(actor, action, subject).allowed;
}
