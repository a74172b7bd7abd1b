import { performance } from "node:perf_hooks";
import { answerPictures, readBefore } from "@/lib/review/axis-pictures";
import { checkConfiguration } from "@/lib/review/check";
import { operatingMap } from "@/lib/review/operating-map";
import { CONTINUOUS } from "@/lib/review/temperature-course";
import { ruleContext } from "@/lib/rules/view";
import { benchInput } from "./check";

const WARM_UP = 100;
const RUNS = 200;

function timed(run: (round: number) => unknown): string {
  const times: number[] = [];
  for (let round = 0; round < WARM_UP + RUNS; round += 1) {
    const start = performance.now();
    run(round);
    if (round >= WARM_UP) times.push(performance.now() - start);
  }
  times.sort((one, other) => one - other);
  const at = (share: number) => (times[Math.floor(RUNS * share)] ?? Number.NaN).toFixed(2);
  return `median ${at(0.5)} ms, p95 ${at(0.95)} ms`;
}

/** Time of the operating map: reckoned alone, and as the worker answers while a number is typed into a long text. */
export function runMapBench(): string[] {
  const { files: unknown, keyTable, assembly, policy } = benchInput();
  // The editor knows the format of what it edits.
  const files = unknown.map((file) => ({ ...file, format: "lines" as const }));
  const { parameters } = checkConfiguration({ files, keyTable, assembly, policy });
  const input = { parameters, assembly, policy };
  const typed = (round: number) =>
    files.map((file) => ({ ...file, text: file.text.replace("accel = 6000", `accel = ${6001 + round}`) }));
  const texts = (round: number) => ({ files: typed(round), keyTable, assembly, policy });
  const change = (id: number) => ({ kind: "change", id, base: files, texts: texts(id) }) as const;
  const before = readBefore(change(0));
  const axis = assembly.axes[0]?.axis ?? "";
  return [
    `operating map of one axis, was and to be: ${timed(() => operatingMap({ axis, was: ruleContext(input), toBe: ruleContext(input) }))} (aim: under 16 ms)`,
    `operating map while a number is typed, text of 5 axes and 400 keys read anew: ${timed((id) => answerPictures(change(id), before))} (aim: under 16 ms)`,
    `map, torque curve and temperatures of one axis from its text, with a number tried: ${timed((id) => answerPictures({ kind: "axis", id, axis, texts: texts(id), tried: { acceleration: 5 + id / 100 }, duty: CONTINUOUS }))}`,
  ];
}
