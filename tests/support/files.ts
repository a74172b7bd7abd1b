import { readdirSync } from "node:fs";

/** Every file of this name below a folder of the repository, as a path from its root. */
export function filesNamed(folder: string, name: string): string[] {
  const inside = readdirSync(folder, { recursive: true, encoding: "utf8" });
  return inside
    .filter((path) => path === name || path.endsWith(`/${name}`))
    .map((path) => `${folder}/${path}`)
    .sort();
}
