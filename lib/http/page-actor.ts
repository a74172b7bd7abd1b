import "server-only";
import { notFound, redirect } from "next/navigation";
import { headers } from "next/headers";
import type { Action } from "@/lib/domain/actions";
import type { Actor } from "@/lib/domain/roles";
import { decide } from "@/lib/policies/decide";
import { now } from "@/lib/server/clock";
import type { Context } from "@/lib/services/kernel/context";
import { ServiceError } from "@/lib/services/kernel/errors";
import { cookieActor } from "./actor";

export type Person = Extract<Actor, { kind: "person" }>;

export interface PageContext extends Context {
  readonly actor: Person;
}

/** Asks lib/policies whether the person of the cookie may see this page; nobody is sent to sign in and comes back. */
export async function pageActor(action: Action): Promise<PageContext> {
  const actor = await cookieActor();
  if (actor?.kind !== "person") {
    const path = (await headers()).get("x-keepstep-path") ?? "/floor";
    redirect(`/sign-in?next=${encodeURIComponent(path)}`);
  }
  const verdict = decide(actor, action);
  if (!verdict.allowed) redirect(`/not-allowed?why=${encodeURIComponent(action)}`);
  return { actor, now: now() };
}

/** Loads for a page; an object that does not exist is the page “not found”. */
export async function load<T>(work: Promise<T>): Promise<T> {
  try {
    return await work;
  } catch (error) {
    if (error instanceof ServiceError && error.code === "not_found") notFound();
    throw error;
  }
}
