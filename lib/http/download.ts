import "server-only";

/** Bytes as a file to save, never to be shown or sniffed by the browser. The name follows RFC 6266 and RFC 8187. */
export function downloadResponse({ name, bytes }: { name: string; bytes: Buffer }): Response {
  const plain = name.replaceAll(/[^\w.-]/g, "_").slice(-100);
  const coded = encodeURIComponent(name.split("/").at(-1) ?? name).replaceAll(
    /['()*]/g,
    (c) => `%${c.charCodeAt(0).toString(16)}`,
  );
  return new Response(new Uint8Array(bytes), {
    headers: {
      "content-type": "application/octet-stream",
      "content-disposition": `attachment; filename="${plain}"; filename*=UTF-8''${coded}`,
      "content-length": String(bytes.byteLength),
      "cache-control": "no-store",
      "content-security-policy": "default-src 'none'; sandbox",
      "x-content-type-options": "nosniff",
    },
  });
}
