import { scoreOfOwnName, type FormatRank, type Sample } from "../rank";
import { parseProperties } from "./parse";

/** Marks that lines of keys and values of other kinds do not have: `!` comments, `\u` escapes, escaped signs in keys. */
const MARK = /^[ \t]*!|\\u[0-9a-fA-F]{4}|^[ \t]*[\w.]*\\[:= ]/gm;
const BRACKETS = /^[ \t]*[[{]/m;

/** How much a text looks like `.properties`: every line is a key with `=` or `:`, and its own marks stand in it. */
export function rankProperties({ text, extension }: Sample): FormatRank {
  const { entries } = parseProperties("", text);
  const paired = entries.filter(({ keySpan, valueSpan, disabled }) => {
    return !disabled && /[=:]/.test(text.slice(keySpan.end, valueSpan.start));
  }).length;
  const marks = text.match(MARK)?.length ?? 0;
  const named = extension === "properties";
  const share = BRACKETS.test(text) && !named ? 0 : paired / Math.max(1, entries.length);
  const reasons: string[] = [];
  if (paired > 0) reasons.push(`${paired} keys have a value behind “=” or “:”`);
  if (marks > 0) reasons.push(`${marks} places have comments with “!” or escapes as .properties has them`);
  if (named) reasons.push("the file name ends in .properties");
  return { format: "properties", score: scoreOfOwnName(share * (marks > 0 ? 1.25 : 0.4), named), reasons };
}
