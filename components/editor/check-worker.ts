import { answerLive, type LiveRequest } from "@/lib/review/worker-protocol";

/** The page's own checks, off the thread that types: the same pure core as on the server. */
addEventListener("message", ({ data }: MessageEvent<LiveRequest>) => {
  postMessage(answerLive(data));
});
