import { mapDocuments } from "@/lib/keytable/map-documents";
import type { AxisShape } from "@/lib/keytable/types";
import { writeParameters } from "@/lib/keytable/write-parameters";
import type { ParameterEdit } from "@/lib/keytable/types";
import { parseText } from "@/lib/parsers/parse-text";
import type { KeyRule } from "@/lib/domain/key-table";
import type { Layer } from "@/lib/domain/readings";

/** Belt axes x and y with 40 mm a turn and 200 full steps, a rotary axis c with 3 motor turns a turn. */
export const AXES: readonly AxisShape[] = [
  { axis: "X", kind: "linear", travelPerTurn: 0.04, fullStepsPerTurn: 200 },
  { axis: "Y", kind: "linear", travelPerTurn: 0.04, fullStepsPerTurn: 200 },
  { axis: "C", kind: "rotary", travelPerTurn: (2 * Math.PI) / 3, fullStepsPerTurn: 200 },
];

export interface Setting {
  readonly text: string | readonly string[];
  readonly rules: readonly KeyRule[];
  readonly axes?: readonly AxisShape[];
  readonly layer?: Layer;
  readonly path?: string;
}

function documentsOf({ text, path = "a.conf" }: Setting) {
  const texts = typeof text === "string" ? [text] : text;
  return texts.map((one, index) => parseText({ path: index === 0 ? path : `${index}-${path}`, text: one }));
}

function inputOf(setting: Setting) {
  const { rules, axes = AXES, layer } = setting;
  return { documents: documentsOf(setting), keyTable: { rules: [...rules] }, axes, layer };
}

export function map(setting: Setting) {
  return mapDocuments(inputOf(setting));
}

/** "X run_current 0.8 A rms" for each parameter. */
export function said(setting: Setting): string[] {
  return map(setting).parameters.map(({ axis, parameter, value, unit, basis }) =>
    [axis ?? "machine", parameter, Number(value.toPrecision(9)), unit, basis]
      .filter((part) => part !== "" && part !== null)
      .join(" "),
  );
}

/** "code: message" for each diagnostic of each document. */
export function complaints(setting: Setting): string[] {
  return map(setting).diagnostics.flatMap((list) => list.map(({ code, message }) => `${code}: ${message}`));
}

export function write(setting: Setting, ...edits: ParameterEdit[]) {
  return writeParameters({ ...inputOf(setting), edits });
}
