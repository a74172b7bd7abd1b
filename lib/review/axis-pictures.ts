import { diffParameters } from "@/lib/diff/parameters";
import type { Assembly } from "@/lib/domain/assembly";
import type { KeyTable } from "@/lib/domain/key-table";
import type { ParameterName } from "@/lib/domain/parameters";
import type { Policy } from "@/lib/domain/policy";
import type { Basis, ParameterValue } from "@/lib/domain/values";
import type { RuleContext, RuleInput } from "@/lib/rules/types";
import { ruleContext } from "@/lib/rules/view";
import { mapFiles, parseFile } from "./check";
import { axisOf, mapMoves, operatingMap } from "./operating-map";
import type { OperatingMap } from "./operating-map";
import { temperatureCourse } from "./temperature-course";
import type { DutyCycle, TemperatureCourse } from "./temperature-course";
import { torqueCurve } from "./torque-curve";
import type { TorqueCurve } from "./torque-curve";
import type { ConfigurationFile } from "./types";

/** Parameters that can be tried on an axis beside what its text says. */
export const TRIED = ["max_speed", "acceleration", "run_current"] as const satisfies readonly ParameterName[];
export type Tried = (typeof TRIED)[number];

export interface Texts {
  readonly files: readonly ConfigurationFile[];
  readonly keyTable: KeyTable;
  readonly assembly: Assembly;
  readonly policy: Policy;
}

/** What the pages of an axis ask their worker. */
export interface AxisPicturesRequest {
  readonly kind: "axis";
  /** Counts up; an answer to an older request is dropped. */
  readonly id: number;
  readonly axis: string;
  readonly texts: Texts;
  /** Inside units; a current in the basis of the text. */
  readonly tried: Readonly<Partial<Record<Tried, number>>>;
  readonly duty: DutyCycle;
}

/** What the text says of a parameter that can be tried. */
export interface TriedNow {
  readonly parameter: Tried;
  readonly value: number;
  readonly unit: string;
  readonly basis: Basis | null;
}

export interface AxisPictures {
  readonly kind: "axis";
  readonly id: number;
  readonly map: OperatingMap;
  readonly torque: TorqueCurve;
  readonly heat: TemperatureCourse;
  readonly now: readonly TriedNow[];
}

/** What the editor of a proposal asks the same worker: the maps that its text moves. */
export interface ChangeMapsRequest {
  readonly kind: "change";
  readonly id: number;
  /** Empty where nothing is there before. */
  readonly base: readonly ConfigurationFile[];
  readonly texts: Texts;
}

export interface ChangeMaps {
  readonly kind: "change";
  readonly id: number;
  readonly maps: readonly OperatingMap[];
}

export type PicturesRequest = AxisPicturesRequest | ChangeMapsRequest;
export type PicturesAnswer = AxisPictures | ChangeMaps;

/** The worker's whole work. `before` is what `readBefore` makes of the same request, where the caller has it already. */
export function answerPictures(
  request: PicturesRequest,
  before: RuleInput | null = readBefore(request),
): PicturesAnswer {
  if (request.kind === "axis") return axisPictures(request);
  const { id, texts } = request;
  return { kind: "change", id, maps: changeMaps(before, inputOf(texts, texts.files)) };
}

/** The texts that a change starts from, as read: the same while it is typed, so that they need reading only once. */
export function readBefore(request: PicturesRequest): RuleInput | null {
  if (request.kind === "axis" || request.base.length === 0) return null;
  return inputOf(request.texts, request.base);
}

/** The three pictures of one axis: as its text stands or, where numbers are tried, the text before and the trial after. */
export function axisPictures({ id, axis, texts, tried, duty }: AxisPicturesRequest): AxisPictures {
  const stands = ruleContext(inputOf(texts, texts.files));
  const names = TRIED.filter((name) => tried[name] !== undefined);
  const trial = names.reduce(
    (context, name) => withTried({ context, axis, name, value: tried[name] }),
    stands,
  );
  const sides = { axis, was: names.length === 0 ? null : stands, toBe: trial };
  return {
    kind: "axis",
    id,
    map: operatingMap(sides),
    torque: torqueCurve(sides),
    heat: temperatureCourse({ ...sides, duty }),
    now: TRIED.flatMap((parameter) => nowOf(stands, axis, parameter)),
  };
}

function inputOf({ keyTable, assembly, policy }: Texts, files: readonly ConfigurationFile[]): RuleInput {
  const { parameters } = mapFiles(files.map(parseFile), { keyTable, assembly });
  return { parameters, assembly, policy };
}

function withTried(input: {
  readonly context: RuleContext;
  readonly axis: string;
  readonly name: Tried;
  readonly value: number | undefined;
}): RuleContext {
  const view = axisOf(input.context, input.axis);
  if (!view || input.value === undefined) return input.context;
  return input.context.withValue(view.axis, input.name, input.value);
}

function nowOf(context: RuleContext, axis: string, parameter: Tried): TriedNow[] {
  const found = axisOf(context, axis)?.parameter(parameter);
  return found ? [{ parameter, value: found.value, unit: found.unit, basis: found.basis }] : [];
}

/** The maps that a change moves, in the order of the assembly; without anything before, every axis's. */
export function changeMaps(before: RuleInput | null, after: RuleInput): OperatingMap[] {
  const touched = before && touchedAxes(before.parameters, after.parameters);
  const was = before && ruleContext(before);
  const toBe = ruleContext(after);
  return after.assembly.axes
    .filter(({ axis }) => touched === null || touched.has(axis.toLowerCase()) || touched.has(""))
    .map(({ axis }) => operatingMap({ axis, was, toBe }))
    .filter(mapMoves);
}

/** Axes with a changed parameter, in lower case; "" where one of the machine changed. */
function touchedAxes(before: readonly ParameterValue[], after: readonly ParameterValue[]): Set<string> {
  return new Set(diffParameters(before, after).map(({ axis }) => axis?.toLowerCase() ?? ""));
}
