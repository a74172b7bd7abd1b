import "server-only";
import type { ConfigurationFile } from "@/lib/review/types";
import { acceptFile, rewriteFile, type StoredFile } from "@/lib/services/revisions/files";

interface Sides {
  readonly base: readonly StoredFile[];
  readonly ours: readonly StoredFile[];
  readonly theirs: readonly StoredFile[];
}

/** Merged texts as files: in the encoding of the side that changed it, where one did. */
export function mergedFiles(files: readonly ConfigurationFile[], sides: Sides): StoredFile[] {
  return files.map((file, index) => {
    const at = (side: keyof Sides) => sides[side].find(({ path }) => path === file.path);
    const [base, ours, theirs] = [at("base"), at("ours"), at("theirs")];
    const origin = ours && sameEncoding(ours, base) ? (theirs ?? ours) : (ours ?? theirs ?? base);
    return origin ? rewriteFile(origin, file.text) : acceptFile({ file, index });
  });
}

function sameEncoding(one: StoredFile, other: StoredFile | undefined): boolean {
  return one.encoding === other?.encoding && one.bom === other.bom;
}
