import { CONCEPTS, isNeutral } from "./name-words";

/** The words of a key: lower case, split at signs, at changes of case and at digits, joined words taken apart. */
export function splitName(key: string, axisNames: readonly string[]): string[] {
  const words: string[] = [];
  for (const chunk of key.replace(ABBREVIATIONS, lowered).split(/[^A-Za-z0-9µ]+/)) {
    if (chunk === "") continue;
    if (axisNames.includes(chunk.toLowerCase())) words.push(chunk.toLowerCase());
    else for (const word of chunk.split(BOUNDARY)) words.push(...takeApart(word.toLowerCase(), axisNames));
  }
  return words;
}

/** Units whose case would be taken for a change of words. */
const ABBREVIATIONS = /mA|mV|kHz|mOhm/g;
/** Before a capital that follows a small letter or leads a small one, and between letters and digits. */
const BOUNDARY = /(?<=[a-zµ])(?=[A-Z])|(?<=[A-Z])(?=[A-Z][a-z])|(?<=[A-Za-zµ])(?=\d)|(?<=\d)(?=[A-Za-zµ])/;
const LONGEST_JOINED = 24;

function lowered(unit: string): string {
  return unit.toLowerCase();
}

function takeApart(word: string, axisNames: readonly string[]): string[] {
  if (isKnown(word) || word.length < 4 || word.length > LONGEST_JOINED) return [word];
  return joined(word) ?? withAxis(word, axisNames) ?? [word];
}

function isKnown(word: string): boolean {
  return CONCEPTS.has(word) || isNeutral(word);
}

/** `maxspeed` as `max` and `speed`: the whole word must fall into known words of at least two letters. */
function joined(word: string): string[] | null {
  const parts: (string[] | null)[] = [[]];
  for (let end = 1; end <= word.length; end++) {
    let found: string[] | null = null;
    for (let start = 0; start <= end - 2 && !found; start++) {
      const before = parts[start];
      const piece = word.slice(start, end);
      if (before && isKnown(piece)) found = [...before, piece];
    }
    parts.push(found);
  }
  return parts[word.length] ?? null;
}

/** `xaccel`, `accelx`: a known word with an axis name before or behind it. */
function withAxis(word: string, axisNames: readonly string[]): string[] | null {
  for (const axis of axisNames) {
    const front = word.startsWith(axis) ? known(word.slice(axis.length)) : null;
    if (front) return [axis, ...front];
    const back = word.endsWith(axis) ? known(word.slice(0, -axis.length)) : null;
    if (back) return [...back, axis];
  }
  return null;
}

function known(word: string): string[] | null {
  return CONCEPTS.has(word) ? [word] : joined(word);
}
