import { AXIS_PARAMETERS, parameterDefinition } from "@/lib/domain/parameters";
import type { ParameterName } from "@/lib/domain/parameters";
import {
  driverSchema,
  driveTrainSchema,
  loadSchema,
  motorSchema,
  mountSchema,
  setPointSchema,
  supplySchema,
} from "@/lib/domain/assembly";
import { fieldNotes } from "@/lib/domain/field-notes";
import type { Missing } from "./types";

const PARTS = {
  motor: { shape: motorSchema.shape, word: "motor" },
  driver: { shape: driverSchema.shape, word: "driver" },
  "driver.set_point": { shape: setPointSchema.shape, word: "driver" },
  drive_train: { shape: driveTrainSchema.shape, word: "drive train" },
  load: { shape: loadSchema.shape, word: "load" },
  mount: { shape: mountSchema.shape, word: "mount" },
  supply: { shape: supplySchema.shape, word: "supply" },
} as const;

const WORDS: Readonly<Record<string, string>> = {
  ambient_c: "the ambient temperature",
  "controller_board.max_step_rate_hz": "the controller board's highest step rate",
  travel_mm: "the travel of the axis",
  travel_deg: "the travel of the axis",
  "motor.rated_current_basis": "whether the motor's rated current is peak or rms",
  "driver.max_current_basis": "whether the driver's maximum current is peak or rms",
  "driver.set_point.basis": "whether the driver's set-point is peak or rms",
  "drive_train.kind": "the kind of drive train",
  "motor.connection": "how the motor's coils are connected",
  "load.holding_brake": "whether the load has a holding brake",
  "load.inertia_kgm2": "the load inertia at the output",
};

const AXIS_PATH = new RegExp(
  `^axes\\.(.+?)\\.((?:(?:motor|driver|drive_train|load|mount)\\.|travel_mm$|travel_deg$|(?:${AXIS_PARAMETERS.join("|")})(?:\\.basis)?$).*)$`,
);

/** What is missing, in words: "Not known: the motor's winding inductance. Not in the text: the corner speed." */
export function missingSentence({ needs, reason, refused = [] }: Missing, axis: string | null): string {
  const places = needs.filter((path) => !refused.includes(path)).map((path) => place(path, axis));
  const list = (of: Place["where"]) => places.filter(({ where }) => where === of).map(({ words }) => words);
  const sentences = [
    sentence("Not known", list("hardware")),
    sentence("Not in the text", list("text")),
    reason,
  ];
  return `${sentences.filter((words) => words !== "").join(" ")}`.trim();
}

function sentence(head: string, words: readonly string[]): string {
  return words.length === 0 ? "" : `${head}: ${[...new Set(words)].join(", ")}.`;
}

interface Place {
  readonly where: "hardware" | "text";
  readonly words: string;
}

function place(path: string, axis: string | null): Place {
  const match = AXIS_PATH.exec(path);
  const field = match?.[2] ?? path;
  // The finding of an axis says its axis anyway.
  const of = match && axis === null ? ` of axis ${match[1]}` : "";
  const parameter = AXIS_PARAMETERS.find((name) => field === name || field === `${name}.basis`);
  if (parameter === undefined) return { where: "hardware", words: `${hardwareWords(field)}${of}` };
  const label = parameterLabelOf(parameter);
  return field.endsWith(".basis")
    ? { where: "hardware", words: `whether the ${label} in the text is peak or rms${of}` }
    : { where: "text", words: `${label}${of}` };
}

function parameterLabelOf(name: ParameterName): string {
  return lowered(parameterDefinition(name).label);
}

type NotedSchema = Parameters<typeof fieldNotes.get>[0];

function hardwareWords(field: string): string {
  const words = WORDS[field];
  if (words !== undefined) return words;
  const dot = field.lastIndexOf(".");
  const part = Object.entries(PARTS).find(([name]) => name === field.slice(0, dot))?.[1];
  const shape: Readonly<Record<string, NotedSchema>> = part?.shape ?? {};
  const schema = shape[field.slice(dot + 1)];
  const label = schema && fieldNotes.get(schema)?.label;
  return part && label ? `the ${part.word}'s ${lowered(label).replace(/, (.+)$/, " ($1)")}` : field;
}

/** A label inside a sentence. */
function lowered(label: string): string {
  return label.charAt(0).toLowerCase() + label.slice(1);
}
