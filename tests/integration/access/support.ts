import { pathToFileURL } from "node:url";
import type { Actor, Role, Scope } from "@/lib/domain/roles";
import { ROLES, SCOPES } from "@/lib/domain/roles";
import type { Method, Operation } from "@/lib/schemas/operation";
import { filesNamed } from "@/tests/support/files";
import { person } from "@/tests/support/world";

export type Handler = ((
  request: Request,
  given: { params: Promise<Record<string, string>> },
) => Promise<Response>) & { readonly operation: Operation };

export interface Door {
  readonly method: Method;
  /** As operations write it: "/machines/{id}". */
  readonly path: string;
  readonly handler: Handler;
}

const METHODS: readonly string[] = ["GET", "POST", "PUT", "PATCH", "DELETE", "HEAD", "OPTIONS"];

function pathOf(file: string): string {
  const inside = file.slice("app/api/v1".length, -"/route.ts".length);
  return inside.replaceAll(/\[(\w+)\]/g, "{$1}");
}

/** Every exported method of every route file of the API. */
export async function allDoors(): Promise<Door[]> {
  const doors: Door[] = [];
  for (const file of filesNamed("app/api/v1", "route.ts")) {
    const exported = (await import(pathToFileURL(file).href)) as Record<string, Handler>;
    for (const [method, handler] of Object.entries(exported))
      if (METHODS.includes(method)) doors.push({ method: method as Method, path: pathOf(file), handler });
  }
  return doors;
}

export interface Caller {
  readonly name: string;
  readonly actor: Actor | null;
}

/** Nobody, a person of each role, and a token of each role with each scope alone. */
export async function allCallers(): Promise<Caller[]> {
  const people = await Promise.all(
    ROLES.map(async (role) => ({ name: role, actor: (await person(role)).actor })),
  );
  const tokens = people.flatMap(({ name, actor }) =>
    SCOPES.map((scope) => ({ name: `token of ${name} for ${scope}`, actor: tokenOf(actor.id, name, scope) })),
  );
  return [{ name: "nobody", actor: null }, ...people, ...tokens];
}

function tokenOf(ownerId: string, role: Role, scope: Scope): Actor {
  return { kind: "token", id: crypto.randomUUID(), name: "a token", role, scopes: [scope], ownerId };
}
