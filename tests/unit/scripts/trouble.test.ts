import { describe, expect, test } from "vitest";
import { CommandFailed, explain, isDiskFull, Trouble } from "../../../scripts/lib/trouble.mjs";

const failed = (output: string) => new CommandFailed({ command: "npm ci", code: 1, output });

describe("an explanation", () => {
  test("of trouble is its own sentence", () => {
    expect(explain(new Trouble("The port is busy."), "starting")).toBe("The port is busy.");
  });

  test.each([
    Object.assign(new Error("ENOSPC: no space left on device, write"), { code: "ENOSPC" }),
    failed("npm error code ENOSPC"),
    failed("FATAL: could not write lock file: No space left on device"),
  ])("of %s says that the disk is full", (error) => {
    expect(isDiskFull(error)).toBe(true);
    expect(explain(error, "installing the node modules")).toMatch(
      /^The disk is full: there was no space left while installing the node modules/,
    );
  });

  test("of a missing right names the file", () => {
    const error = Object.assign(new Error("EACCES"), { code: "EACCES", path: "/srv/desk/state.json" });
    expect(explain(error, "starting")).toContain("This user may not write /srv/desk/state.json (EACCES)");
  });

  test("of a failed command gives the first lines that name a cause", () => {
    const output = "building\nError: module not found: ./a\nat b\nat c\nat d";
    expect(explain(failed(output), "building")).toContain("building: Error: module not found: ./a. What was");
  });

  test("of a failed command without such lines gives its last ones", () => {
    expect(explain(failed("one\ntwo\n\nthree\nfour\n"), "installing")).toBe(
      "npm ci ended with code 1 while installing: two / three / four. What was there before is kept.",
    );
  });
});
