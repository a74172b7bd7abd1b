import "server-only";
import { FORMATS, type Format } from "@/lib/parsers/types";
import { joinWords } from "@/lib/domain/sentences";
import { ServiceError } from "@/lib/services/kernel/errors";
import { acceptFile, type SentFile, type StoredFile } from "./files";

/** The format that was asked for; undefined: each text decides for itself. */
function askedFormat(format: string): Format | undefined {
  if (format === "auto") return undefined;
  const known = FORMATS.find((name) => name === format);
  if (known) return known;
  throw new ServiceError(
    "invalid",
    `The format “${format}” is not read here. Nothing was stored; send ${joinWords(["auto", ...FORMATS], "or")}.`,
    { pointer: "/format" },
  );
}

/** Sent files decoded and recognised; the first that cannot be taken is refused with its name. `field`: where the request has them. */
export function acceptFiles(files: readonly SentFile[], format: string, field = "files"): StoredFile[] {
  const asked = askedFormat(format);
  return files.map((file, index) => acceptFile({ file, index, format: asked, field }));
}
