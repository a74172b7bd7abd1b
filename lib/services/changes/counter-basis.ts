import "server-only";
import type { Assembly } from "@/lib/domain/assembly";
import { keyTableSchema, type KeyTable } from "@/lib/domain/key-table";
import { policySchema, type Policy } from "@/lib/domain/policy";
import type { CheckReport, ConfigurationFile } from "@/lib/review/types";
import { KeyTableVersion, PolicyVersion } from "@/models/catalog";
import { ChangeRequest, ProposalVersion } from "@/models/changes";
import { Evaluation } from "@/models/revisions";
import type { Context } from "@/lib/services/kernel/context";
import { authorize } from "@/lib/services/kernel/context";
import { notFound } from "@/lib/services/kernel/errors";
import { loadFiles } from "@/lib/services/revisions/load";

/** What a counter-proposal to a proposal is sought on: its texts, and the very grounds of its evaluation. */
export interface CounterBasis {
  readonly files: readonly ConfigurationFile[];
  readonly keyTable: KeyTable;
  readonly assembly: Assembly;
  readonly policy: Policy;
}

interface Asked {
  readonly changeId: string;
  /** The newest where left out. */
  readonly version?: number | undefined;
}

/** The grounds for a counter-proposal; null where the evaluation has nothing over limit. */
export async function counterBasis(context: Context, asked: Asked): Promise<CounterBasis | null> {
  authorize(context, "changes.read");
  const { changeId } = asked;
  const change = await ChangeRequest.findByPk(changeId);
  if (!change) throw notFound("change");
  const number = asked.version ?? change.currentVersion;
  const version = await ProposalVersion.findOne({ where: { changeId, version: number } });
  const evaluation = version && (await Evaluation.findByPk(version.evaluationId));
  if (!version || !evaluation) throw notFound("proposal version");
  // Stored reports are those that storeEvaluation wrote.
  const { findings } = evaluation.report as CheckReport;
  if (!findings.some(({ level }) => level === "over")) return null;
  const files = await loadFiles(version.revisionId);
  return {
    files: files.map(({ path, text, format }) => ({ path, text, format })),
    keyTable: await keyTableOf(evaluation),
    assembly: evaluation.assembly,
    policy: await policyOf(evaluation),
  };
}

async function keyTableOf({ keyTableId }: Evaluation): Promise<KeyTable> {
  const row = keyTableId === null ? null : await KeyTableVersion.findByPk(keyTableId);
  return keyTableSchema.parse({ rules: row?.rules ?? [] });
}

async function policyOf({ policyVersion }: Evaluation): Promise<Policy> {
  const row = await PolicyVersion.findOne({ where: { version: policyVersion } });
  return policySchema.parse(row?.data ?? {});
}
