import "server-only";
import type { Transaction } from "sequelize";
import { Op } from "sequelize";
import type { Assembly } from "@/lib/domain/assembly";
import type { KeyTable } from "@/lib/domain/key-table";
import { applyDeviations } from "@/lib/review/deviation-text";
import { Deviation } from "@/models/implementation";
import type { StoredFile } from "@/lib/services/revisions/files";
import { contentHash, rewriteFile } from "@/lib/services/revisions/files";
import { loadFiles } from "@/lib/services/revisions/load";
import { baselineSlot } from "./baselines";

export interface RequiredConfiguration {
  readonly baseline: {
    readonly id: string;
    readonly number: number;
    readonly revisionId: string;
    readonly since: Date;
  };
  /** Permitted deviations in force, oldest first. */
  readonly deviations: readonly Deviation[];
  readonly files: readonly StoredFile[];
  readonly hash: string;
  /** Parameters of deviations that the text has no place for, with the reason. */
  readonly refused: readonly { axis: string | null; parameter: string; reason: string }[];
}

interface Sought {
  readonly machineId: string;
  readonly asOf: Date;
  readonly keyTable: KeyTable;
  readonly assembly: Assembly;
  readonly transaction?: Transaction | undefined;
}

/** Permitted deviations of some machines that are in force at a time, oldest first. */
export function deviationsInForce(
  machineIds: readonly string[],
  asOf: Date,
  transaction?: Transaction,
): Promise<Deviation[]> {
  return Deviation.findAll({
    where: {
      machineId: [...machineIds],
      fromAt: { [Op.lte]: asOf },
      untilOn: { [Op.gte]: asOf.toISOString().slice(0, 10) },
      endedAt: { [Op.or]: [{ [Op.is]: null }, { [Op.gt]: asOf }] },
    },
    order: [["fromAt", "ASC"]],
    transaction: transaction ?? null,
  });
}

/**
 * What a machine requires at a time: its baseline with its permitted deviations. A lone deviation made on the very
 * baseline in force gives exactly the text that was approved; otherwise its values are written into the baseline's
 * text. Null where no baseline has been released to the machine.
 */
export async function requiredConfiguration(sought: Sought): Promise<RequiredConfiguration | null> {
  const { machineId, asOf, transaction } = sought;
  const slot = await baselineSlot(machineId, asOf, transaction);
  if (!slot?.baseline) return null;
  const { id, number, revisionId } = slot.baseline;
  const deviations = await deviationsInForce([machineId], asOf, transaction);
  const { files, refused } = await requiredFiles(sought, { baselineId: id, revisionId, deviations });
  const baseline = { id, number, revisionId, since: slot.fromAt };
  return { baseline, deviations, files, hash: contentHash(files), refused };
}

interface Base {
  readonly baselineId: string;
  readonly revisionId: string;
  readonly deviations: readonly Deviation[];
}

async function requiredFiles(
  { keyTable, assembly, transaction }: Sought,
  { baselineId, revisionId, deviations }: Base,
): Promise<Pick<RequiredConfiguration, "files" | "refused">> {
  const [only] = deviations;
  if (only && deviations.length === 1 && only.baseBaselineId === baselineId)
    return { files: await loadFiles(only.revisionId, transaction), refused: [] };
  const files = await loadFiles(revisionId, transaction);
  if (deviations.length === 0) return { files, refused: [] };
  const written = applyDeviations({
    files,
    keyTable,
    assembly,
    deviations: deviations.flatMap(({ edits }) => edits),
  });
  return {
    files: files.map((file, index) => rewriteFile(file, written.files[index]?.text ?? file.text)),
    refused: written.refused,
  };
}
