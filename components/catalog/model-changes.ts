import { loadSchema } from "@/lib/domain/assembly";
import { CATALOG_KIND_WORDS, type ModelAxis, type ModelHardware } from "@/lib/domain/catalog";
import type { ModelView } from "@/lib/schemas/machine-models";
import { formFields, valueAt } from "@/lib/schemas/form-fields";
import { fieldWords, type FieldChange } from "./item-changes";

type Items = ModelView["items"];

const AXIS_PARTS = ["motor", "driver", "drive_train", "mount"] as const;
const NUMBERS = [
  ["motor_count", "motors", ""],
  ["travel_mm", "travel", "mm"],
  ["travel_deg", "travel", "deg"],
] as const;

function itemWords(id: string | null, items: Items): string {
  if (id === null) return "not stated";
  return items.find((item) => item.id === id)?.code ?? "an item that is gone";
}

function differing(label: string, was: string, toBe: string): FieldChange[] {
  return was === toBe ? [] : [{ label, was, toBe }];
}

function axisChanges(was: ModelAxis, toBe: ModelAxis, items: Items): FieldChange[] {
  const name = `axis ${toBe.axis}`;
  return [
    ...AXIS_PARTS.flatMap((part) =>
      differing(
        `${name}, ${CATALOG_KIND_WORDS[part].one}`,
        itemWords(was[part], items),
        itemWords(toBe[part], items),
      ),
    ),
    ...NUMBERS.flatMap(([field, label, unit]) =>
      differing(`${name}, ${label}`, fieldWords({ unit }, was[field]), fieldWords({ unit }, toBe[field])),
    ),
    ...formFields(loadSchema).flatMap((field) =>
      differing(
        `${name}, ${field.label.toLowerCase()}`,
        fieldWords(field, valueAt(was.load, field.path)),
        fieldWords(field, valueAt(toBe.load, field.path)),
      ),
    ),
    ...differing(
      `${name}, coupled with`,
      was.coupled_with.join(", ") || "none",
      toBe.coupled_with.join(", ") || "none",
    ),
  ];
}

/** What one version of a model's hardware has otherwise than the version before it. */
export function modelChanges(was: ModelHardware, toBe: ModelHardware, items: Items): FieldChange[] {
  const before = new Map(was.axes.map((axis) => [axis.axis.toLowerCase(), axis]));
  const after = new Set(toBe.axes.map(({ axis }) => axis.toLowerCase()));
  const gone = was.axes.filter(({ axis }) => !after.has(axis.toLowerCase()));
  const order = (hardware: ModelHardware) => hardware.axes.map(({ axis }) => axis).join(", ");
  return [
    ...(["supply", "controller_board"] as const).flatMap((part) =>
      differing(CATALOG_KIND_WORDS[part].one, itemWords(was[part], items), itemWords(toBe[part], items)),
    ),
    ...differing(
      "rise inside the enclosure",
      fieldWords({ unit: "K" }, was.enclosure_rise_k),
      fieldWords({ unit: "K" }, toBe.enclosure_rise_k),
    ),
    ...differing(
      "read-back",
      fieldWords({ unit: "" }, was.has_read_back),
      fieldWords({ unit: "" }, toBe.has_read_back),
    ),
    ...differing("axes", order(was), order(toBe)),
    ...gone.map(({ axis }) => ({ label: `axis ${axis}`, was: "there", toBe: "taken out" })),
    ...toBe.axes.flatMap((axis) => {
      const old = before.get(axis.axis.toLowerCase());
      return old
        ? axisChanges(old, axis, items)
        : [{ label: `axis ${axis.axis}`, was: "none", toBe: "added" }];
    }),
  ];
}
