import { CONCEPTS, isNeutral, isWord } from "./name-words";

/** Units whose case would be taken for a change of words. */
const ABBREVIATIONS = /mA|mV|kHz|mOhm/g;
/** Before a capital that follows a small letter or leads a small one, and between letters and digits. */
const BOUNDARY = /(?<=[a-zµ])(?=[A-Z])|(?<=[A-Z])(?=[A-Z][a-z])|(?<=[A-Za-zµ])(?=\d)|(?<=\d)(?=[A-Za-zµ])/;
const SIGNS = /[^A-Za-z0-9µ]+/;
const LONGEST_JOINED = 24;
/** Names repeat from axis to axis; so many pieces of names are remembered. */
const MOST_REMEMBERED = 5000;

/** Splits keys into words: lower case, at signs, at changes of case and at digits, joined words taken apart. */
export class NameSplitter {
  private readonly known = new Map<string, readonly string[]>();

  /** `axisNames`: in lower case. */
  constructor(private readonly axisNames: readonly string[]) {}

  split(key: string): string[] {
    const words: string[] = [];
    for (const chunk of key.split(SIGNS)) if (chunk !== "") words.push(...this.wordsOf(chunk));
    return words;
  }

  private wordsOf(chunk: string): readonly string[] {
    const known = this.known.get(chunk);
    if (known) return known;
    const words = splitChunk(chunk, this.axisNames);
    if (this.known.size < MOST_REMEMBERED) this.known.set(chunk, words);
    return words;
  }
}

function splitChunk(chunk: string, axisNames: readonly string[]): readonly string[] {
  const lower = chunk.toLowerCase();
  if (axisNames.includes(lower) || isWord(lower)) return [lower];
  return chunk
    .replace(ABBREVIATIONS, lowered)
    .split(BOUNDARY)
    .flatMap((word) => takeApart(word.toLowerCase(), axisNames));
}

function lowered(unit: string): string {
  return unit.toLowerCase();
}

function takeApart(word: string, axisNames: readonly string[]): readonly string[] {
  if (isWord(word) || isNeutral(word) || word.length < 4 || word.length > LONGEST_JOINED) return [word];
  return joined(word) ?? withAxis(word, axisNames) ?? [word];
}

/** `maxspeed` as `max` and `speed`: the whole word must fall into known words of at least two letters. */
function joined(word: string): readonly string[] | null {
  const parts: (readonly string[] | null)[] = [[]];
  for (let end = 1; end <= word.length; end++) {
    let found: readonly string[] | null = null;
    for (let start = 0; start <= end - 2 && !found; start++) {
      const before = parts[start];
      const piece = before ? word.slice(start, end) : "";
      if (before && isWord(piece)) found = [...before, piece];
    }
    parts.push(found);
  }
  return parts[word.length] ?? null;
}

/** `xaccel`, `accelx`: a known word with an axis name before or behind it. */
function withAxis(word: string, axisNames: readonly string[]): readonly string[] | null {
  for (const axis of axisNames) {
    const front = word.startsWith(axis) ? known(word.slice(axis.length)) : null;
    if (front) return [axis, ...front];
    const back = word.endsWith(axis) ? known(word.slice(0, -axis.length)) : null;
    if (back) return [...back, axis];
  }
  return null;
}

function known(word: string): readonly string[] | null {
  return CONCEPTS.has(word) ? [word] : joined(word);
}
