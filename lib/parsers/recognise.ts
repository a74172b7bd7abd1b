import { afterLineEnd, CHAR, lineEnd, skipBlanks } from "./chars";
import { cutLine } from "./lines/lex";
import { Pieces } from "./pieces";
import { rankJson } from "./json/rank";
import { rankToml } from "./toml/rank";
import { rankYaml } from "./yaml/rank";
import { rankCsv } from "./csv/rank";
import { rankEnv } from "./env/rank";
import { rankProperties } from "./properties/rank";
import { score, type FormatRank } from "./rank";
import { PIECE, type Format } from "./types";

export interface Recognition {
  /** null: no format fits. */
  readonly format: Format | null;
  /** Best first. */
  readonly ranking: readonly FormatRank[];
}

/** So many characters of a text decide. */
const SAMPLE = 16 * 1024;
const LEAST_SCORE = 0.3;

/** Tells the format of a text from its own lines first and from its file name second. */
export function recogniseFormat({ path, text }: { path: string; text: string }): Recognition {
  const sample = { text: text.slice(0, SAMPLE), whole: text.length <= SAMPLE, extension: extension(path) };
  const counts = countLines(sample.text);
  const ranks = [
    rankJson(sample),
    rankToml(sample),
    rankYaml(sample),
    rankProperties(sample),
    rankEnv(sample),
    rankCsv(sample),
    rankLines(path, counts),
    rankDefines(path, counts),
  ];
  const ranking = ranks.sort((a, b) => b.score - a.score);
  const best = ranking[0];
  return { format: best && best.score >= LEAST_SCORE ? best.format : null, ranking };
}

interface Counts {
  directives: number;
  pairs: number;
  sections: number;
  other: number;
}

function countLines(sample: string): Counts {
  const counts: Counts = { directives: 0, pairs: 0, sections: 0, other: 0 };
  const cut = new Pieces(8);
  for (let at = 0; at < sample.length;) {
    const end = lineEnd(sample, at);
    const from = skipBlanks(sample, at, end);
    if (isDirective(sample, from, end)) counts.directives++;
    else if (from < end) countPlainLine(sample, { from, end, cut }, counts);
    at = afterLineEnd(sample, end);
  }
  return counts;
}

const DIRECTIVE = /^(?:\/\/+|\/\*)?\s*#\s*(?:define|undef|ifn?def|if|elif|else|endif|include|pragma)\b/;

/** A preprocessor directive, or one in a comment. */
function isDirective(sample: string, from: number, end: number): boolean {
  const first = sample.charCodeAt(from);
  if (first !== CHAR.hash && first !== CHAR.slash) return false;
  return DIRECTIVE.test(sample.slice(from, Math.min(end, from + 40)));
}

interface PlainLine {
  readonly from: number;
  readonly end: number;
  /** Used again for each line. */
  readonly cut: Pieces;
}

function countPlainLine(sample: string, { from, end, cut }: PlainLine, counts: Counts): void {
  cut.clear();
  cutLine(sample, from, end, cut);
  if (cut.kind(0) === PIECE.section && !isListOfObjects(sample, cut)) counts.sections++;
  else if (cut.kind(0) === PIECE.key && isPair(sample, cut)) counts.pairs++;
  else if (cut.kind(0) !== PIECE.comment) counts.other++;
}

/** A key and a value with a marked separator, or with white space and one further word. Prose has more words. */
function isPair(sample: string, cut: Pieces): boolean {
  if (isBraced(sample, cut)) return false;
  if (cut.kind(1) !== PIECE.separator || cut.kind(2) !== PIECE.value) return false;
  const marked = skipBlanks(sample, cut.start(1), cut.end(1)) < cut.end(1);
  return marked || !/\s[A-Za-z]+\s/.test(sample.slice(cut.start(2), cut.end(2)));
}

/** `{ …` and `"name": …` are members of an object rather than lines. */
function isBraced(sample: string, cut: Pieces): boolean {
  const first = sample.charCodeAt(cut.start(0));
  if (first === CHAR.openBrace || first === CHAR.closeBrace) return true;
  return first === CHAR.doubleQuote && sample.charCodeAt(cut.end(0)) === CHAR.colon;
}

/** `[{ …` and `["…` begin a list and name no section. */
function isListOfObjects(sample: string, cut: Pieces): boolean {
  const second = sample.charCodeAt(skipBlanks(sample, cut.start(0) + 1, cut.end(0)));
  return second === CHAR.openBrace || second === CHAR.doubleQuote;
}

function extension(path: string): string {
  return /\.([A-Za-z0-9]+)$/.exec(path)?.[1]?.toLowerCase() ?? "";
}

const LINE_FILES = ["conf", "cfg", "cnf", "config", "ini", "txt", "settings", "dump", "prm", "par"];
const HEADER_FILES = ["h", "hh", "hpp", "hxx", "c", "cpp", "ino", "inc"];

function rankLines(path: string, counts: Counts): FormatRank {
  const read = counts.pairs + counts.sections;
  const share = read / Math.max(1, read + counts.directives + counts.other);
  const named = LINE_FILES.includes(extension(path));
  const reasons: string[] = [];
  if (counts.pairs > 0) reasons.push(`${counts.pairs} lines hold a key and a value`);
  if (counts.sections > 0) reasons.push(`${counts.sections} lines name a section in brackets`);
  if (named) reasons.push(`the file name ends in .${extension(path)}`);
  return { format: "lines", score: score(share, named), reasons };
}

function rankDefines(path: string, counts: Counts): FormatRank {
  const share = counts.directives / Math.max(1, counts.directives + counts.pairs + counts.sections);
  const named = HEADER_FILES.includes(extension(path));
  const reasons: string[] = [];
  if (counts.directives > 0) reasons.push(`${counts.directives} lines are preprocessor directives`);
  if (named) reasons.push(`the file name ends in .${extension(path)}`);
  return { format: "defines", score: score(share, named), reasons };
}
