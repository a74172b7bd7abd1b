/** So many significant digits are enough where the value has no short exact spelling. */
const DIGITS = 6;
/** A value that so many digits hold exactly is written in full. */
const MOST_EXACT = 9;

/**
 * A number in the manner of an older spelling: plain decimals, at least as many of them as before, hexadecimal
 * kept for whole numbers. Holds the value to six significant digits at least.
 */
export function spellNumber(value: number, was: string): string {
  const bare = was.replaceAll("_", "");
  if (/^[+-]?0x/i.test(bare) && Number.isInteger(value) && value >= 0) return spellHex(value, bare);
  const plain = padDecimals(expand(digitsOf(value)), decimalsOf(bare));
  return /\d_\d{3}(?!\d)/.test(was) ? groupThousands(plain) : plain;
}

/** 12000.5 as 12_000.5, where the older spelling set its thousands apart so. */
function groupThousands(plain: string): string {
  const [whole = "", fraction] = plain.split(".");
  const grouped = whole.replace(/(?<=\d)(?=(?:\d{3})+$)/g, "_");
  return fraction === undefined ? grouped : `${grouped}.${fraction}`;
}

function spellHex(value: number, was: string): string {
  const width = was.replace(/^[+-]?0x/i, "").length;
  const digits = value.toString(16).padStart(width, "0");
  const prefix = /^[+-]?(0x)/i.exec(was)?.[1] ?? "0x";
  return prefix + (/[A-F]/.test(was) ? digits.toUpperCase() : digits);
}

/** The shortest exact digits up to nine, else six. */
function digitsOf(value: number): string {
  for (let digits = 1; digits <= MOST_EXACT; digits++) {
    const text = value.toPrecision(digits);
    if (Math.abs(Number(text) - value) <= 1e-12 * Math.abs(value)) return text;
  }
  return value.toPrecision(DIGITS);
}

/** Decimal digits without an exponent. */
function expand(text: string): string {
  const [mantissa = "", exponent] = text.split("e");
  if (exponent === undefined) return trimZeros(mantissa);
  const negative = mantissa.startsWith("-");
  const [whole = "", fraction = ""] = mantissa.replace("-", "").split(".");
  const digits = whole + fraction;
  const point = whole.length + Number(exponent);
  const padded = point > 0 ? digits.padEnd(point, "0") : digits.padStart(digits.length - point + 1, "0");
  const at = Math.max(point, 1);
  return (negative ? "-" : "") + trimZeros(`${padded.slice(0, at)}.${padded.slice(at)}`);
}

function trimZeros(text: string): string {
  return text.includes(".") ? text.replace(/\.?0*$/, "") : text;
}

function decimalsOf(was: string): number {
  if (/e/i.test(was)) return 0;
  const point = was.indexOf(".");
  return point < 0 ? 0 : was.length - point - 1;
}

/** Keeps the decimals that the older spelling had, so that 80.00 becomes 100.00. */
function padDecimals(text: string, decimals: number): string {
  if (decimals === 0) return text;
  const point = text.indexOf(".");
  const have = point < 0 ? 0 : text.length - point - 1;
  return have >= decimals ? text : `${text}${point < 0 ? "." : ""}${"0".repeat(decimals - have)}`;
}
