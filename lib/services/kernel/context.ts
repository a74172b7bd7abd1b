import "server-only";
import "@/models/associations";
import type { Transaction } from "sequelize";
import type { Action } from "@/lib/domain/actions";
import type { Actor } from "@/lib/domain/roles";
import type { ChangeSubject } from "@/lib/policies/decide";
import { decide } from "@/lib/policies/decide";
import { ServiceError } from "./errors";

/** Who asks, and when. Every service takes one. */
export interface Context {
  readonly actor: Actor;
  readonly now: Date;
}

/** A context inside a transaction; `afterCommit` is for what may only happen once the act is on the record. */
export interface Tx extends Context {
  readonly transaction: Transaction;
  readonly afterCommit: (act: () => Promise<void> | void) => void;
}

/** Throws `forbidden` with the policy's reason. */
export function authorize(context: Context, action: Action, subject?: ChangeSubject): void {
  const verdict = decide(context.actor, action, subject);
  if (!verdict.allowed) throw new ServiceError("forbidden", verdict.reason);
}

/** The person behind an actor: a token stands for whoever made it; the system for nobody. */
export function personBehind(actor: Actor): string | null {
  if (actor.kind === "person") return actor.id;
  return actor.kind === "token" ? actor.ownerId : null;
}

/** Narrows to a signed-in person, for acts that are signed. */
export function requirePerson(context: Context): Extract<Actor, { kind: "person" }> {
  if (context.actor.kind !== "person")
    throw new ServiceError("forbidden", "This takes a person who signs in.");
  return context.actor;
}
