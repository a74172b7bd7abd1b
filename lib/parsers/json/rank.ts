import { scoreOfOwnName, type FormatRank, type Sample } from "../rank";
import { TOKEN, tokensOf } from "./tokens";

const JSON_FILES = ["json", "jsonc", "json5"];

/** How much a text looks like JSON: it begins with a brace and a name in quotes, or a bracket and a value, and little in it is anything else. */
export function rankJson({ text, extension }: Sample): FormatRank {
  const { begins, names, read, unread } = countTokens(text);
  const share = begins ? Math.max(0, 1 - (4 * unread) / Math.max(1, read + unread)) : 0;
  const named = JSON_FILES.includes(extension);
  const reasons: string[] = [];
  if (begins) reasons.push("it begins as an object in braces or a list in brackets does");
  if (share > 0 && names > 0) reasons.push(`${names} names in double quotes have a colon behind them`);
  if (named) reasons.push(`the file name ends in .${extension}`);
  return { format: "json", score: scoreOfOwnName(share, named), reasons };
}

interface Counts {
  begins: boolean;
  names: number;
  read: number;
  unread: number;
}

function countTokens(text: string): Counts {
  const counts: Counts = { begins: false, names: 0, read: 0, unread: 0 };
  let before = 0;
  for (const { kind, faulty } of tokensOf(text)) {
    if (kind >= TOKEN.lineComment && kind <= TOKEN.blank) continue;
    const bad = faulty || kind === TOKEN.unknown;
    if (counts.read + counts.unread === 1) counts.begins = !bad && begins(before, kind);
    if (kind === TOKEN.colon && before === TOKEN.string) counts.names++;
    if (bad) counts.unread++;
    else counts.read++;
    before = kind;
  }
  return counts;
}

/** Whether a text may begin with these two tokens. */
function begins(first: number, second: number): boolean {
  if (first === TOKEN.openBrace) return second === TOKEN.string || second === TOKEN.closeBrace;
  return first === TOKEN.openBracket && second !== TOKEN.comma && second !== TOKEN.colon;
}
