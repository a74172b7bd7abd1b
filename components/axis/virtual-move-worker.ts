import type { MoveInput } from "@/lib/physics/simulate/run";
import { runMove } from "@/lib/review/virtual-move";

/** One virtual move; the page ends the worker to stop it. */
addEventListener("message", ({ data }: MessageEvent<MoveInput>) => {
  runMove(data, (answer) => postMessage(answer));
});
