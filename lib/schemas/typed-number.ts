export type TypedNumber =
  | { readonly ok: true; readonly value: number | undefined }
  | { readonly ok: false; readonly sentence: string };

const PLAIN = /^[+-]?(\d+([.,]\d*)?|[.,]\d+)(e[+-]?\d+)?$/i;
const GROUPED = /\d[.,\s]\d.*[.,]\d/;
const LEADING_NUMBER = /^[+-]?[\d.,]+\s*[^\d\s.,+-]/;

/**
 * A number as people type it: point or comma as the decimal sign, a typeset minus, an exponent. Nothing typed is a
 * missing number, never 0. What could be read in two ways is refused.
 */
export function readTypedNumber(typed: string): TypedNumber {
  const text = typed.trim().replace("\u2212", "-");
  if (text === "") return { ok: true, value: undefined };
  if (PLAIN.test(text)) {
    const value = Number(text.replace(",", "."));
    if (Number.isFinite(value)) return { ok: true, value };
    return { ok: false, sentence: `“${typed.trim()}” is too large a number.` };
  }
  return { ok: false, sentence: troubleOf(text, typed.trim()) };
}

function troubleOf(text: string, typed: string): string {
  if (GROUPED.test(text))
    return `“${typed}” can be read in two ways. Write it without grouping, with one point or comma: 1234.5`;
  if (LEADING_NUMBER.test(text))
    return `Write the number alone; the unit stands behind the field. “${typed}” has more than a number.`;
  return `“${typed}” is not a number. Write for example 1.5 or 1,5.`;
}
