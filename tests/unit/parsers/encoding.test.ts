import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { byteOffset, decodeBytes, encodeText, MAX_FILE_BYTES } from "@/lib/parsers/encoding";
import { RUNS, TIMEOUT } from "./arbitrary-texts";

function bytesOf(...parts: (string | number)[]): Uint8Array {
  return Uint8Array.from(
    parts.flatMap((part) => (typeof part === "number" ? [part] : [...new TextEncoder().encode(part)])),
  );
}

function decoded(bytes: Uint8Array) {
  const result = decodeBytes(bytes);
  if (!result.ok) throw new Error(result.diagnostic.message);
  return result;
}

function refusal(bytes: Uint8Array) {
  const result = decodeBytes(bytes);
  return result.ok ? null : result.diagnostic;
}

describe("reading bytes", () => {
  it("takes valid UTF-8 as UTF-8, with or without its mark (RFC 3629)", () => {
    expect(decoded(bytesOf("Größe = 5 µm"))).toEqual({
      ok: true,
      text: "Größe = 5 µm",
      encoding: "utf-8",
      bom: false,
    });
    expect(decoded(bytesOf(0xef, 0xbb, 0xbf, "a = 1"))).toEqual({
      ok: true,
      text: "a = 1",
      encoding: "utf-8",
      bom: true,
    });
  });

  it("takes anything else as Latin-1, each byte as the character of its number (ISO/IEC 8859-1)", () => {
    expect(decoded(bytesOf("Gr", 0xf6, 0xdf, "e = 5 ", 0xb5, "m"))).toMatchObject({
      text: "Größe = 5 µm",
      encoding: "latin-1",
    });
    expect(decoded(bytesOf("a = 1 ; ", 0x93, "x", 0x94)).text).toBe("a = 1 ; \u0093x\u0094");
  });

  it("takes the mark of UTF-8 before bytes that are not as three Latin-1 characters", () => {
    expect(decoded(bytesOf(0xef, 0xbb, 0xbf, "a = ", 0xe9))).toEqual({
      ok: true,
      text: "ï»¿a = é",
      encoding: "latin-1",
      bom: false,
    });
  });

  it.each([
    ["nothing in it", bytesOf(), "empty", "is empty"],
    ["a mark alone", bytesOf(0xef, 0xbb, 0xbf), "empty", "is empty"],
    ["a zero byte", bytesOf("ab", 0, "cd"), "binary", "byte 3 is zero"],
    ["a zero byte behind a mark", bytesOf(0xef, 0xbb, 0xbf, "ab", 0), "binary", "byte 6 is zero"],
    ["UTF-16", bytesOf(0xff, 0xfe, 0x61, 0), "binary", "UTF-16"],
    ["control characters", bytesOf("abcdef", 1, 2, 3, 4), "binary", "4 of its 10 bytes"],
    ["Latin-1 controls", bytesOf(0xe9, 0x80, 0x81, 0x82, 0x83, "abc"), "binary", "control characters"],
    ["3 MB", new Uint8Array(3 * 1024 * 1024).fill(97), "too-large", "3.0 MB"],
  ])("refuses a file with %s, says so and says what to do", (_, bytes, code, words) => {
    const diagnostic = refusal(bytes);
    expect(diagnostic).toMatchObject({ code, severity: "error", span: null });
    expect(diagnostic?.message).toContain(words);
    expect(diagnostic?.message).toMatch(/Nothing was kept; .+\./);
  });

  it("takes a file of exactly 2 MB, and none that is a byte longer", () => {
    expect(refusal(new Uint8Array(MAX_FILE_BYTES).fill(97))).toBeNull();
    expect(refusal(new Uint8Array(MAX_FILE_BYTES + 1).fill(97))?.code).toBe("too-large");
  });

  it("takes a text with few control characters, which it keeps", () => {
    expect(decoded(bytesOf("a = 1\f\n\u001b[0m b = 2 and much more text behind it", 7)).text).toContain(
      "\u0007",
    );
  });
});

describe("writing bytes", () => {
  it("gives back the bytes that were read", { timeout: TIMEOUT }, () => {
    const some = fc.oneof(
      fc.uint8Array({ minLength: 1, maxLength: 60 }),
      fc.string({ unit: "binary", minLength: 1 }).map((text) => new TextEncoder().encode(text)),
      fc.string({ minLength: 1 }).map((text) => bytesOf(0xef, 0xbb, 0xbf, text)),
      fc.array(fc.integer({ min: 32, max: 255 }), { minLength: 1 }).map((bytes) => Uint8Array.from(bytes)),
    );
    fc.assert(
      fc.property(some, (bytes) => {
        const result = decodeBytes(bytes);
        if (result.ok) expect(encodeText(result.text, result)).toEqual({ ok: true, bytes });
      }),
      RUNS,
    );
  });

  it("refuses what the encoding has no bytes for, and names the place", () => {
    const latin = encodeText("a = 1\nb = 5 Ω", { encoding: "latin-1", bom: false });
    expect(latin).toMatchObject({
      ok: false,
      diagnostic: { code: "not-encodable", span: { line: 2, column: 7 } },
    });
    expect(latin.ok ? "" : latin.diagnostic.message).toContain("U+03A9");
    const half = encodeText("a = \ud800b", { encoding: "utf-8", bom: false });
    expect(half).toMatchObject({ ok: false, diagnostic: { code: "not-encodable", span: { column: 5 } } });
    expect(encodeText("a = \ud83d\ude00", { encoding: "utf-8", bom: false })).toMatchObject({ ok: true });
  });
});

describe("a byte offset", () => {
  it("counts the bytes before a place of the text", { timeout: TIMEOUT }, () => {
    fc.assert(
      fc.property(fc.string({ unit: "grapheme" }), fc.boolean(), fc.nat(), (text, bom, pick) => {
        const boundaries = [...text].reduce((all, char) => [...all, all[all.length - 1]! + char.length], [0]);
        const offset = boundaries[pick % boundaries.length]!;
        const expected = new TextEncoder().encode(text.slice(0, offset)).length + (bom ? 3 : 0);
        expect(byteOffset(text, { encoding: "utf-8", bom }, offset)).toBe(expected);
      }),
      RUNS,
    );
  });

  it("is the offset of the text in Latin-1", () => {
    expect(byteOffset("Größe", { encoding: "latin-1", bom: false }, 4)).toBe(4);
  });
});
