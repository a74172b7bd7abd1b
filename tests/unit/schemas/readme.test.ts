import { readFileSync } from "node:fs";
import { describe, expect, it } from "vitest";
import { DEFAULT_POLICY } from "@/lib/domain/policy";
import { checkConfiguration } from "@/lib/review/check";
import { checkRequestSchema } from "@/lib/schemas/check";
import { createReadingSchema } from "@/lib/schemas/readings";

const README = readFileSync("README.md", "utf8");

/** What the README sends by curl, in its order; the shell's own part of it filled in. */
function bodies(): unknown[] {
  const filled = README.replace(/\$\(date [^)]*\)/, "2026-03-04T05:06:07Z");
  return [...filled.matchAll(/<<'?JSON'?\n(.*?)\nJSON\n/gs)].map(([, body]) => JSON.parse(body ?? ""));
}

describe("the requests of the README", () => {
  it("check a text as the README says", () => {
    const { files, keyTable, assembly } = checkRequestSchema.parse(bodies()[0]);
    const { documents, parameters, findings } = checkConfiguration({
      files: files.map(({ path, text }) => ({ path, text: text ?? "" })),
      keyTable: keyTable!,
      assembly: assembly!,
      policy: DEFAULT_POLICY,
    });
    expect(documents[0]?.diagnostics).toEqual([]);
    expect(parameters).toHaveLength(5);
    expect(findings.find(({ ruleId }) => ruleId === "mount-temperature")?.level).toBe("over");
    expect(findings.find(({ ruleId }) => ruleId === "torque-margin")?.level).toBe("within");
  });

  it("report a reading in the shape that the desk takes", () => {
    expect(createReadingSchema.safeParse(bodies()[1]).error).toBeUndefined();
    expect(bodies()).toHaveLength(2);
  });
});
