import { beforeAll, describe, expect, test } from "vitest";
import { FORMATS } from "@/lib/parsers/types";
import { runCheck } from "@/lib/services/check/run";
import { createReading } from "@/lib/services/readings/create";
import { readingFile } from "@/lib/services/readings/file";
import { fleet, type Fleet } from "@/tests/support/fleet";

let world: Fleet;
beforeAll(async () => {
  world = await fleet();
});

/** The same 800 mA of axis x in each format. */
const TEXTS = {
  lines: "[axis.x]\nrun_ma = 800\n",
  defines: "#define X_RUN_MA 800\n",
  json: '{\n  "axis": { "x": { "run_ma": 800 } } // rms\n}\n',
  toml: '[[homing]]\naxis = "x"\n\n[axis.x]\nrun_ma = 800\n',
  yaml: "axis:\n  x:\n    run_ma: 800\n",
  properties: "! drive\naxis.x.run_ma=800\n",
  env: "export X_RUN_MA=800\n",
  csv: "axis,run_ma,hold_ma\nx,800,400\ny,650,325\n",
};
const RULES = {
  rules: ["axis.{axis}.run_ma", "{axis}.run_ma", "{axis}_run_ma"].map((key) => ({
    key,
    parameter: "run_current" as const,
    unit: "mA",
    basis: "rms" as const,
  })),
};

describe("a text of the format", () => {
  test.each(FORMATS)("%s is recognised, checked and gives its current with its place", async (format) => {
    const text = TEXTS[format];
    const answer = await runCheck(world.viewer, {
      files: [{ path: "machine", text }],
      format: "auto",
      keyTable: RULES,
      assembly: { axes: [{ axis: "x" }, { axis: "y" }] },
    });
    expect(answer.documents[0]).toMatchObject({ path: "machine", format });
    const [current] = answer.parameters.filter(({ axis }) => axis === "x");
    expect(current).toMatchObject({
      parameter: "run_current",
      value: 0.8,
      unit: "A",
      source: { raw: "800" },
    });
    const { start, end } = current!.source;
    expect(text.slice(start, end)).toBe("800");
  });

  test.each(["toml", "json"] as const)(
    "%s is kept from a reading byte for byte under its own name",
    async (format) => {
      const path = `machine.${format}`;
      const kept = await createReading(world.technician, {
        machineId: world.machineId,
        kind: "as_found",
        layer: "file",
        readAt: world.technician.now.toISOString(),
        idempotencyKey: null,
        files: [{ path, text: TEXTS[format] }],
        format: "auto",
      });
      expect(kept.documents[0]).toMatchObject({ path, format });
      const file = await readingFile(world.viewer, { id: kept.id, position: 0 });
      expect(file.path).toBe(path);
      expect(Buffer.from(file.bytes).toString("utf8")).toBe(TEXTS[format]);
    },
  );

  test("that is not read here is refused with those that are", async () => {
    const asked = runCheck(world.viewer, {
      files: [{ path: "a", text: "k=1" }],
      format: "xml",
      assembly: { axes: [{ axis: "x" }] },
      keyTable: RULES,
    });
    await expect(asked).rejects.toMatchObject({
      message: expect.stringContaining("properties, env or csv"),
      pointer: "/format",
    });
  });
});
