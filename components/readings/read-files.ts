import { MAX_TEXT_BYTES } from "@/lib/schemas/files";

/** A file as the API takes it. */
export type SentText =
  { readonly path: string; readonly base64: string } | { readonly path: string; readonly text: string };

export interface PastedText {
  readonly path: string;
  readonly text: string;
}

/** The bytes of a file as the API takes them. */
export async function toBase64(file: File): Promise<string> {
  const bytes = new Uint8Array(await file.arrayBuffer());
  let binary = "";
  const CHUNK = 0x8000;
  for (let at = 0; at < bytes.length; at += CHUNK)
    binary += String.fromCharCode(...bytes.subarray(at, at + CHUNK));
  return btoa(binary);
}

/** What keeps files from being sent at all, before megabytes travel; null where nothing does. */
export function filesTrouble(files: readonly File[], pasted: PastedText): string | null {
  if (files.length === 0 && pasted.text.trim() === "") return "Drop a file, choose one, or paste the text.";
  const large = files.find(({ size }) => size > MAX_TEXT_BYTES);
  if (large)
    return `${large.name} has ${(large.size / 1e6).toFixed(1)} MB; a configuration text has 2 MB at most. Nothing was sent.`;
  const empty = files.find(({ size }) => size === 0);
  return empty ? `${empty.name} is empty. Nothing was sent; choose the right file.` : null;
}

/** The files byte for byte, and the pasted text under its name after them. */
export async function sentTexts(files: readonly File[], pasted: PastedText): Promise<SentText[]> {
  const sent: SentText[] = await Promise.all(
    files.map(async (file) => ({ path: file.name, base64: await toBase64(file) })),
  );
  return pasted.text.trim() === ""
    ? sent
    : [...sent, { path: pasted.path.trim() || "pasted.conf", text: pasted.text }];
}

/** A key for one act, so that a lost answer can be asked for again; works on pages without TLS too. */
export function newActKey(): string {
  return [...crypto.getRandomValues(new Uint8Array(16))]
    .map((byte) => byte.toString(16).padStart(2, "0"))
    .join("");
}
