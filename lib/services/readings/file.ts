import "server-only";
import { Reading } from "@/models/revisions";
import type { Context } from "@/lib/services/kernel/context";
import { authorize } from "@/lib/services/kernel/context";
import { notFound } from "@/lib/services/kernel/errors";
import type { StoredFile } from "@/lib/services/revisions/files";
import { loadFiles } from "@/lib/services/revisions/load";

/** One file of a reading, byte for byte as it came in. */
export async function readingFile(
  context: Context,
  { id, position }: { readonly id: string; readonly position: number },
): Promise<StoredFile> {
  authorize(context, "readings.read");
  const reading = await Reading.findByPk(id, { attributes: ["revisionId"] });
  const file = reading && (await loadFiles(reading.revisionId))[position];
  if (!file) throw notFound("file");
  return file;
}
