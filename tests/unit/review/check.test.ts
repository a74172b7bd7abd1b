import { describe, expect, it } from "vitest";
import { axisShapes } from "@/lib/review/axis-shapes";
import { checkConfiguration } from "@/lib/review/check";
import { ASSEMBLY, TEXT, check, files, input } from "./support/gantry";

describe("axisShapes", () => {
  it("gives travel and full steps for one motor turn in the assembly's order", () => {
    const [x, z] = axisShapes(ASSEMBLY);
    expect(x).toEqual({
      axis: "x",
      kind: "linear",
      travelPerTurn: expect.closeTo(0.04, 12),
      fullStepsPerTurn: 200,
    });
    expect(z?.travelPerTurn).toBeCloseTo(0.008, 12);
  });

  it("leaves out what the hardware does not say", () => {
    expect(
      axisShapes({ axes: [{ axis: "w" }, { axis: "c", drive_train: { kind: "rotary", ratio: 90 } }] }),
    ).toEqual([
      { axis: "w", kind: "linear" },
      { axis: "c", kind: "rotary", travelPerTurn: expect.closeTo((2 * Math.PI) / 90, 12) },
    ]);
  });
});

describe("checkConfiguration", () => {
  it("goes the whole path from the text to findings", () => {
    const report = check(TEXT);
    expect(report.documents).toEqual([
      { path: "gantry.conf", format: "lines", entries: 16, diagnostics: [] },
    ]);
    expect(report.parameters).toHaveLength(15);
    const current = report.parameters.find(
      ({ axis, parameter }) => axis === "x" && parameter === "run_current",
    );
    expect(current).toMatchObject({ value: 0.85, unit: "A", basis: "rms", source: { line: 6, raw: "0.85" } });
    expect(report.unmapped.map(({ key, line }) => [key, line])).toEqual([["axis.x.colour", 13]]);
    const axes = new Set(report.findings.map(({ axis }) => axis));
    expect([...axes].sort()).toEqual([null, "x", "z"].sort());
    expect(
      report.quantities.find(({ axis, name }) => axis === "x" && name === "step_rate")?.value,
    ).toBeCloseTo(24_000, 6);
    expect(report.provenance.map(({ axis, parameter }) => `${axis} ${parameter}`)).toContain("x run_current");
  });

  it("checks the axes that only the texts name, and says that nothing is known of their hardware", () => {
    const { parameters, findings } = checkConfiguration({ ...input(TEXT), assembly: { axes: [] } });
    expect(new Set(parameters.map(({ axis }) => axis))).toEqual(new Set(["x", "z", null]));
    const torque = findings.filter(({ ruleId }) => ruleId === "torque-margin");
    expect(torque.map(({ axis, level }) => [axis, level])).toEqual([
      ["x", "cannot"],
      ["z", "cannot"],
    ]);
    expect(torque[0]?.needs).toContain("axes.x.motor.holding_torque_nm");
  });

  it("gives the same report for the same input", () => {
    expect(check(TEXT)).toEqual(check(TEXT));
  });

  it("names a hidden character with its place and keeps the text", () => {
    const report = check(TEXT.replace("acc = 6000", "acc = 6000 # soft\u200b"));
    const [hidden] = report.documents[0]?.diagnostics ?? [];
    expect(hidden).toMatchObject({ code: "hidden-character", span: { line: 11 } });
    expect(report.parameters).toHaveLength(15);
  });

  it("says so when a text holds no known key, what was kept and what to do", () => {
    const { documents, parameters } = check("[lamp]\nbrightness = 40\n");
    expect(parameters).toEqual([]);
    expect(documents[0]?.diagnostics[0]).toMatchObject({
      code: "no-known-key",
      severity: "error",
      span: null,
    });
    expect(documents[0]?.diagnostics[0]?.message).toBe(
      "gantry.conf has 1 key, and the key table knows none of them. The text is kept as it is; check that it belongs to this machine, or add its keys to the key table.",
    );
    expect(check("nothing here").documents[0]?.diagnostics.map(({ code }) => code)).toContain("no-known-key");
  });

  it("finds a known key in a file whose value another file overrides, and in one whose value cannot be read", () => {
    const override = { path: "local.conf", text: "[axis.x]\namps = 1.1\n" };
    const base = { path: "base.conf", text: "[axis.x]\namps = 0.9\n" };
    const { documents, parameters } = checkConfiguration({ ...input(TEXT), files: [base, override] });
    expect(documents.flatMap(({ diagnostics }) => diagnostics.map(({ code }) => code))).not.toContain(
      "no-known-key",
    );
    expect(parameters.map(({ value }) => value)).toEqual([1.1]);
    const unreadable = check("[axis.x]\namps = lots\n");
    expect(unreadable.documents[0]?.diagnostics.map(({ code }) => code)).not.toContain("no-known-key");
  });

  it("warns of the one file among several that holds no known key", () => {
    const report = checkConfiguration({
      ...input(TEXT),
      files: [...files(TEXT), { path: "lamp.conf", text: "brightness = 40\n" }],
    });
    expect(report.documents.map(({ diagnostics }) => diagnostics.map(({ code }) => code))).toEqual([
      [],
      ["no-known-key"],
    ]);
    expect(report.parameters).toHaveLength(15);
  });
});
