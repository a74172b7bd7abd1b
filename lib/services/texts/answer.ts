import "server-only";
import type { AnsweredFile } from "@/lib/schemas/texts";
import type { SentFile, StoredFile } from "@/lib/services/revisions/files";

/** A file given back the way it was sent. */
export function answerFile(file: StoredFile, sent: readonly SentFile[]): AnsweredFile {
  const asBytes = sent.find(({ path }) => path === file.path)?.base64 !== undefined;
  return asBytes
    ? { path: file.path, base64: file.bytes.toString("base64") }
    : { path: file.path, text: file.bytes.toString("utf8") };
}
