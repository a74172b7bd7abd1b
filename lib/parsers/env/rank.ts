import { scoreOfOwnName, type FormatRank, type Sample } from "../rank";
import { parseEnv } from "./parse";

const EXPORT = /^[ \t]*export[ \t]+[A-Za-z_]\w*=/gm;
const SHELL_FILES = ["env", "sh", "envrc", "profile"];

/** How much a text looks like shell assignments: names and values with a bare `=` between them, and `export` before some. */
export function rankEnv({ text, extension }: Sample): FormatRank {
  const { entries, diagnostics } = parseEnv("", text);
  const exported = text.match(EXPORT)?.length ?? 0;
  const named = SHELL_FILES.includes(extension);
  const tight = entries.filter(({ keySpan, valueSpan }) => valueSpan.start - keySpan.end === 1).length;
  const faults = diagnostics.filter(({ code }) => code === "unreadable-line").length;
  const share = tight / Math.max(1, entries.length + faults);
  const reasons: string[] = [];
  if (tight > 0) reasons.push(`${tight} names have “=” and a value right behind them`);
  if (exported > 0) reasons.push(`${exported} lines begin with “export”`);
  if (named) reasons.push(`the file name ends in .${extension}`);
  return { format: "env", score: scoreOfOwnName(share * (exported > 0 ? 1.25 : 0.8), named), reasons };
}
