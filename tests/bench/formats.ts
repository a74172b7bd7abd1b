import { parse as parseCsv } from "csv-parse/sync";
import { parse as parseEnv } from "dotenv";
import { parse as parseJson } from "jsonc-parser";
import { parse as parseToml } from "smol-toml";
import { parse as parseYaml } from "yaml";
import { parseText } from "@/lib/parsers/parse-text";
import type { Format } from "@/lib/parsers/types";
import { medianTimes } from "./times";

const AXES = 1500;

function axes<T>(make: (index: number) => T): T[] {
  return Array.from({ length: AXES }, (_, index) => make(index));
}

interface Race {
  readonly format: Format;
  readonly library: string;
  readonly text: string;
  readonly other: (text: string) => unknown;
}

const RACES: readonly Race[] = [
  {
    format: "json",
    library: "jsonc-parser",
    text: JSON.stringify(
      Object.fromEntries(
        axes((i) => [`a${i}`, { run_ma: 500 + i, accel: 3000.5, label: "belt side", scale: [80, 80, 400] }]),
      ),
      null,
      2,
    ),
    other: (text) => parseJson(text) as unknown,
  },
  {
    format: "toml",
    library: "smol-toml",
    text: axes(
      (i) =>
        `[axis.a${i}]\nrun_ma = ${500 + i} # rms\naccel = 3000.5\nlabel = "belt side"\nscale = [80, 80, 400]\n`,
    ).join("\n"),
    other: parseToml,
  },
  {
    format: "yaml",
    library: "yaml",
    text: axes(
      (i) =>
        `a${i}:\n  run_ma: ${500 + i} # rms\n  accel: 3000.5\n  label: "belt side"\n  scale: [80, 80, 400]\n`,
    ).join(""),
    other: (text) => parseYaml(text) as unknown,
  },
  {
    format: "env",
    library: "dotenv",
    text: axes(
      (i) => `export A${i}_RUN_MA=${500 + i} # rms\nA${i}_ACCEL=3000.5\nA${i}_LABEL="belt side"\n`,
    ).join(""),
    other: parseEnv,
  },
  {
    format: "csv",
    library: "csv-parse",
    text: `axis,run_ma,accel,label\n${axes((i) => `a${i},${500 + i},3000.5,"belt side"\n`).join("")}`,
    other: (text) => parseCsv(text) as unknown,
  },
];

/** Each format beside the library that people would take otherwise, on the same text; ours keeps bytes and positions. */
export function runFormatsBench(): string[] {
  return [
    `parse ${AXES} axes in each format, median in ms; ratio of the library's time to ours`,
    ...RACES.map(({ format, library, text, other }) => {
      const [own, theirs] = medianTimes(
        () => parseText({ path: "a", text, format }),
        () => other(text),
      );
      const size = `${(text.length / 1000).toFixed(0)} kB`;
      return `  ${format.padEnd(5)} ${size.padStart(7)}  keepstep ${own.toFixed(1)}  ${library} ${theirs.toFixed(1)}  ratio ${(theirs / own).toFixed(2)}`;
    }),
  ];
}
