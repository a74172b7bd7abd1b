import { answerSolve, type SolveRequest } from "@/lib/review/solve-protocol";

/** Searches off the thread that types: the same pure core as on the server. */
addEventListener("message", ({ data }: MessageEvent<SolveRequest>) => {
  postMessage(answerSolve(data));
});
