import "server-only";
import type { Role } from "@/lib/domain/roles";
import people from "./demo-people.json";
import { env } from "./env";

export interface DemoSignIn {
  readonly role: Role;
  readonly name: string;
  readonly email: string;
  readonly password: string;
}

/** The sign-ins of the demo fleet; none outside of demo mode. */
export function demoSignIns(): readonly DemoSignIn[] {
  return env().demo ? (people as readonly DemoSignIn[]) : [];
}
