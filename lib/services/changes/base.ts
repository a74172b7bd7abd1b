import "server-only";
import type { Transaction } from "sequelize";
import type { ChangeKind } from "@/lib/domain/changes";
import { currentBaseline } from "@/lib/services/machines/baselines";
import { machineAssembly } from "@/lib/services/machines/assembly";
import { requiredConfiguration } from "@/lib/services/machines/required";
import { currentKeyTable } from "@/lib/services/key-tables/current";
import { ServiceError } from "@/lib/services/kernel/errors";
import type { StoredFile } from "@/lib/services/revisions/files";
import { contentHash } from "@/lib/services/revisions/files";
import { loadFiles } from "@/lib/services/revisions/load";

/** What a proposal starts from. */
export interface ProposalBase {
  readonly label: string;
  readonly baselineId: string | null;
  /** The baseline's own revision; null where the text is put together from a baseline and deviations. */
  readonly revisionId: string | null;
  readonly files: readonly StoredFile[];
  readonly hash: string;
}

interface Sought {
  readonly kind: ChangeKind;
  readonly modelId: string;
  readonly machineId: string | null;
  readonly asOf: Date;
  readonly transaction?: Transaction | undefined;
}

/**
 * A model's newest approved baseline (nothing, for the first one), or what the machine requires today: a permitted
 * deviation is written upon that.
 */
export async function proposalBase(sought: Sought): Promise<ProposalBase> {
  return sought.machineId === null
    ? modelBase(sought)
    : machineBase({ ...sought, machineId: sought.machineId });
}

async function modelBase({ modelId, transaction }: Sought): Promise<ProposalBase> {
  const baseline = await currentBaseline(modelId, transaction);
  const files = baseline ? await loadFiles(baseline.revisionId, transaction) : [];
  const label = baseline ? `baseline ${baseline.number}` : "no baseline yet";
  const ids = { baselineId: baseline?.id ?? null, revisionId: baseline?.revisionId ?? null };
  return { label, ...ids, files, hash: contentHash(files) };
}

async function machineBase({
  modelId,
  machineId,
  asOf,
  transaction,
}: Sought & { machineId: string }): Promise<ProposalBase> {
  const { assembly } = await machineAssembly(machineId, transaction);
  const { table } = await currentKeyTable(modelId, transaction);
  const required = await requiredConfiguration({ machineId, asOf, keyTable: table, assembly, transaction });
  if (!required)
    throw new ServiceError(
      "conflict",
      "This machine has no baseline yet, so there is nothing to deviate from. Propose the model's baseline first.",
    );
  const deviations = required.deviations.length === 0 ? "" : " with its permitted deviations";
  return {
    label: `baseline ${required.baseline.number}${deviations}`,
    baselineId: required.baseline.id,
    revisionId: required.deviations.length === 0 ? required.baseline.revisionId : null,
    files: required.files,
    hash: required.hash,
  };
}

/** Why a proposal made on `made` cannot be decided as it stands, or null: its base has moved since. */
export function staleReason(
  made: { baseBaselineId: string | null; baseHash: string },
  now: ProposalBase,
): string | null {
  if (made.baseHash === now.hash && made.baseBaselineId === now.baselineId) return null;
  return `Its base has moved: the proposal was made on another text than ${now.label}, which is in force now. Bring it up to date before it is decided.`;
}
