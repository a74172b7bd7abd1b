import { execFileSync } from "node:child_process";
import { mkdtempSync, readFileSync, rmSync, writeFileSync } from "node:fs";
import { tmpdir } from "node:os";
import { join } from "node:path";
import fc from "fast-check";
import { afterAll, describe, expect, it } from "vitest";
import { unifiedDiff } from "@/lib/diff/unified";

const folder = mkdtempSync(join(tmpdir(), "unified-"));
afterAll(() => rmSync(folder, { recursive: true }));

const PATH = "motion.conf";

/** What a tool that knows nothing of this desk makes of the old text with the difference. */
function applied(tool: "git" | "patch", was: string, difference: string): string {
  const target = join(folder, PATH);
  writeFileSync(target, was);
  const options = { cwd: folder, input: difference, stdio: ["pipe", "pipe", "pipe"] as "pipe"[] };
  if (tool === "git") execFileSync("git", ["apply", "--whitespace=nowarn", "-p1", "-"], options);
  else execFileSync("patch", ["--binary", "--quiet", "-p1"], options);
  return readFileSync(target, "utf8");
}

describe("unifiedDiff", () => {
  it("is empty where nothing differs", () => {
    expect(unifiedDiff({ path: PATH, was: "a\n", toBe: "a\n" })).toBe("");
  });

  it("has three lines of context and both line counts", () => {
    const was = "1\n2\n3\n4\n5\n6\n7\n8\n9\n";
    expect(unifiedDiff({ path: PATH, was, toBe: was.replace("5\n", "five\n") })).toBe(
      "--- a/motion.conf\n+++ b/motion.conf\n@@ -2,7 +2,7 @@\n 2\n 3\n 4\n-5\n+five\n 6\n 7\n 8\n",
    );
  });

  it("says that a last line has no line end", () => {
    expect(unifiedDiff({ path: "a b.conf", was: "a", toBe: "a\n" })).toBe(
      "--- a/a b.conf\t\n+++ b/a b.conf\t\n@@ -1,1 +1,1 @@\n-a\n\\ No newline at end of file\n+a\n",
    );
  });

  it("names a file that comes new or goes", () => {
    expect(unifiedDiff({ path: PATH, was: null, toBe: "a\n" })).toContain(
      "--- /dev/null\n+++ b/motion.conf\n@@ -0,0 +1,1 @@",
    );
    expect(unifiedDiff({ path: PATH, was: "a\n", toBe: null })).toContain("+++ /dev/null\n@@ -1,1 +0,0 @@");
  });
});

describe("the usual tools", () => {
  const line = fc.constantFrom(
    "a = 1",
    "b = 2 ; x",
    "",
    "[axis.x]",
    "µ = 3",
    "\tk = v  ",
    "-- 1",
    "+++ b",
    "\\ x",
  );
  const text = fc
    .tuple(fc.array(fc.tuple(line, fc.constantFrom("\n", "\n", "\r\n")), { maxLength: 30 }), line)
    .map(([lines, last]) => lines.map(([words, end]) => words + end).join("") + last);
  const pair = fc.oneof(
    fc.tuple(text, text),
    fc.tuple(text, fc.nat(), line).map(([was, at, put]) => {
      const lines = was.split("\n");
      lines.splice(at % lines.length, 1, put);
      return [was, lines.join("\n")] as [string, string];
    }),
  );

  it.each(["git", "patch"] as const)(
    "make the new text of the old one byte for byte: %s",
    { timeout: 120_000 },
    (tool) => {
      fc.assert(
        fc.property(
          pair.filter(([was, toBe]) => was !== toBe && was !== "" && toBe !== ""),
          ([was, toBe]) => {
            expect(applied(tool, was, unifiedDiff({ path: PATH, was, toBe }))).toBe(toBe);
          },
        ),
        { numRuns: 60 },
      );
    },
  );
});
