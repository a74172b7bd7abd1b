import { Pieces } from "../pieces";
import { scoreOfOwnName, type FormatRank, type Sample } from "../rank";
import { cutRecords, delimiterOf } from "./records";

const WORDS_OF_PROSE = /[A-Za-z]+\s+[A-Za-z]+\s+[A-Za-z]+\s+[A-Za-z]+/;

/** How much a text looks like a table: every line has as many fields as the first, and the fields are short. */
export function rankCsv({ text, extension, whole }: Sample): FormatRank {
  const sample = whole ? text : text.slice(0, text.lastIndexOf("\n") + 1);
  const { records } = cutRecords(sample, delimiterOf(sample), new Pieces(64));
  const width = records[0]?.length ?? 0;
  const named = extension === "csv" || extension === "tsv";
  const even = records.filter(
    (fields) => fields.length === width && !/[=:[\]{}]/.test(fields[0]?.said ?? ""),
  ).length;
  const prose = records.filter((fields) => fields.some(({ said }) => WORDS_OF_PROSE.test(said))).length;
  const enough = width > 1 && (records.length > 1 || named);
  const share = enough ? Math.max(0, even - prose) / records.length : 0;
  const reasons: string[] = [];
  if (share > 0) reasons.push(`${even} lines have ${width} fields each`);
  if (named) reasons.push(`the file name ends in .${extension}`);
  return { format: "csv", score: scoreOfOwnName(share, named), reasons };
}
