import type { z } from "zod";
import { axisAssemblySchema, assemblySchema, setPointSchema } from "./assembly";
import { fieldNotes } from "./field-notes";
import { PARAMETER_NAMES, parameterDefinition, type ParameterName } from "./parameters";

/** A missing datum in words and the place where it can be put in. */
export interface Need {
  /** "winding inductance of the X motor", "X corner speed" */
  readonly words: string;
  /** `text`: the configuration has to state it; `hardware`: catalog, model or machine; `site`: the ambient. */
  readonly where: "text" | "hardware" | "site";
}

const PART_WORDS: Readonly<Record<string, string>> = {
  motor: "motor",
  driver: "driver",
  drive_train: "drive train",
  load: "load",
  mount: "mount",
  supply: "supply",
  controller_board: "controller board",
};

/** The fields of an object schema, however deep its `optional` wrapping. */
function shapeOf(schema: unknown): Readonly<Record<string, z.ZodType>> {
  if (typeof schema !== "object" || schema === null) return {};
  if ("shape" in schema) return schema.shape as Record<string, z.ZodType>;
  if ("unwrap" in schema && typeof schema.unwrap === "function") return shapeOf(schema.unwrap());
  return {};
}

function lowerFirst(words: string): string {
  return /^[A-Z][a-z ,]/.test(words) ? `${words[0]?.toLowerCase() ?? ""}${words.slice(1)}` : words;
}

function fieldWords(shape: Readonly<Record<string, z.ZodType>>, field: string): string {
  const schema = shape[field];
  const label = schema === undefined ? undefined : fieldNotes.get(schema)?.label;
  return label === undefined ? field.replace(/_/g, " ") : lowerFirst(label);
}

/** "the X motor", "the supply" */
function partWords(part: string, axis: string): string {
  const words = PART_WORDS[part] ?? part.replace(/_/g, " ");
  return axis === "" ? `the ${words}` : `the ${axis} ${words}`;
}

function hardwareNeed(
  shape: Readonly<Record<string, z.ZodType>>,
  path: readonly string[],
  axis: string,
): Need {
  const [first = "", second, third] = path;
  if (second === undefined) {
    if (Object.hasOwn(PART_WORDS, first)) return { words: partWords(first, axis), where: "hardware" };
    const words = fieldWords(shape, first);
    return { words: axis === "" ? words : `${words} of the ${axis} axis`, where: "hardware" };
  }
  const inPart = shapeOf(shape[first]);
  const words = third === undefined ? fieldWords(inPart, second) : fieldWords(setPointSchema.shape, third);
  return { words: `${words} of ${partWords(first, axis)}`, where: "hardware" };
}

function parameterNeed(name: ParameterName, [, detail]: readonly string[], axis: string): Need {
  const label = lowerFirst(parameterDefinition(name).label);
  const words = axis === "" ? label : `${axis} ${label}`;
  if (detail === "basis") return { words: `whether the ${words} is peak or rms`, where: "text" };
  return { words, where: "text" };
}

function isParameter(name: string | undefined): name is ParameterName {
  return PARAMETER_NAMES.some((known) => known === name);
}

/**
 * A path of missing data, as findings name them ("axes.x.motor.inductance_mh", "axes.x.run_current.basis",
 * "supply.voltage_v", "ambient_c"), in words. An unknown path comes back as it is.
 */
export function needWords(path: string): Need {
  const steps = path.split(".");
  const onAxis = steps[0] === "axes" && steps.length > 2;
  const name = onAxis ? (steps[1] ?? "") : "";
  const axis = name.length <= 2 ? name.toUpperCase() : `${name[0]?.toUpperCase() ?? ""}${name.slice(1)}`;
  const rest = onAxis ? steps.slice(2) : steps;
  const [first] = rest;
  if (isParameter(first)) return parameterNeed(first, rest, axis);
  const shape: Readonly<Record<string, z.ZodType>> = onAxis ? axisAssemblySchema.shape : assemblySchema.shape;
  if (first === undefined || !Object.hasOwn(shape, first)) return { words: path, where: "hardware" };
  if (first === "ambient_c") return { words: "ambient temperature of the site", where: "site" };
  return hardwareNeed(shape, rest, axis);
}
