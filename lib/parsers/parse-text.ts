import type { Diagnostic } from "@/lib/domain/diagnostic";
import { parseDefines } from "./defines";
import { parseJson } from "./json";
import { parseLines } from "./lines";
import { recogniseFormat } from "./recognise";
import { parseToml } from "./toml";
import { parseYaml } from "./yaml";
import { parseProperties } from "./properties";
import { parseEnv } from "./env";
import { parseCsv } from "./csv";
import type { Document, Format } from "./types";

const PARSERS: Record<Format, (path: string, text: string) => Document> = {
  lines: parseLines,
  defines: parseDefines,
  json: parseJson,
  toml: parseToml,
  yaml: parseYaml,
  properties: parseProperties,
  env: parseEnv,
  csv: parseCsv,
};

/** Reads a text of any format; without `format` the text itself decides. Never throws on a text. */
export function parseText({
  path,
  text,
  format,
}: {
  path: string;
  text: string;
  format?: Format | undefined;
}): Document {
  const found = format ?? recogniseFormat({ path, text }).format;
  const document = PARSERS[found ?? "lines"](path, text);
  return found === null
    ? { ...document, diagnostics: [unknownFormat(path), ...document.diagnostics] }
    : document;
}

function unknownFormat(path: string): Diagnostic {
  const message = `“${path}” looks like none of the known formats. It is kept and read as lines of keys and values; say the format if it is another one.`;
  return { code: "unknown-format", severity: "warning", message, span: null };
}
