import "server-only";
import type { Transaction } from "sequelize";
import type { Assembly } from "@/lib/domain/assembly";
import type { KeyTable } from "@/lib/domain/key-table";
import type { ChangeRequest, ProposalVersion } from "@/models/changes";
import { ServiceError } from "@/lib/services/kernel/errors";
import { currentKeyTable } from "@/lib/services/key-tables/current";
import type { StoredFile } from "@/lib/services/revisions/files";
import { loadFiles } from "@/lib/services/revisions/load";
import type { ProposalBase } from "./base";
import { proposalBase, staleReason } from "./base";
import { targetOf } from "./edit";
import { machinesOf } from "./effectivity";
import { proposalAssembly } from "./evaluate";

/** What a proposal whose base has moved is merged from. */
export interface ThreeTexts {
  /** The text in force. */
  readonly today: ProposalBase;
  readonly oldBase: readonly StoredFile[];
  readonly edited: readonly StoredFile[];
  readonly keyTable: KeyTable;
  readonly assembly: Assembly;
}

interface Sought {
  readonly change: ChangeRequest;
  readonly version: ProposalVersion;
  readonly asOf: Date;
  readonly transaction?: Transaction | undefined;
}

/** The text that a proposal was made on, the proposal, and the text in force; refused where the base has not moved. */
export async function threeTexts({ change, version, asOf, transaction }: Sought): Promise<ThreeTexts> {
  const target = targetOf(change);
  const today = await proposalBase({ ...target, asOf, transaction });
  if (!staleReason(version, today))
    throw new ServiceError("conflict", "The proposal stands on the text in force already. Nothing was done.");
  const machines = change.machineId === null ? await machinesOf({ ...change.get(), transaction }) : [];
  return {
    today,
    oldBase: version.baseRevisionId ? await loadFiles(version.baseRevisionId, transaction) : [],
    edited: await loadFiles(version.revisionId, transaction),
    keyTable: (await currentKeyTable(change.modelId, transaction)).table,
    assembly: await proposalAssembly({ ...target, transaction }, machines),
  };
}
