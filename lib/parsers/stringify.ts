import type { Document } from "./types";

/** The text of a document, put together from the pieces that the lexer cut. */
export function stringify(document: Document): string {
  const { pieces, text } = document;
  const parts: string[] = [];
  for (let i = 0; i + 2 < pieces.length; i += 3) parts.push(text.slice(pieces[i + 1], pieces[i + 2]));
  return parts.join("");
}
