import { createChange } from "../../lib/services/changes/create";
import { decideChange } from "../../lib/services/changes/decide";
import type { ChangeBrief } from "../../lib/services/changes/load";
import { releaseChange } from "../../lib/services/changes/release";
import { showChange } from "../../lib/services/changes/show";
import { submitChange } from "../../lib/services/changes/submit";
import { downloadForMachine } from "../../lib/services/implementation/download";
import { recordVerification } from "../../lib/services/implementation/verify";
import type { Context } from "../../lib/services/kernel/context";
import { createReading } from "../../lib/services/readings/create";
import type { Decision } from "../../lib/domain/changes";
import { at, type DemoPeople } from "./people";

export interface Walk {
  readonly people: DemoPeople;
  readonly now: Date;
}

export type Draft = Omit<Parameters<typeof createChange>[1], "note">;

/** Drafts a change on a day before now. */
export function draft({ people, now }: Walk, daysAgo: number, change: Draft): Promise<ChangeBrief> {
  return createChange(at(people.engineer.actor, now, daysAgo), { ...change, note: "" });
}

export async function submit({ people, now }: Walk, daysAgo: number, id: string): Promise<void> {
  await submitChange(at(people.engineer.actor, now, daysAgo, 5), { id, reason: "", ifMatch: null });
}

interface Decided {
  readonly id: string;
  readonly decision: Exclude<Decision, "backed_out">;
  readonly reason?: string;
}

export async function decide({ people, now }: Walk, daysAgo: number, decided: Decided): Promise<void> {
  const context = at(people.approver.actor, now, daysAgo, 40);
  const { proposal, evaluation } = await showChange(context, decided.id);
  const why = "Accepted for these machines after a test on one of them; watched at the next service.";
  await decideChange(context, {
    id: decided.id,
    ifMatch: null,
    request: {
      decision: decided.decision,
      reason: decided.reason ?? "",
      proposalVersion: proposal.version,
      signedContentHash: proposal.signedContentHash,
      password: people.approver.password,
      justifications: Object.fromEntries(evaluation.overKeys.map(({ key }) => [key, why])),
    },
  });
}

export async function release({ people, now }: Walk, daysAgo: number, id: string): Promise<void> {
  await releaseChange(at(people.engineer.actor, now, daysAgo, 60), { id, reason: "", ifMatch: null });
}

interface Read {
  readonly machine: { readonly id: string; readonly serial: string };
  readonly layer: "file" | "stored";
  readonly kind: "as_left" | "in_service";
  readonly path: string;
  readonly text: string;
}

/** A reading of a machine, at the context's time. */
export async function read(context: Context, { machine, layer, kind, path, text }: Read): Promise<void> {
  await createReading(context, {
    machineId: machine.id,
    kind,
    layer,
    readAt: context.now.toISOString(),
    serial: machine.serial,
    firmwareVersion: "2.4",
    files: [{ path, text }],
    note: "",
    idempotencyKey: null,
  });
}

interface Proof {
  readonly changeId: string;
  readonly machine: Read["machine"];
  readonly stored: string;
  /** Only the download and the read-back; the test is still to come. */
  readonly untested?: boolean;
}

/** A technician puts a released text onto a machine and proves it. */
export async function prove({ people, now }: Walk, daysAgo: number, proof: Proof): Promise<void> {
  const { changeId, machine, stored, untested } = proof;
  const when = (minutes: number) => at(people.technician.actor, now, daysAgo, minutes);
  await downloadForMachine(when(90), { changeId, machineId: machine.id });
  await read(when(100), {
    machine,
    layer: "stored",
    kind: "as_left",
    path: "stored-values.txt",
    text: stored,
  });
  if (untested) return;
  const request = {
    machineId: machine.id,
    tested: "Out and back to the reference ten times at full speed; the step count agreed each time.",
    result: "pass" as const,
    ambientC: 24,
    temperatures: [{ axis: "x", place: "case" as const, celsius: 49 }].filter(() =>
      stored.includes("X_AMPS"),
    ),
    note: "",
    statement: null,
    attachments: [],
  };
  await recordVerification(when(130), { changeId, request, idempotencyKey: null });
}
