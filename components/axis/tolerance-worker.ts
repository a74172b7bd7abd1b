import { runOdds } from "@/lib/review/odds-protocol";
import type { OddsInput } from "@/lib/review/tolerance-odds";

/** One run of samples; the page ends the worker to stop it. */
addEventListener("message", ({ data }: MessageEvent<OddsInput>) => {
  runOdds(data, (answer) => postMessage(answer));
});
