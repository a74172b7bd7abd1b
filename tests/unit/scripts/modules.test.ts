import { describe, expect, test } from "vitest";
import { demandNode, missingModules } from "../../../scripts/lib/modules.mjs";

describe("installed modules", () => {
  const locked = {
    packages: {
      "": { version: "0.1.0" },
      "node_modules/a": { version: "1.0.0", integrity: "sha512-a" },
      "node_modules/b": { version: "2.0.0", integrity: "sha512-b" },
      "node_modules/other-system": { version: "1.0.0", integrity: "sha512-o", optional: true },
      "node_modules/unasked": { version: "1.0.0", integrity: "sha512-u", extraneous: true },
    },
  };
  const a = { version: "1.0.0", integrity: "sha512-a" };
  const b = { version: "2.0.0", integrity: "sha512-b" };

  test("lack nothing when all are as locked; optional and extraneous ones may be absent", () => {
    expect(missingModules(locked, { packages: { "node_modules/a": a, "node_modules/b": b } })).toEqual([]);
  });

  test("lack what is absent or of another version", () => {
    const older = { version: "1.9.0", integrity: "sha512-old" };
    expect(missingModules(locked, { packages: { "node_modules/b": older } })).toEqual([
      "node_modules/a",
      "node_modules/b",
    ]);
  });

  test("lack what has the version but other contents", () => {
    const changed = { version: "2.0.0", integrity: "sha512-changed" };
    const installed = { packages: { "node_modules/a": a, "node_modules/b": changed } };
    expect(missingModules(locked, installed)).toEqual(["node_modules/b"]);
  });

  test("lack everything when npm left no record of an install", () => {
    expect(missingModules(locked, undefined)).toEqual(["node_modules/a", "node_modules/b"]);
  });
});

describe("Node", () => {
  test.each(["20.19.0", "20.20.2", "22.1.0", "24.0.0"])("%s is new enough", (version) => {
    expect(() => demandNode(version)).not.toThrow();
  });

  test.each(["18.20.4", "20.18.9"])("%s is too old, and is told", (version) => {
    expect(() => demandNode(version)).toThrow(`Node ${version} is too old: Keepstep needs 20.19 or newer.`);
  });
});
