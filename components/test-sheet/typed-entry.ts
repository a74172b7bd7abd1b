import type { HeatPlace, TestPlan, Trial, TrialTemperature } from "@/lib/domain/test-sheets";
import { HEAT_PLACE_WORDS, HEAT_PLACES } from "@/lib/domain/test-sheets";
import { windingTemperatureByResistance } from "@/lib/physics/motor-heat";
import { readDecimal } from "@/components/implementation/read-decimal";

/** What stands in the fields of the next entry, as typed. */
export interface TypedEntry {
  readonly deviation: string;
  readonly unit: NonNullable<Trial["deviation"]>["unit"];
  readonly celsius: Readonly<Record<HeatPlace, string>>;
  readonly ambient: string;
  readonly minutes: string;
  /** Winding resistance cold, the temperature at that, and hot. */
  readonly cold: string;
  readonly coldAt: string;
  readonly hot: string;
  readonly note: string;
}

const NO_TEMPERATURES = { case: "", winding: "", driver: "", mount: "" };
export const NOTHING_TYPED: TypedEntry = {
  deviation: "",
  unit: "full steps",
  celsius: NO_TEMPERATURES,
  ambient: "",
  minutes: "",
  cold: "",
  coldAt: "",
  hot: "",
  note: "",
};

/** What stays in the fields after an entry: the room, the unit, and the cold resistance. */
export function afterEntry(typed: TypedEntry): TypedEntry {
  const { unit, ambient, cold, coldAt } = typed;
  return { ...NOTHING_TYPED, unit, ambient, cold, coldAt };
}

const keyOf = (sheetId: string): string => `keepstep.test-sheet-typed.${sheetId}`;

export function keepTyped(sheetId: string, typed: TypedEntry): void {
  try {
    localStorage.setItem(keyOf(sheetId), JSON.stringify(typed));
  } catch {
    // A browser without room keeps nothing; what was typed is still on the page.
  }
}

/** What was typed before a reload; nothing where it cannot be read. */
export function keptTyped(sheetId: string): TypedEntry | null {
  try {
    const kept = JSON.parse(localStorage.getItem(keyOf(sheetId)) ?? "null") as Partial<TypedEntry> | null;
    if (!kept) return null;
    return { ...NOTHING_TYPED, ...kept, celsius: { ...NO_TEMPERATURES, ...kept.celsius } };
  } catch {
    return null;
  }
}

/** Temperature of the winding by its resistance, °C; null while one of the three numbers is missing or senseless. */
export function windingByResistance({ cold, coldAt, hot }: TypedEntry): number | null {
  const [from, at, to] = [readDecimal(cold), readDecimal(coldAt), readDecimal(hot)];
  if (from === null || at === null || to === null || from <= 0 || to <= 0) return null;
  return windingTemperatureByResistance({ cold: from, coldAt: at, hot: to });
}

type Numbers = Pick<Trial, "deviation" | "temperatures" | "ambientC" | "minutes" | "note">;
export type ReadEntry =
  { readonly ok: true; readonly entry: Numbers } | { readonly ok: false; readonly trouble: string };

interface Named {
  readonly name: string;
  readonly text: string;
  readonly least: number;
  readonly most: number;
}

/** The typed fields as numbers, or what cannot be read in them. */
export function readEntry(typed: TypedEntry, { heat }: Pick<TestPlan, "heat">): ReadEntry {
  const wrong = fieldsOf(typed).find(({ text, least, most }) => {
    if (text.trim() === "") return false;
    const value = readDecimal(text);
    return value === null || value < least || value > most;
  });
  if (wrong)
    return {
      ok: false,
      trouble: `${wrong.name}: “${wrong.text}” is not a number from ${wrong.least} to ${wrong.most}. Write digits, such as 61 or 61.5.`,
    };
  const temperatures = temperaturesOf(typed);
  if (heat && temperatures.length === 0) return { ok: false, trouble: "Enter at least one temperature." };
  const deviation = readDecimal(typed.deviation);
  return {
    ok: true,
    entry: {
      deviation: deviation === null ? null : { value: deviation, unit: typed.unit },
      temperatures,
      ambientC: readDecimal(typed.ambient),
      minutes: readDecimal(typed.minutes),
      note: typed.note.trim(),
    },
  };
}

function fieldsOf({ deviation, celsius, ambient, minutes, cold, coldAt, hot }: TypedEntry): Named[] {
  return [
    { name: "Off by", text: deviation, least: -1e6, most: 1e6 },
    ...HEAT_PLACES.map((place) => ({
      name: HEAT_PLACE_WORDS[place],
      text: celsius[place],
      least: -60,
      most: 400,
    })),
    { name: "Ambient", text: ambient, least: -60, most: 100 },
    { name: "Minutes", text: minutes, least: 0, most: 10_000 },
    { name: "Resistance cold", text: cold, least: 0.001, most: 1e6 },
    { name: "Temperature cold", text: coldAt, least: -60, most: 100 },
    { name: "Resistance hot", text: hot, least: 0.001, most: 1e6 },
  ];
}

function temperaturesOf(typed: TypedEntry): TrialTemperature[] {
  const byResistance = windingByResistance(typed);
  return HEAT_PLACES.flatMap((place): TrialTemperature[] => {
    const celsius = readDecimal(typed.celsius[place]);
    if (celsius !== null) return [{ place, celsius, by: "sensor" }];
    if (place !== "winding" || byResistance === null || byResistance > 400) return [];
    return [{ place, celsius: Math.round(byResistance * 10) / 10, by: "resistance" }];
  });
}
