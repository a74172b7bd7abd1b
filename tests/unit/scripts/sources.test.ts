import { mkdirSync, mkdtempSync, rmSync, writeFileSync } from "node:fs";
import { tmpdir } from "node:os";
import path from "node:path";
import { afterEach, beforeEach, expect, test } from "vitest";
import { hashSources, sourceFiles } from "../../../scripts/lib/sources.mjs";

let root: string;
const write = (name: string, content: string) => {
  mkdirSync(path.dirname(path.join(root, name)), { recursive: true });
  writeFileSync(path.join(root, name), content);
};

beforeEach(() => {
  root = mkdtempSync(path.join(tmpdir(), "keepstep-sources-"));
  write("app/page.tsx", "page");
  write("lib/domain/units.ts", "units");
  write("next.config.mjs", "config");
  write("package-lock.json", "{}");
});
afterEach(() => rmSync(root, { recursive: true }));

test("the files of a build are those that are built, in a fixed order", () => {
  for (const name of ["README.md", "vitest.config.mts", "eslint.config.mjs", "next-env.d.ts", "tests/a.ts"])
    write(name, "not built");
  write("proxy.ts", "proxy");
  expect(sourceFiles(root).map((file) => path.relative(root, file))).toEqual([
    "next.config.mjs",
    "package-lock.json",
    "proxy.ts",
    "app/page.tsx",
    "lib/domain/units.ts",
  ]);
});

test("the hash changes with a content, a name and a new file, and with nothing else", () => {
  const before = hashSources(root);
  write("README.md", "words");
  expect(hashSources(root)).toBe(before);

  write("lib/domain/units.ts", "Units");
  const changed = hashSources(root);
  expect(changed).not.toBe(before);

  write("lib/domain/units.ts", "units");
  expect(hashSources(root)).toBe(before);

  write("lib/domain/more.ts", "");
  expect(hashSources(root)).not.toBe(before);
});
