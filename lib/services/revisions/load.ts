import "server-only";
import type { Transaction } from "sequelize";
import { decodeBytes } from "@/lib/parsers/encoding";
import type { Format } from "@/lib/parsers/types";
import { FileContent, RevisionFile } from "@/models/revisions";
import type { StoredFile } from "./files";

/** The files of some revisions, in their order, by revision. One query however many revisions. */
export async function loadFilesOf(
  revisionIds: readonly string[],
  transaction?: Transaction,
): Promise<Map<string, StoredFile[]>> {
  const rows = await RevisionFile.findAll({
    where: { revisionId: [...new Set(revisionIds)] },
    include: [{ model: FileContent, as: "content", required: true }],
    order: [["position", "ASC"]],
    transaction: transaction ?? null,
  });
  const byRevision = new Map<string, StoredFile[]>();
  for (const row of rows) {
    const files = byRevision.get(row.revisionId) ?? [];
    files.push(toStoredFile(row));
    byRevision.set(row.revisionId, files);
  }
  return byRevision;
}

export async function loadFiles(revisionId: string, transaction?: Transaction): Promise<StoredFile[]> {
  return (await loadFilesOf([revisionId], transaction)).get(revisionId) ?? [];
}

function toStoredFile(row: RevisionFile): StoredFile {
  const bytes = row.content?.bytes ?? Buffer.alloc(0);
  const decoded = decodeBytes(bytes);
  return {
    path: row.path,
    bytes,
    sha256: row.sha256,
    text: decoded.ok ? decoded.text : "",
    encoding: row.encoding,
    bom: row.bom,
    // Only formats with a parser are ever stored.
    format: row.format as Format,
  };
}
