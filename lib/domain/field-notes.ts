import { z } from "zod";

/** What a form says beside a field. */
export interface FieldNote {
  readonly label: string;
  /** Empty for counts, choices and words. */
  readonly unit: string;
  readonly help?: string;
}

/** Label and unit of every stored hardware field, kept beside its schema so that forms, API and checks use the same words. */
export const fieldNotes = z.registry<FieldNote>();

function note<T extends z.ZodType>(schema: T, label: string, unit: string, help?: string): T {
  const described = schema.describe(unit === "" ? label : `${label}, ${unit}`) as T;
  fieldNotes.add(described, help === undefined ? { label, unit } : { label, unit, help });
  return described;
}

const finite = z.number().finite();

/** More than zero; data sheets leave fields out, so every field may be missing. */
export function positive(label: string, unit: string, help?: string) {
  return note(finite.positive().optional(), label, unit, help);
}

export function notNegative(label: string, unit: string, help?: string) {
  return note(finite.min(0).optional(), label, unit, help);
}

export function anyNumber(label: string, unit: string, help?: string) {
  return note(finite.optional(), label, unit, help);
}

export function within(min: number, max: number, label: string, unit: string, help?: string) {
  return note(finite.min(min).max(max).optional(), label, unit, help);
}

export function choice<const T extends readonly [string, ...string[]]>(
  values: T,
  label: string,
  help?: string,
) {
  return note(z.enum(values).optional(), label, "", help);
}

export function yesNo(label: string, help?: string) {
  return note(z.boolean().optional(), label, "", help);
}
