import "server-only";
import { ServiceError } from "./errors";

/**
 * Refuses a write whose writer has seen another version than the one that stands; what stands goes back with the
 * refusal. Null: the caller named no version, where the operation lets it.
 */
export function requireVersion(seen: number | null, current: { readonly version: number }): void {
  if (seen === null || seen === current.version) return;
  throw new ServiceError(
    "precondition_failed",
    `This was saved by somebody else meanwhile: version ${current.version} stands, you have version ${seen}. Nothing was stored; load it again and put your changes on what stands now.`,
    { details: { current } },
  );
}
