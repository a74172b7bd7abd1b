const ESCAPE = /\\(?:(\r\n|\r|\n)[ \t\f]*|u([0-9a-fA-F]{4})|([^]?))/g;

const SIMPLE: ReadonlyMap<string, string> = new Map([
  ["t", "\t"],
  ["n", "\n"],
  ["r", "\r"],
  ["f", "\f"],
]);

/** What a stretch of a line says: `\t \n \r \f`, `\uXXXX`, a line continued by a backslash; any other backslash falls away. */
export function unescape(raw: string): { readonly said: string; readonly wrong: boolean } {
  if (!raw.includes("\\")) return { said: raw, wrong: false };
  let wrong = false;
  const said = raw.replace(ESCAPE, (whole: string, line?: string, digits?: string, one = "") => {
    if (line !== undefined) return "";
    if (digits !== undefined) return String.fromCharCode(parseInt(digits, 16));
    if (one === "u") wrong = true;
    return one === "u" ? whole : (SIMPLE.get(one) ?? one);
  });
  return { said, wrong };
}
