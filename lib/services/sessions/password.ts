import "server-only";
import { hash, verify } from "@node-rs/argon2";

/** argon2id after OWASP's password storage advice: 19 MiB, 2 passes, 1 lane. */
const OPTIONS = { algorithm: 2, memoryCost: 19_456, timeCost: 2, parallelism: 1 } as const;

export function hashPassword(password: string): Promise<string> {
  return hash(password, OPTIONS);
}

export function passwordMatches(passwordHash: string, password: string): Promise<boolean> {
  return verify(passwordHash, password);
}

/** Burns the time of a real check for an unknown e-mail address, so that both take alike. */
let decoy: Promise<string> | null = null;
export async function spendTime(password: string): Promise<void> {
  decoy ??= hashPassword("no such person, no such password");
  await passwordMatches(await decoy, password);
}
