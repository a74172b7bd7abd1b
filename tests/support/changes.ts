import type { Role } from "@/lib/domain/roles";
import { createChange } from "@/lib/services/changes/create";
import { decideChange } from "@/lib/services/changes/decide";
import type { ChangeBrief } from "@/lib/services/changes/load";
import { releaseChange } from "@/lib/services/changes/release";
import { showChange } from "@/lib/services/changes/show";
import { submitChange } from "@/lib/services/changes/submit";
import { createReading } from "@/lib/services/readings/create";
import { hashPassword } from "@/lib/services/sessions/password";
import { User } from "@/models/people";
import type { TestModel, TestPerson } from "./world";
import { machine, model, person, site } from "./world";

export const PASSWORD = "a long enough password";

/** Somebody who can sign: with a password that is checked for real. */
export async function signer(role: Role): Promise<TestPerson> {
  const someone = await person(role);
  await User.update({ passwordHash: await hashPassword(PASSWORD) }, { where: { id: someone.actor.id } });
  return someone;
}

/** The same person at a later moment, in seconds. */
export function later<P extends TestPerson>(who: P, seconds: number): P {
  return { ...who, now: new Date(who.now.getTime() + seconds * 1000) };
}

export function textOf({ current = 800, speed = 200, accel = 3000, note = "" } = {}): string {
  const axis = (name: string) => [
    `[axis.${name}]`,
    `run_ma = ${current}   # per winding`,
    "hold_ma = 400",
    "microsteps = 16",
    "steps_mm = 80",
    `speed = ${speed}`,
    `accel = ${accel}`,
  ];
  return `# test text ${note}\n${[...axis("x"), "", ...axis("y")].join("\n")}\n`;
}

export const file = (text: string) => [{ path: "motion.conf", text }];

export interface Floor {
  readonly engineer: TestPerson;
  readonly approver: TestPerson;
  readonly technician: TestPerson;
  readonly model: TestModel;
  readonly siteId: string;
  readonly machines: readonly { readonly id: string; readonly serial: string }[];
}

/** A model with machines and nobody's baseline yet. */
export async function floor(count = 2): Promise<Floor> {
  const [engineer, approver, technician] = [
    await signer("engineer"),
    await signer("approver"),
    await signer("technician"),
  ];
  const made = await model(engineer);
  const hall = await site(30);
  const machines = [];
  for (let n = 0; n < count; n += 1)
    machines.push(await machine(engineer, { modelId: made.id, siteId: hall.id }));
  return { engineer, approver, technician, model: made, siteId: hall.id, machines };
}

export function draft(
  world: Floor,
  text: string,
  more: Partial<Parameters<typeof createChange>[1]> = {},
): Promise<ChangeBrief> {
  return createChange(world.engineer, {
    modelId: world.model.id,
    title: "Other values",
    reason: "The test asks for them.",
    class: "II",
    note: "",
    files: file(text),
    ...more,
  });
}

export function act(id: string, reason = "") {
  return { id, reason, ifMatch: null };
}

export async function approvalOf(world: Floor, id: string, justify = false) {
  const view = await showChange(world.approver, id);
  const why = "Accepted for this test with eyes open.";
  return {
    decision: "approved" as const,
    proposalVersion: view.proposal.version,
    signedContentHash: view.proposal.signedContentHash,
    password: PASSWORD,
    reason: "",
    justifications: justify ? Object.fromEntries(view.evaluation.overKeys.map(({ key }) => [key, why])) : {},
  };
}

/** Submitted and approved. */
export async function approve(world: Floor, id: string): Promise<ChangeBrief> {
  await submitChange(world.engineer, act(id));
  return decideChange(world.approver, { id, request: await approvalOf(world, id, true), ifMatch: null });
}

/** The whole way to the machines: a first baseline, released to all of them. */
export async function baseline(world: Floor, text: string): Promise<ChangeBrief> {
  const change = await draft(world, text);
  await approve(world, change.id);
  return releaseChange(world.engineer, act(change.id));
}

export function read(
  who: TestPerson,
  input: {
    id: string;
    serial: string;
    text: string;
    layer?: "file" | "stored" | "running";
    kind?: "as_found" | "as_left" | "in_service";
  },
) {
  return createReading(who, {
    machineId: input.id,
    kind: input.kind ?? "as_left",
    layer: input.layer ?? "stored",
    readAt: who.now.toISOString(),
    serial: input.serial,
    files: file(input.text),
    note: "",
    idempotencyKey: null,
  });
}
