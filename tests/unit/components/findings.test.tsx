import { cleanup, render, screen, within } from "@testing-library/react";
import { afterEach, describe, expect, it, vi } from "vitest";
import { byAxis } from "@/components/findings/axis-title";
import { ClearedFindings } from "@/components/findings/cleared-findings";
import { EffectsTable } from "@/components/findings/effects-table";
import { FindingsBox } from "@/components/findings/findings-box";
import { marginWords } from "@/components/findings/margin-words";
import { changeWords, ParameterChangesTable } from "@/components/findings/parameter-changes-table";
import { ParametersTable } from "@/components/findings/parameters-table";
import { ProvenanceStrip } from "@/components/findings/provenance-strip";
import { aFinding, anEffect } from "./fixtures";

afterEach(cleanup);
vi.stubGlobal(
  "ResizeObserver",
  class {
    observe() {}
    disconnect() {}
  },
);

describe("FindingsBox", () => {
  it("puts the gravest first and folds what is within limits", () => {
    const findings = [
      aFinding({ ruleId: "a", level: "within", sentence: "Fine." }),
      aFinding({ ruleId: "b", level: "cannot", sentence: "Unknown." }),
      aFinding({ ruleId: "c", level: "near", sentence: "Close." }),
      aFinding({ ruleId: "torque-margin", level: "over", sentence: "Too hot." }),
    ];
    const { container } = render(<FindingsBox label="Findings" findings={findings} />);
    const shown = [...container.querySelectorAll(".findings > ul .finding-words")].map(({ children }) =>
      [...children].slice(0, 2).map((words) => words.textContent?.trim()),
    );
    expect(shown).toEqual([
      ["X axis, torque margin at speed", "Too hot."],
      ["X axis, c", "Close."],
      ["X axis, b", "Unknown."],
    ]);
    expect(container.querySelector(".findings-within")?.textContent).toContain("1 check within limits");
    expect(container.querySelector(".findings-within")?.textContent).toContain("Fine.");
  });

  it("gives value, limit, margin, formula, source, line and the clearing value with their units", () => {
    const clearingValue = { axis: "x", parameter: "run_current", value: 0.96, unit: "A" } as const;
    render(
      <FindingsBox
        label="Findings"
        findings={[aFinding({ clearingValue })]}
        anchors={{ paths: ["axes.conf"] }}
        letters={{ "mount-temperature|x": ["A"] }}
      />,
    );
    const text = screen.getByRole("group", { name: "Findings" }).textContent ?? "";
    for (const part of [
      "64\u00a0°C",
      "58\u00a0°C",
      "6 K beyond the limit",
      "35 °C + 7 K/W · 4.14 W = 64 °C",
      "Data sheet of the motor",
      "revision A",
      "X run current 0.96\u00a0A",
    ])
      expect(text).toContain(part);
    expect(screen.getByRole("link", { name: "axes.conf, line 42" }).getAttribute("href")).toBe("#L42");
  });

  it("names what is missing in words and draws no gauge for it", () => {
    const finding = aFinding({
      level: "cannot",
      value: null,
      limit: null,
      needs: ["axes.x.motor.inductance_mh", "axes.x.run_current.basis"],
    });
    const { container } = render(<FindingsBox label="Findings" findings={[finding]} />);
    expect(container.textContent).toContain(
      "Missing: winding inductance of the X motor and whether the X run current is peak or rms.",
    );
    expect(container.querySelector(".gauge")).toBeNull();
  });

  it("shows a caution without being asked", () => {
    const { container } = render(
      <FindingsBox label="Findings" findings={[aFinding({ caution: "The load may fall." })]} />,
    );
    expect(container.querySelector(".caution")?.textContent).toBe("The load may fall.");
  });

  it("says when there are none", () => {
    render(<FindingsBox label="Findings" findings={[]} empty="No new findings." />);
    expect(screen.getByText("No new findings.")).toBeTruthy();
  });
});

describe("marginWords", () => {
  it("says kelvins for temperatures and per cent for the rest", () => {
    expect(marginWords({ margin: 48, unit: "°C" })).toBe("48 K in hand");
    expect(marginWords({ margin: -0.17, unit: "" })).toBe("17 % beyond the limit");
    expect(marginWords({ margin: null, unit: "" })).toBeNull();
  });
});

describe("ClearedFindings", () => {
  it("strikes the old sentence and tells the level now", () => {
    const { container } = render(
      <ClearedFindings
        cleared={[{ was: aFinding(), toBe: aFinding({ level: "within", sentence: "Now 52 °C." }) }]}
      />,
    );
    expect(container.querySelector("del")?.textContent).toContain("would reach 64 °C");
    expect(container.textContent).toContain("within limits");
    expect(container.textContent).toContain("Now 52 °C.");
  });
});

describe("EffectsTable", () => {
  it("makes one table an axis, the machine's last", () => {
    render(
      <EffectsTable
        effects={[
          anEffect({ axis: null, quantity: "bus_voltage_after_braking", label: "Bus voltage after braking" }),
          anEffect(),
          anEffect({ axis: "Y" }),
        ]}
      />,
    );
    expect(screen.getAllByRole("table").map((table) => table.querySelector("caption")?.textContent)).toEqual([
      "Effects on the X axis",
      "Effects on the Y axis",
      "Effects on the machine",
    ]);
  });

  it("shows was, to be, limit, gauge, level and letters of a quantity", () => {
    render(<EffectsTable effects={[anEffect()]} />);
    const row = screen.getByRole("row", { name: /Motor case/ });
    for (const part of [
      "51\u00a0°C",
      "64\u00a0°C",
      "limit at most 58\u00a0°C".replace("limit at most ", ""),
      "over limit",
    ])
      expect(row.textContent).toContain(part);
    expect(within(row).getByText("revision A")).toBeTruthy();
    expect(within(row).getByRole("img", { name: /64 °C, was 51 °C/ })).toBeTruthy();
  });

  it("says what is missing where there is no number", () => {
    const effect = anEffect({
      axis: null,
      was: null,
      toBe: null,
      limit: null,
      levelToBe: "cannot",
      missing: ["supply.bus_capacitance_uf"],
    });
    render(<EffectsTable effects={[effect]} />);
    const row = screen.getByRole("row", { name: /Motor case/ });
    expect(row.textContent).toContain("bus capacitance of the supply: not known");
    expect(row.textContent).toContain("cannot check");
  });
});

describe("ParameterChangesTable", () => {
  const change = {
    letter: "B",
    axis: "x",
    parameter: "max_speed",
    was: { value: 0.3, unit: "m/s", basis: null, line: 45, path: "axes.conf" },
    toBe: { value: 0.5, unit: "m/s", basis: null, line: 45, path: "axes.conf" },
    change: 2 / 3,
  } as const;

  it("shows both values with units, the change, and an address of the letter", () => {
    const { container } = render(<ParameterChangesTable changes={[change]} />);
    const row = container.querySelector<HTMLElement>("#revision-B");
    for (const part of ["X maximum speed", "300\u00a0mm/s", "500\u00a0mm/s", "+67\u00a0%"])
      expect(row?.textContent).toContain(part);
  });

  it("hangs comments on the parameter and dashes a side that is not there", () => {
    const { container } = render(
      <ParameterChangesTable
        changes={[{ ...change, was: null, change: null }]}
        notes={{ B: <p>Is it needed?</p> }}
      />,
    );
    expect(container.querySelector(".row-note")?.textContent).toBe("Is it needed?");
    expect(container.querySelector("#revision-B")?.textContent).toContain("no value");
  });

  it("signs a change", () => {
    expect([changeWords(0.2353), changeWords(-0.05)]).toEqual(["+24\u00a0%", "\u22125\u00a0%"]);
  });
});

describe("ParametersTable", () => {
  it("groups by axis, in the order of the parameter list, with the line linked", () => {
    const source = { path: "axes.conf", column: 1, start: 0, end: 1, raw: "16" };
    const { container } = render(
      <ParametersTable
        parameters={[
          {
            axis: "arm",
            parameter: "steps_per_mm",
            value: 8.9,
            unit: "1/deg",
            basis: null,
            typed: { value: 8.9, unit: null },
            source: { ...source, line: 9, key: "arm.scale" },
          },
          {
            axis: "arm",
            parameter: "run_current",
            value: 0.8,
            unit: "A",
            basis: "rms",
            typed: { value: 800, unit: "mA" },
            source: { ...source, line: 2, key: "arm.run_ma" },
          },
        ]}
        kinds={{ arm: "rotary" }}
        levels={{ "arm|run_current": "over" }}
        anchors={{ paths: ["axes.conf"] }}
      />,
    );
    const [first, second] = [...container.querySelectorAll("tbody tr")];
    expect(container.querySelector("caption")?.textContent).toBe("Arm axis");
    for (const part of ["Run current", "0.8\u00a0A rms", "800 mA", "arm.run_ma"])
      expect(first?.textContent).toContain(part);
    expect(second?.textContent).toContain("Steps per degree");
    expect(screen.getByRole("img", { name: "over limit" })).toBeTruthy();
    expect(screen.getByRole("link", { name: "line 2" }).getAttribute("href")).toBe("#L2");
  });
});

describe("byAxis", () => {
  it("matches axis names without regard to case", () => {
    const groups = byAxis([{ axis: "X" }, { axis: null }, { axis: "x" }]);
    expect(groups.map(({ axis, items }) => [axis, items.length])).toEqual([
      ["X", 2],
      [null, 1],
    ]);
  });
});

describe("ProvenanceStrip", () => {
  const typed = { label: "Run current", text: "800 mA", from: "axes.conf line 2" };
  const winding = { label: "In the winding", text: "0.566 A rms", from: "computed" };

  it("leads from the number typed to the current in the winding with its tolerance", () => {
    const { container } = render(
      <ProvenanceStrip
        provenance={{
          axis: "x",
          parameter: "run_current",
          steps: [typed, winding],
          rms: 0.566,
          tolerance: 0.06,
          missing: [],
        }}
      />,
    );
    expect([...container.querySelectorAll("li .provenance-text")].map((step) => step.textContent)).toEqual([
      "800 mA",
      "0.566\u00a0A rms",
    ]);
    expect(container.textContent).toContain("± 6 %");
  });

  it("says why the current cannot be known", () => {
    const { container } = render(
      <ProvenanceStrip
        provenance={{
          axis: "x",
          parameter: "run_current",
          steps: [typed],
          rms: null,
          tolerance: null,
          missing: ["axes.x.run_current.basis"],
        }}
      />,
    );
    expect(container.textContent).toContain("cannot check");
    expect(container.textContent).toContain("whether the X run current is peak or rms");
  });
});
