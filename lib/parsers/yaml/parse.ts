import { Composer, CST, isMap, Lexer, Parser, type Document as YamlDocument, type YAMLError } from "yaml";
import { CHAR } from "../chars";
import { MOST_DEPTH, TreeBuilder } from "../tree";
import type { Document } from "../types";
import { readDisabled } from "./disabled";
import { cutYaml, isMark } from "./tokens";
import { walkDocument, type Walk } from "./walk";

/** Reads YAML 1.2. Never throws on a text; what it cannot read is kept and reported. */
export function parseYaml(path: string, text: string): Document {
  const build = new TreeBuilder(text);
  const walk: Walk = {
    build,
    text,
    keys: [],
    anchors: new Map(),
    active: new Set(),
    aliased: 0,
    told: false,
  };
  const documents = composed(build, text);
  const filled = documents.filter(
    ({ contents }) => contents !== null && (!isMap(contents) || contents.items.length > 0),
  );
  filled.forEach((document, index) => {
    walk.anchors.clear();
    walkDocument(walk, document, filled.length > 1 ? build.root.child(String(index)) : build.root);
  });
  for (const document of documents) for (const fault of document.errors) report(build, fault);
  const { pieces, comments } = cutYaml(text, new Set(walk.keys.map(({ start }) => start)));
  readDisabled(walk, comments);
  build.inOrder();
  const { entries, diagnostics } = build;
  return { path, format: "yaml", text, pieces: pieces.triples(), entries, diagnostics: diagnostics.all() };
}

/** The documents of a text. One that nests deeper than is read is left out and said; the next is read again. */
function composed(build: TreeBuilder, text: string): YamlDocument.Parsed[] {
  const tokens: CST.Token[] = [];
  let parser: Parser | null = new Parser();
  let at = 0;
  for (const lexeme of new Lexer().lex(text)) {
    if (parser === null && beginsDocument(lexeme, text, at)) parser = parserFrom(at);
    if (parser) {
      tokens.push(...parser.next(lexeme));
      if (parser.stack.length > MOST_DEPTH) {
        build.tooDeep(at, at + 1);
        parser = null;
      }
    }
    if (!isMark(lexeme, text, at)) at += lexeme.length;
  }
  if (parser) tokens.push(...parser.end());
  const composer = new Composer({ version: "1.2", uniqueKeys: false, prettyErrors: false });
  return [...composer.compose(tokens)];
}

function beginsDocument(lexeme: string, text: string, at: number): boolean {
  if (lexeme === CST.DOCUMENT) return isMark(lexeme, text, at);
  return lexeme === "---" && (at === 0 || text.charCodeAt(at - 1) === CHAR.lineFeed);
}

function parserFrom(offset: number): Parser {
  const parser = new Parser();
  parser.offset = offset;
  return parser;
}

const FAULTS: ReadonlyMap<string, string> = new Map([
  ["TAB_AS_INDENT", "a tab indents this line, and YAML indents by spaces alone."],
  ["BAD_INDENT", "the indentation fits no map and no list above it."],
  ["MISSING_CHAR", "a quote, a bracket, a comma, a colon or a blank is missing here."],
  ["MULTILINE_IMPLICIT_KEY", "a key must stand on one line with a colon behind it."],
  ["KEY_OVER_1024_CHARS", "a key has more than 1024 characters."],
  ["BLOCK_AS_IMPLICIT_KEY", "a map or list begins where only a plain value can stand."],
  ["BLOCK_IN_FLOW", "a map or list over several lines stands inside brackets."],
  ["BAD_DQ_ESCAPE", "a backslash stands before a character that needs none; write two for one."],
  ["BAD_SCALAR_START", "a value begins with a sign that YAML keeps for itself; put it in quotes."],
]);

function report(build: TreeBuilder, { code, pos: [start, end] }: YAMLError): void {
  const last = build.text.length;
  const span = build.lines.span(Math.min(start, last), Math.min(end, last));
  const what = FAULTS.get(code) ?? "something stands here that YAML 1.2 does not allow.";
  const message = `Line ${span.line}, column ${span.column}: ${what} The text is kept and read as far as that goes; mend it there.`;
  build.diagnostics.add("unreadable-line", "warning", span, message);
}
