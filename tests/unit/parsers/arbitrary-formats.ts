import type fc from "fast-check";
import type { Format } from "@/lib/parsers/types";
import { tomlText, tomlValue } from "./arbitrary-toml";
import { yamlText, yamlValue } from "./arbitrary-yaml";
import { csvText, csvValue, envText, envValue, propertiesText, propertiesValue } from "./arbitrary-plain";
import { jsonText, jsonValue } from "./arbitrary-json";
import { defineText, defineValue, lineText, lineValue, type ModelText } from "./arbitrary-texts";

/** Texts of each format with what they say. */
export const TEXTS: Record<Format, fc.Arbitrary<ModelText>> = {
  lines: lineText,
  defines: defineText,
  json: jsonText,
  toml: tomlText,
  yaml: yamlText,
  properties: propertiesText,
  env: envText,
  csv: csvText,
};

/** Values of each format, as typed. */
export const VALUES: Record<Format, fc.Arbitrary<string>> = {
  lines: lineValue,
  defines: defineValue,
  json: jsonValue,
  toml: tomlValue,
  yaml: yamlValue,
  properties: propertiesValue,
  env: envValue,
  csv: csvValue,
};
