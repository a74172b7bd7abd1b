import "server-only";

export interface SentBytes {
  /** As the file is called on the machine; folders are left out of the name it is saved under. */
  readonly path: string;
  readonly bytes: Uint8Array;
  /** Configuration texts: "text/plain". */
  readonly mediaType?: string | undefined;
}

/** Bytes as a file to be saved, exactly as they are; never shown by the browser as a page. */
export function fileResponse({ path, bytes, mediaType = "application/octet-stream" }: SentBytes): Response {
  const name = path.split(/[\\/]/).at(-1) || "file";
  const plain = name.replace(/[^A-Za-z0-9 ._-]/g, "_");
  return new Response(new Uint8Array(bytes), {
    headers: {
      "content-type": mediaType,
      "content-length": String(bytes.byteLength),
      // RFC 6266: the plain name for old clients, the true one in UTF-8.
      "content-disposition": `attachment; filename="${plain}"; filename*=UTF-8''${encodeURIComponent(name)}`,
      "cache-control": "no-store",
      "x-content-type-options": "nosniff",
      "content-security-policy": "default-src 'none'; sandbox",
    },
  });
}
