import { scoreOfOwnName, type FormatRank, type Sample } from "../rank";
import { parseYaml } from "./parse";

/** How much a text looks like YAML: its lines read as keys with a colon, and maps or lists are indented below them. */
export function rankYaml({ text, extension, whole }: Sample): FormatRank {
  const sample = whole ? text : text.slice(0, text.lastIndexOf("\n") + 1);
  const braced = /^\ufeff?\s*[[{]/.test(sample);
  const { entries, diagnostics } = parseYaml("", sample);
  const faults = diagnostics.filter(
    ({ code, severity }) => code === "unreadable-line" && severity !== "note",
  ).length;
  const nested = entries.filter(
    ({ path, raw, keySpan }) => raw.startsWith("- ") || (path.length > 1 && keySpan.column > 1),
  );
  const marked = !braced && faults === 0 && nested.length > 0;
  const named = extension === "yaml" || extension === "yml";
  const share = entries.length / Math.max(1, entries.length + (named ? 1 : 3) * faults);
  const reasons: string[] = [];
  if (entries.length > 0) reasons.push(`${entries.length} keys have a colon and a value as YAML spells them`);
  if (marked)
    reasons.push(`${nested.length} of them stand indented below other keys, or are lists with dashes`);
  if (named) reasons.push(`the file name ends in .${extension}`);
  return { format: "yaml", score: scoreOfOwnName(share * (marked ? 1.25 : 0.9), named), reasons };
}
