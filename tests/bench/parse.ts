import ini from "ini";
import { parseText } from "@/lib/parsers/parse-text";
import { stringify } from "@/lib/parsers/stringify";
import { medianTimes, RUNS } from "./times";

const MEGABYTE = 1_000_000;

/** A line-family text of one megabyte: sections, numbers with and without units, quoted names, comments, disabled keys. */
export function megabyteOfLines(): string {
  const parts: string[] = [];
  let length = 0;
  for (let i = 0; length < MEGABYTE; i++) {
    const block = blockOfLines(i);
    parts.push(block);
    length += block.length;
  }
  return parts.join("");
}

function blockOfLines(i: number): string {
  return [
    `[axis.a${i}]`,
    `# carriage ${i}, belt side`,
    `run_ma = ${500 + (i % 900)}`,
    `hold_ma = ${200 + (i % 400)} ; at standstill`,
    `accel = ${1000 + i} mm/s^2`,
    `steps_per_mm = ${(80 + (i % 40) / 8).toFixed(3)}`,
    `label = "carriage ${i}"`,
    `reversed = ${i % 2 === 0}`,
    `# jerk = 20`,
    `travel_max = ${i % 1000}.5`,
    ``,
    ``,
  ].join("\n");
}

/** Our parser beside the package `ini` on the same text. Ours keeps every byte and position. */
export function runParseBench(): string[] {
  const text = megabyteOfLines();
  const document = parseText({ path: "bench.conf", text });
  if (stringify(document) !== text) throw new Error("The bench text does not come back byte for byte.");
  const [own, other] = medianTimes(
    () => parseText({ path: "bench.conf", text }),
    () => ini.parse(text),
  );
  const rate = (time: number) => `${(text.length / 1000 / time).toFixed(1)} MB/s`;
  return [
    `parse ${(text.length / MEGABYTE).toFixed(2)} MB of lines, ${document.entries.length} keys, median of ${RUNS}`,
    `  keepstep  ${own.toFixed(1)} ms  ${rate(own)}`,
    `  ini       ${other.toFixed(1)} ms  ${rate(other)}`,
    `  ratio     ${(other / own).toFixed(2)} (1 or more: at least as fast)`,
  ];
}
