import "server-only";
import type { Format } from "@/lib/parsers/types";
import { decodeBytes, encodeText } from "@/lib/parsers/encoding";
import { recogniseFormat } from "@/lib/parsers/recognise";
import { hashOf, sha256 } from "@/lib/services/kernel/hash";
import { ServiceError } from "@/lib/services/kernel/errors";

/** One file of a configuration with its bytes as they are and their text as decoded. */
export interface StoredFile {
  readonly path: string;
  readonly bytes: Buffer;
  readonly sha256: string;
  readonly text: string;
  readonly encoding: "utf-8" | "latin-1";
  readonly bom: boolean;
  readonly format: Format;
}

/** How a file comes in: as Unicode text or as its bytes in base64. */
export interface SentFile {
  readonly path: string;
  readonly text?: string | undefined;
  readonly base64?: string | undefined;
}

interface Incoming {
  readonly file: SentFile;
  readonly index: number;
  readonly format?: Format | undefined;
  /** Name of the list in the request; "files" where not said. */
  readonly field?: string | undefined;
}

/** A sent file decoded and recognised, or the refusal that says what was found where, what was kept and what to do. */
export function acceptFile({ file, index, format, field = "files" }: Incoming): StoredFile {
  const bytes =
    file.base64 === undefined ? Buffer.from(file.text ?? "", "utf8") : Buffer.from(file.base64, "base64");
  const pointer = `/${field}/${index}/${file.base64 === undefined ? "text" : "base64"}`;
  const decoded = decodeBytes(bytes);
  if (!decoded.ok)
    throw refusal({
      path: file.path,
      sentence: decoded.diagnostic.message,
      code: decoded.diagnostic.code,
      pointer,
    });
  const known = format ?? recogniseFormat({ path: file.path, text: decoded.text }).format;
  if (!known)
    throw refusal({
      path: file.path,
      sentence:
        "Its format is not recognised: it reads neither as lines of keys and values nor as any other format that is known here. Nothing was stored; check that it is the right file, or choose the format yourself.",
      code: "unknown-format",
      pointer,
    });
  return {
    path: file.path,
    bytes,
    sha256: sha256(bytes),
    text: decoded.text,
    encoding: decoded.encoding,
    bom: decoded.bom,
    format: known,
  };
}

function refusal(input: { path: string; sentence: string; code: string; pointer: string }): ServiceError {
  return new ServiceError(
    input.code === "too-large" ? "too_large" : "invalid",
    `${input.path}: ${input.sentence}`,
    {
      pointer: input.pointer,
      details: { found: input.code },
    },
  );
}

/** A text of ours written back in the encoding of the file that it comes from. */
export function rewriteFile(file: StoredFile, text: string): StoredFile {
  if (text === file.text) return file;
  const encoded = encodeText(text, { encoding: file.encoding, bom: file.bom });
  if (!encoded.ok) throw new ServiceError("invalid", `${file.path}: ${encoded.diagnostic.message}`);
  const bytes = Buffer.from(encoded.bytes);
  return { ...file, bytes, sha256: sha256(bytes), text };
}

/** Equal for equal bytes under equal paths, whatever the order. */
export function contentHash(files: readonly Hashed[]): string {
  return hashOf(
    [...files].map(({ path, sha256: hash }) => ({ path, hash })).sort((a, b) => (a.path < b.path ? -1 : 1)),
  );
}

interface Hashed {
  readonly path: string;
  readonly sha256: string;
}
