/** Lines of a text with their line ends (LF, CR LF, CR); the last may have none. An empty text has no lines. */
export function splitLines(text: string): string[] {
  return text.match(/[^\r\n]*(?:\r\n|\r|\n)|[^\r\n]+$/g) ?? [];
}

export function withoutLineEnd(line: string): string {
  return line.replace(/[\r\n]+$/, "");
}

const DIRECTIVE = /^#\s*(?:define|undef|ifn?def|if|el(?:se|if)|elifn?def|endif|include|pragma)\b/;
const WHOLE_COMMENT = /^(?:#|;|\/\/|\/\*(?:[^*]|\*(?!\/))*\*\/$)/;

/** What is left of a line without white space and without a comment: what a firmware reads. */
export function substance(line: string): string {
  const bare = line.trim();
  if (WHOLE_COMMENT.test(bare) && !DIRECTIVE.test(bare)) return "";
  return withoutTrailingComment(bare).replace(/\s+/g, "");
}

/** A trailing comment begins after white space and outside quotes. */
function withoutTrailingComment(line: string): string {
  let quote = "";
  for (let i = 0; i < line.length; i++) {
    const char = line[i] ?? "";
    if (quote !== "") {
      if (char === quote) quote = "";
    } else if (char === '"') quote = char;
    else if (i > 0 && /\s/.test(line[i - 1] ?? "") && /^(?:[#;]|\/\/|\/\*)/.test(line.slice(i, i + 2)))
      return line.slice(0, i);
  }
  return line;
}
