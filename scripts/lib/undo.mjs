import { lastLines } from "./trouble.mjs";

/** Runs what was collected, last first; what fails is told and does not keep the rest from being ended. */
export async function undoAll(undo, tell) {
  for (const act of undo.splice(0).reverse())
    await act().catch((error) =>
      tell(`While stopping: ${error.message} ${lastLines(error.output ?? "")}`.trimEnd()),
    );
}
