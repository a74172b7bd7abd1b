import { answerMerge, type MergeRequest } from "@/lib/review/merge-protocol";

/** Merging and checking each choice, off the thread of the page: the same pure core as on the server. */
addEventListener("message", ({ data }: MessageEvent<MergeRequest>) => {
  postMessage(answerMerge(data));
});
