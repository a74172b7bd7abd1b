import { z } from "zod";
import { readTypedNumber } from "./typed-number";

/** A number typed into a form, then checked by its schema; an empty entry is null, never 0. */
export function typedNumber<T, I extends number | null>(schema: z.ZodType<T, I>) {
  const read = z.string().transform((typed, context): number | null => {
    const number = readTypedNumber(typed);
    if (number.ok) return number.value ?? null;
    context.addIssue({ code: "custom", message: number.sentence });
    return z.NEVER;
  });
  // A schema that does not take null refuses it with its own sentence.
  return read.pipe(schema as unknown as z.ZodType<T, number | null>);
}
