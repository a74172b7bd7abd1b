import type { FieldValues, Path, UseFormRegisterReturn, UseFormReturn } from "react-hook-form";

export interface Registered extends UseFormRegisterReturn {
  readonly defaultValue: string;
}

/** Registers an entry with its value, so that the page shows it before its script is awake. */
export function registered<T extends FieldValues, O>(
  form: UseFormReturn<T, unknown, O>,
  path: Path<T>,
): Registered {
  const value: unknown = form.getValues(path);
  return { ...form.register(path), defaultValue: typeof value === "string" ? value : "" };
}
