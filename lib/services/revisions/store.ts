import "server-only";
import type { RevisionKind } from "@/lib/domain/revisions";
import type { ParameterValue } from "@/lib/domain/values";
import { FileContent, Revision, RevisionFile, RevisionParameter } from "@/models/revisions";
import type { Tx } from "@/lib/services/kernel/context";
import type { StoredFile } from "./files";
import { contentHash } from "./files";

interface StoreInput {
  readonly kind: RevisionKind;
  readonly modelId: string;
  readonly machineId: string | null;
  readonly files: readonly StoredFile[];
  readonly parameters: readonly ParameterValue[];
}

export interface StoredRevision {
  readonly id: string;
  readonly contentHash: string;
  /** The same files were kept before for this machine: the old revision serves again. */
  readonly unchanged: boolean;
}

/**
 * Keeps a configuration as an immutable revision. Equal bytes are stored once; an unchanged reading of a machine
 * gets the revision that is there already, so that it stores no second content.
 */
export async function storeRevision(tx: Tx, input: StoreInput): Promise<StoredRevision> {
  const hash = contentHash(input.files);
  const before = input.machineId === null ? null : await sameReading(tx, input, hash);
  if (before) return { id: before.id, contentHash: hash, unchanged: true };
  await keepContents(tx, input.files);
  const revision = await Revision.create(
    {
      kind: input.kind,
      modelId: input.modelId,
      machineId: input.machineId,
      contentHash: hash,
      createdByName: tx.actor.name,
      createdAt: tx.now,
    },
    { transaction: tx.transaction },
  );
  await keepFiles(tx, revision.id, input.files);
  await keepParameters(tx, revision.id, input);
  return { id: revision.id, contentHash: hash, unchanged: false };
}

const READ_KINDS: readonly RevisionKind[] = ["as_found", "as_left", "in_service"];

function sameReading(tx: Tx, input: StoreInput, hash: string): Promise<Revision | null> {
  if (!READ_KINDS.includes(input.kind)) return Promise.resolve(null);
  return Revision.findOne({
    where: { machineId: input.machineId, contentHash: hash, kind: [...READ_KINDS] },
    transaction: tx.transaction,
  });
}

/** Contents are keyed by their hash; two uploads of the same bytes at one moment leave one row. */
export async function keepContents(
  tx: Tx,
  files: readonly { sha256: string; bytes: Buffer }[],
): Promise<void> {
  const rows = files.map(({ sha256, bytes }) => ({ sha256, size: bytes.byteLength, bytes }));
  await FileContent.bulkCreate(rows, { ignoreDuplicates: true, transaction: tx.transaction });
}

async function keepFiles(tx: Tx, revisionId: string, files: readonly StoredFile[]): Promise<void> {
  const rows = files.map(({ path, sha256, format, encoding, bom }, position) => ({
    revisionId,
    position,
    path,
    sha256,
    format,
    encoding,
    bom,
  }));
  await RevisionFile.bulkCreate(rows, { transaction: tx.transaction });
}

async function keepParameters(tx: Tx, revisionId: string, input: StoreInput): Promise<void> {
  const rows = input.parameters.map(({ axis, parameter, value, unit, basis, source }) => ({
    revisionId,
    machineId: input.machineId,
    axis,
    parameter,
    value,
    unit,
    basis,
    path: source.path,
    line: source.line,
    raw: source.raw,
  }));
  await RevisionParameter.bulkCreate(rows, { transaction: tx.transaction });
}
