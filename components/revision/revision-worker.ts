import { outlineOf } from "@/lib/diff/outline";
import { reviseText } from "@/lib/diff/revise-text";

/** Two texts; answered by the outline of their revision. */
export interface RevisionRequest {
  readonly was: string;
  readonly toBe: string;
}

/** Long texts are held against each other off the thread of the page. */
addEventListener("message", ({ data }: MessageEvent<RevisionRequest>) => {
  postMessage(outlineOf(reviseText(data.was, data.toBe)));
});
