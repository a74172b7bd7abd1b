/** A number as people type it, with a decimal point or comma; null for anything else. */
export function readDecimal(text: string): number | null {
  const written = text.trim().replace(",", ".");
  if (!/^[+-]?(\d+(\.\d*)?|\.\d+)$/.test(written)) return null;
  return Number(written);
}
