import "server-only";
import type { Assembly } from "@/lib/domain/assembly";
import type { RehearsalQuestion, RehearsedMachine } from "@/lib/domain/rehearsals";
import { notRehearsed, rehearse, warmer } from "@/lib/review/rehearse";
import { resolveAssembly } from "@/lib/review/resolve-assembly";
import { swapPart } from "@/lib/review/swap-part";
import { currentKeyTable } from "@/lib/services/key-tables/current";
import { machineParts, type MachineParts } from "@/lib/services/machines/assembly";
import { requiredConfiguration } from "@/lib/services/machines/required";
import type { Rehearsal } from "@/models/rehearsals";

const NO_BASELINE = "No baseline has been released to it yet, so there is nothing to rehearse.";

interface Rehearsed {
  readonly toBe: Assembly;
  readonly axes: readonly string[];
  readonly room: "today" | "to_be";
}

/** What a rehearsal comes to on one machine: what it is required to run at this moment, on its own hardware. */
export async function rehearsalOutcome(
  { question, policy }: Pick<Rehearsal, "question" | "policy">,
  machineId: string,
  asOf: Date,
): Promise<RehearsedMachine> {
  const alsoItems = question.kind === "part_swap" ? [question.itemId] : [];
  const parts = await machineParts(machineId, { alsoItems });
  const { assembly } = resolveAssembly(parts.input);
  const rehearsed = rehearsedHardware(question, parts, assembly);
  if (rehearsed === null)
    return notRehearsed(
      `It carries no such ${question.kind === "part_swap" ? question.part : "part"}.`,
      false,
    );
  const { table: keyTable } = await currentKeyTable(parts.machine.modelId);
  const required = await requiredConfiguration({ machineId, asOf, keyTable, assembly });
  if (!required) return notRehearsed(NO_BASELINE, true);
  return rehearse({ today: { files: required.files, keyTable, assembly, policy }, ...rehearsed });
}

/** Null where the machine does not carry what is to be swapped. */
function rehearsedHardware(
  question: RehearsalQuestion,
  { input }: MachineParts,
  assembly: Assembly,
): Rehearsed | null {
  if (question.kind === "warm_day")
    return { toBe: warmer(assembly, question.riseK), axes: [], room: "today" };
  const { axes, ...swapped } = swapPart(input, question);
  if (axes.length === 0) return null;
  // What was measured on a motor that leaves says nothing of the one that comes.
  const refined = input.refined?.filter(({ axis }) => question.part !== "motor" || !axes.includes(axis));
  return { toBe: resolveAssembly({ ...input, ...swapped, refined }).assembly, axes, room: "to_be" };
}
