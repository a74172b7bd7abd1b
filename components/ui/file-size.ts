import { plural } from "@/lib/domain/sentences";

/** "12 bytes", "3.4 kB", "1.2 MB"; decimal multiples (IEC 80000-13). */
export function fileSize(bytes: number): string {
  if (bytes < 1000) return plural(bytes, "byte");
  if (bytes < 1_000_000) return `${(bytes / 1000).toFixed(1)} kB`;
  return `${(bytes / 1_000_000).toFixed(1)} MB`;
}
