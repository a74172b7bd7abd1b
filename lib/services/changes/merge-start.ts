import "server-only";
import type { Assembly } from "@/lib/domain/assembly";
import { changeLabel } from "@/lib/domain/changes";
import type { KeyTable } from "@/lib/domain/key-table";
import type { Policy } from "@/lib/domain/policy";
import type { ConfigurationFile } from "@/lib/review/types";
import { ChangeRequest, ProposalVersion } from "@/models/changes";
import type { Context } from "@/lib/services/kernel/context";
import { authorize } from "@/lib/services/kernel/context";
import { notFound } from "@/lib/services/kernel/errors";
import { currentPolicy } from "@/lib/services/policies/ensure";
import type { StoredFile } from "@/lib/services/revisions/files";
import { proposalBase, staleReason } from "./base";
import { targetOf } from "./edit";
import { threeTexts } from "./three-texts";

/** All that the browser needs to merge a proposal with the text in force; `texts` is null where its base has not moved. */
export interface MergeStart {
  readonly id: string;
  readonly label: string;
  readonly title: string;
  readonly version: number;
  readonly lockVersion: number;
  /** The text in force, in words. */
  readonly todayLabel: string;
  readonly texts: MergeTextsOfChange | null;
}

export interface MergeTextsOfChange {
  readonly baseHash: string;
  readonly base: readonly ConfigurationFile[];
  readonly ours: readonly ConfigurationFile[];
  readonly theirs: readonly ConfigurationFile[];
  readonly keyTable: KeyTable;
  readonly assembly: Assembly;
  readonly policy: Policy;
}

export async function mergeStart(context: Context, id: string): Promise<MergeStart> {
  authorize(context, "changes.edit");
  const change = await ChangeRequest.findByPk(id);
  const version =
    change && (await ProposalVersion.findOne({ where: { changeId: id, version: change.currentVersion } }));
  if (!change || !version) throw notFound("change");
  const today = await proposalBase({ ...targetOf(change), asOf: context.now });
  return {
    id,
    label: changeLabel(change.number),
    title: change.title,
    version: change.currentVersion,
    lockVersion: change.lockVersion,
    todayLabel: today.label,
    texts: staleReason(version, today) === null ? null : await textsOf(context, change, version),
  };
}

async function textsOf(
  { now: asOf }: Context,
  change: ChangeRequest,
  version: ProposalVersion,
): Promise<MergeTextsOfChange> {
  const { today, oldBase, edited, keyTable, assembly } = await threeTexts({ change, version, asOf });
  return {
    baseHash: today.hash,
    base: oldBase.map(plain),
    ours: edited.map(plain),
    theirs: today.files.map(plain),
    keyTable,
    assembly,
    policy: (await currentPolicy()).policy,
  };
}

function plain({ path, text, format }: StoredFile): ConfigurationFile {
  return { path, text, format };
}
