import type { Diagnostic, DiagnosticCode } from "@/lib/domain/diagnostic";
import { Place } from "./place";

/** Largest file that is read: 2 MB. */
export const MAX_FILE_BYTES = 2 * 1024 * 1024;

export interface TextEncoding {
  readonly encoding: "utf-8" | "latin-1";
  /** Whether the bytes begin with a byte order mark (EF BB BF), which the text then does not hold. */
  readonly bom: boolean;
}

export interface Refusal {
  readonly ok: false;
  readonly diagnostic: Diagnostic;
}

export type Decoded = ({ readonly ok: true; readonly text: string } & TextEncoding) | Refusal;
export type Encoded = { readonly ok: true; readonly bytes: Uint8Array } | Refusal;

const MARK = [0xef, 0xbb, 0xbf];
/** More control characters than this share of the bytes, and the file is no text. */
const MOST_CONTROLS = 0.1;

/**
 * Reads the bytes of a text file: valid UTF-8 (RFC 3629) as UTF-8, anything else byte for byte as Latin-1
 * (ISO/IEC 8859-1). `encodeText` gives the same bytes back. Files that are empty, binary or too large are refused.
 */
export function decodeBytes(bytes: Uint8Array): Decoded {
  if (bytes.length > MAX_FILE_BYTES) return refuse("too-large", tooLarge(bytes.length));
  const bom = MARK.every((byte, index) => bytes[index] === byte);
  const body = bom ? bytes.subarray(MARK.length) : bytes;
  if (body.length === 0)
    return refuse(
      "empty",
      "The file is empty: it has no text in it. Nothing was kept; choose the file that the firmware reads.",
    );
  if (isUtf16(bytes))
    return refuse(
      "binary",
      "The file begins with the mark of UTF-16 text. Nothing was kept; save it as UTF-8 and send it again.",
    );
  const zero = body.indexOf(0);
  if (zero >= 0)
    return refuse(
      "binary",
      `The file is no text: byte ${zero + (bom ? MARK.length : 0) + 1} is zero. Nothing was kept; send the configuration text itself, not a compiled or packed file.`,
    );
  return decodeBody(body, bom);
}

function decodeBody(body: Uint8Array, bom: boolean): Decoded {
  const utf8 = decodeUtf8(body);
  const encoding = utf8 === null ? "latin-1" : "utf-8";
  const controls = countControls(body, encoding === "latin-1");
  if (controls > 2 && controls > MOST_CONTROLS * body.length)
    return refuse(
      "binary",
      `The file is no text: ${controls} of its ${body.length} bytes are control characters. Nothing was kept; send the configuration text itself, not a compiled or packed file.`,
    );
  if (utf8 !== null) return { ok: true, text: utf8, encoding, bom };
  return { ok: true, text: decodeLatin1(bom ? prefixed(body) : body), encoding, bom: false };
}

/** A mark before bytes that are not UTF-8 is three Latin-1 characters like any others. */
function prefixed(body: Uint8Array): Uint8Array {
  const bytes = new Uint8Array(body.length + MARK.length);
  bytes.set(MARK);
  bytes.set(body, MARK.length);
  return bytes;
}

function tooLarge(length: number): string {
  const size = (length / (1024 * 1024)).toFixed(1);
  return `The file has ${size} MB, and 2 MB is the most that is read. Nothing was kept; send the configuration text alone, without logs or other files in it.`;
}

function refuse(code: DiagnosticCode, message: string): Refusal {
  return { ok: false, diagnostic: { code, severity: "error", message, span: null } };
}

function isUtf16(bytes: Uint8Array): boolean {
  const [first, second] = bytes;
  return (first === 0xff && second === 0xfe) || (first === 0xfe && second === 0xff);
}

function decodeUtf8(body: Uint8Array): string | null {
  try {
    return new TextDecoder("utf-8", { fatal: true, ignoreBOM: true }).decode(body);
  } catch {
    return null;
  }
}

/** C0 controls other than white space and escape; in Latin-1 the C1 controls (80–9F) too. */
function countControls(body: Uint8Array, latin: boolean): number {
  let count = 0;
  for (const byte of body) {
    const white = (byte >= 9 && byte <= 13) || byte === 27;
    if ((byte < 32 && !white) || byte === 127 || (latin && byte >= 0x80 && byte <= 0x9f)) count++;
  }
  return count;
}

const CHUNK = 8192;

function decodeLatin1(bytes: Uint8Array): string {
  const parts: string[] = [];
  for (let i = 0; i < bytes.length; i += CHUNK)
    parts.push(String.fromCharCode(...bytes.subarray(i, i + CHUNK)));
  return parts.join("");
}

/** Bytes of a text in the encoding it came in; refused where that encoding has no such character. */
export function encodeText(text: string, { encoding, bom }: TextEncoding): Encoded {
  const misfit = encoding === "latin-1" ? firstAbove(text, 0xff) : firstLoneSurrogate(text);
  if (misfit >= 0) return { ok: false, diagnostic: notEncodable(text, misfit, encoding) };
  const body = encoding === "latin-1" ? encodeLatin1(text) : new TextEncoder().encode(text);
  return { ok: true, bytes: bom ? prefixed(body) : body };
}

function encodeLatin1(text: string): Uint8Array {
  const bytes = new Uint8Array(text.length);
  for (let i = 0; i < text.length; i++) bytes[i] = text.charCodeAt(i);
  return bytes;
}

function firstAbove(text: string, most: number): number {
  for (let i = 0; i < text.length; i++) if (text.charCodeAt(i) > most) return i;
  return -1;
}

/** Offset of half a surrogate pair, which no encoding can hold; -1 for none. */
function firstLoneSurrogate(text: string): number {
  for (let i = 0; i < text.length; i++) {
    const code = text.charCodeAt(i);
    if (code < 0xd800 || code > 0xdfff) continue;
    const next = text.charCodeAt(i + 1);
    if (code > 0xdbff || !(next >= 0xdc00 && next <= 0xdfff)) return i;
    i++;
  }
  return -1;
}

function notEncodable(text: string, at: number, encoding: TextEncoding["encoding"]): Diagnostic {
  const span = new Place(text).span(at, at + 1);
  const name = encoding === "latin-1" ? "Latin-1" : "UTF-8";
  const point = (text.codePointAt(at) ?? 0).toString(16).toUpperCase().padStart(4, "0");
  const message = `Line ${span.line}, column ${span.column} has the character U+${point}, which ${name} cannot hold. The file is in ${name} and was left as it was; write the line without that character.`;
  return { code: "not-encodable", severity: "error", message, span };
}

/** Byte offset in the file of a UTF-16 offset in its text. */
export function byteOffset(text: string, { encoding, bom }: TextEncoding, offset: number): number {
  const mark = bom ? MARK.length : 0;
  if (encoding === "latin-1") return mark + offset;
  let bytes = mark;
  for (let i = 0; i < offset && i < text.length; i++) bytes += utf8Length(text.charCodeAt(i));
  return bytes;
}

/** Bytes of one UTF-16 code unit in UTF-8; the halves of a surrogate pair share four. */
function utf8Length(code: number): number {
  if (code < 0x80) return 1;
  if (code < 0x800) return 2;
  return code >= 0xd800 && code <= 0xdfff ? 2 : 3;
}
