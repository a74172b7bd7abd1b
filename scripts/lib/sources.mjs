import { createHash } from "node:crypto";
import { existsSync, readdirSync, readFileSync } from "node:fs";
import path from "node:path";
import { ROOT } from "./home.mjs";

/** What a build is made of: these folders, and these kinds of files beside them. */
const FOLDERS = ["app", "components", "lib", "models", "public"];
const ROOT_FILES = /^(package-lock\.json|tsconfig\.json|[a-z-]+\.(config\.)?(ts|mjs|css))$/;
const NOT_BUILT = /^(eslint|vitest|playwright)\.config\.|\.d\.ts$/;

function* filesUnder(folder) {
  const entries = readdirSync(folder, { withFileTypes: true });
  for (const entry of entries.sort((a, b) => (a.name < b.name ? -1 : 1))) {
    const file = path.join(folder, entry.name);
    if (entry.isDirectory()) yield* filesUnder(file);
    else yield file;
  }
}

/** The files that a build is made of, in a fixed order. */
export function sourceFiles(root = ROOT) {
  const beside = readdirSync(root)
    .filter((name) => ROOT_FILES.test(name) && !NOT_BUILT.test(name))
    .sort()
    .map((name) => path.join(root, name));
  const within = FOLDERS.map((name) => path.join(root, name)).filter((folder) => existsSync(folder));
  return [...beside, ...within.flatMap((folder) => [...filesUnder(folder)])];
}

/** One hash of names and contents: equal while nothing that is built has changed. */
export function hashSources(root = ROOT) {
  const hash = createHash("sha256");
  for (const file of sourceFiles(root)) {
    const content = readFileSync(file);
    hash.update(`${path.relative(root, file)}\0${content.length}\0`).update(content);
  }
  return hash.digest("hex");
}
