import { scoreOfOwnName, type FormatRank, type Sample } from "../rank";
import { parseToml } from "./parse";

const FAULTS = ["unreadable-line", "not-standard", "unclosed-section", "unclosed-quote", "unclosed-list"];
/** Where each key has a value of TOML, the lines of keys and values may still have been meant; these marks settle it. */
const MARKS = /^[ \t]*\[\[[^\]]+\]\][ \t]*$|=[ \t]*(?:"""|'''|\{[ \t]*[\w"'.-]+[ \t]*=)/m;

/** How much a text looks like TOML: its keys have values of TOML, and it has arrays of tables or inline tables. */
export function rankToml({ text, extension, whole }: Sample): FormatRank {
  const { entries, diagnostics } = parseToml("", whole ? text : text.slice(0, text.lastIndexOf("\n") + 1));
  const faults = diagnostics.filter(({ code }) => FAULTS.includes(code)).length;
  const named = extension === "toml";
  const share = entries.length / Math.max(1, entries.length + faults);
  const marked = faults === 0 && MARKS.test(text);
  const reasons: string[] = [];
  if (entries.length > 0) reasons.push(`${entries.length} keys have values as TOML spells them`);
  if (marked) reasons.push("it has arrays of tables, inline tables or texts over several lines");
  if (named) reasons.push("the file name ends in .toml");
  return { format: "toml", score: scoreOfOwnName(share * (marked ? 1.25 : 0.9), named), reasons };
}
