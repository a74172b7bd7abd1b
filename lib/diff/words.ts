import { diffArrays } from "diff";
import type { RevisionSegment } from "./types";

/** A number with its unit is one word, so that 0.8 becomes 0.9 as a whole. */
const WORD = /[+-]?\d[\d.]*(?:e[+-]?\d+)?[A-Za-z%µΩ]*|[\p{L}_$][\p{L}\p{N}_]*|\s+|[^]/giu;

export function splitWords(line: string): string[] {
  return line.match(WORD) ?? [];
}

/** Longer edit scripts are not sought: the whole line is then struck and written anew. */
const MOST_EDITS = 400;

/** The words of a changed line: kept, struck, put in. The kept and struck ones are the old line, the kept and put in the new. */
export function reviseWords(was: string, toBe: string): RevisionSegment[] {
  const [old, wanted] = [splitWords(was), splitWords(toBe)];
  const shorter = Math.min(old.length, wanted.length);
  let head = 0;
  while (head < shorter && old[head] === wanted[head]) head++;
  let tail = 0;
  while (tail < shorter - head && old[old.length - 1 - tail] === wanted[wanted.length - 1 - tail]) tail++;
  const middle = reviseMiddle(old.slice(head, old.length - tail), wanted.slice(head, wanted.length - tail));
  if (!middle) return [segment("was", was), segment("to_be", toBe)].filter(({ text }) => text !== "");
  const before = segment("same", old.slice(0, head).join(""));
  const after = segment("same", old.slice(old.length - tail).join(""));
  return tidy([before, ...middle, after].filter(({ text }) => text !== ""));
}

/** What lies between the words that both lines begin and end with: in most lines one number against another. */
function reviseMiddle(was: string[], toBe: string[]): RevisionSegment[] | null {
  if (was.length < 2 && toBe.length < 2)
    return [segment("was", was.join("")), segment("to_be", toBe.join(""))].filter(({ text }) => text !== "");
  const parts = diffArrays(was, toBe, { maxEditLength: MOST_EDITS });
  return (
    parts?.map(({ value, added, removed }) =>
      segment(added ? "to_be" : removed ? "was" : "same", value.join("")),
    ) ?? null
  );
}

function segment(kind: RevisionSegment["kind"], text: string): RevisionSegment {
  return { kind, text };
}

/** White space between two changes joins them, so that a replaced phrase reads as one; the old words come first. */
function tidy(segments: readonly RevisionSegment[]): RevisionSegment[] {
  const out: RevisionSegment[] = [];
  let was = "";
  let toBe = "";
  const flush = () => {
    if (was !== "") out.push(segment("was", was));
    if (toBe !== "") out.push(segment("to_be", toBe));
    was = toBe = "";
  };
  segments.forEach(({ kind, text }, index) => {
    const next = segments[index + 1];
    if (kind === "was") was += text;
    else if (kind === "to_be") toBe += text;
    else if (was !== "" && toBe !== "" && next && next.kind !== "same" && text.trim() === "") {
      was += text;
      toBe += text;
    } else {
      flush();
      out.push(segment(kind, text));
    }
  });
  flush();
  return out;
}
