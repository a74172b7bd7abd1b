import type { HeaderLine } from "./logical-lines";

/** The two lines of an include guard, which is no condition on what it encloses. */
export interface Guard {
  readonly open: HeaderLine;
  readonly define: HeaderLine;
}

/**
 * `#ifndef X` (or `#if !defined(X)`), directly followed by `#define X` without a value, around the whole file:
 * nothing but comments and `#pragma once` stands outside, and it has no other branch.
 */
export function guardOf(lines: readonly HeaderLine[]): Guard | null {
  const solid = lines.filter((line) => line.kind !== "comment" && line.word !== "pragma");
  const [open, define] = solid;
  if (!open || !define || define.word !== "define" || define.body !== "") return null;
  if (guardedName(open) !== define.key) return null;
  return closesLast(solid) ? { open, define } : null;
}

function guardedName({ word, body }: HeaderLine): string | null {
  if (word === "ifndef") return body;
  return word === "if" ? (/^!\s*defined\s*\(?\s*(\w+)\s*\)?$/.exec(body)?.[1] ?? null) : null;
}

function closesLast(solid: readonly HeaderLine[]): boolean {
  let depth = 0;
  for (const [index, line] of solid.entries()) {
    if (line.word.startsWith("if")) depth++;
    else if (line.word === "endif") depth--;
    else if (depth === 1 && line.word.startsWith("el")) return false;
    if (depth === 0) return index === solid.length - 1;
  }
  return false;
}
