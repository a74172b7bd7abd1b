import { cleanup, fireEvent, render, screen } from "@testing-library/react";
import { afterEach, beforeAll, describe, expect, it } from "vitest";
import { AxisPictures } from "@/components/axis/axis-pictures";
import { OperatingMapPicture } from "@/components/axis/operating-map-picture";
import type { AxisBasis } from "@/components/axis/types";
import { DEFAULT_POLICY } from "@/lib/domain/policy";
import { operatingMap } from "@/lib/review/operating-map";
import { ruleContext } from "@/lib/rules/view";
import { assemblyWith, exampleAssembly, EXAMPLE_TEXT, texts, world } from "../rules/world";

beforeAll(() => {
  globalThis.ResizeObserver ??= class {
    observe() {}
    unobserve() {}
    disconnect() {}
  };
});
afterEach(cleanup);

const contextOf = (text = EXAMPLE_TEXT, assembly = exampleAssembly()) =>
  ruleContext(world(text, assembly).input);
const faster = texts({ acceleration: { typed: 12_000, unit: "mm/s^2", factor: 1e-3 } });

const BASIS: AxisBasis = {
  machineId: "m",
  serial: "DG-1",
  axis: "x",
  kind: "linear",
  files: [
    {
      path: "gantry.conf",
      format: "lines",
      text: "[axis.x]\nrun_ma = 800\nhold = 50 %\ntop_speed = 300\naccel = 3000\n",
    },
  ],
  keyTable: {
    rules: [
      { key: "axis.{axis}.run_ma", parameter: "run_current", unit: "mA", basis: "rms" },
      { key: "axis.{axis}.hold", parameter: "hold_current", unit: "%" },
      { key: "axis.{axis}.top_speed", parameter: "max_speed", unit: "mm/s" },
      { key: "axis.{axis}.accel", parameter: "acceleration", unit: "mm/s²" },
    ],
  },
  assembly: exampleAssembly(),
  policy: DEFAULT_POLICY,
};

describe("the picture of an operating map", () => {
  const map = operatingMap({ axis: "x", was: contextOf(), toBe: contextOf(faster) });

  it("draws the point before open and the one after filled, and says where the latter stands", () => {
    const { container } = render(<OperatingMapPicture map={map} />);
    expect(container.querySelectorAll("svg circle.plot-point-was")).not.toHaveLength(0);
    expect(container.querySelectorAll("svg circle.plot-point-to-be")).not.toHaveLength(0);
    expect(container.textContent).toMatch(
      /At 300.mm\/s and 12000.mm\/s² each motor keeps a torque margin of/,
    );
  });

  it("is read by keyboard: arrows move along the speed, Home and End go to its ends", () => {
    render(<OperatingMapPicture map={map} />);
    const slider = screen.getByRole("slider", { name: "Speed on the operating map of the X axis" });
    expect(slider.getAttribute("aria-valuetext")).toMatch(/arrow keys/);
    fireEvent.keyDown(slider, { key: "End" });
    expect(slider.getAttribute("aria-valuenow")).toBe(String(map.speeds.length - 1));
    expect(slider.getAttribute("aria-valuetext")).toContain(`at ${map.speedEnd * 1000} mm/s`);
    fireEvent.keyDown(slider, { key: "ArrowLeft" });
    expect(slider.getAttribute("aria-valuenow")).toBe(String(map.speeds.length - 2));
    fireEvent.keyDown(slider, { key: "Home" });
    expect(slider.getAttribute("aria-valuetext")).toMatch(
      /^at 0 mm\/s, highest acceleration with margin [\d.]+ mm\/s², before/,
    );
  });

  it("has the same numbers as a table, each with its unit", () => {
    const { container } = render(<OperatingMapPicture map={map} />);
    const details = container.querySelector("details")!;
    details.open = true;
    fireEvent(details, new Event("toggle"));
    const rows = [...details.querySelectorAll("tr")];
    expect(rows.length).toBeGreaterThan(10);
    for (const row of rows.slice(1)) expect(row.textContent).toMatch(/mm\/s.*mm\/s².*mm\/s².*mm\/s²/);
  });

  it("says what is missing instead of drawing", () => {
    const assembly = assemblyWith((axis) => delete axis.motor?.inductance_mh);
    const lacking = operatingMap({ axis: "x", was: null, toBe: contextOf(EXAMPLE_TEXT, assembly) });
    const { container } = render(<OperatingMapPicture map={lacking} />);
    expect(container.textContent).toBe("cannot check Not known: the motor's winding inductance.");
    expect(screen.queryByRole("slider")).toBeNull();
  });
});

/** Straight from the label: the queries by role look at every cell of the tables first. */
function type(container: HTMLElement, label: string, value: string): void {
  const found = [...container.querySelectorAll("label")].find(({ textContent }) => textContent === label);
  fireEvent.change(container.querySelector(`[id="${found?.htmlFor}"]`)!, { target: { value } });
}

describe("the pictures of an axis", () => {
  it("redraw with a number that is tried, and keep what the text says as before", () => {
    const { container } = render(<AxisPictures basis={BASIS} />);
    expect(container.querySelectorAll("[role=slider]")).toHaveLength(3);
    expect(container.querySelector(".plot-point-was")).toBeNull();
    type(container, "Acceleration", "12000");
    expect(container.querySelector(".plot-point-was")).not.toBeNull();
    expect(container.textContent).toMatch(/At 300.mm\/s and 12000.mm\/s² each motor/);
    fireEvent.click(screen.getByText("back to the text"));
    expect(container.querySelector(".plot-point-was")).toBeNull();
  });

  it("refuse what is no number, and draw what the text says meanwhile", () => {
    const { container } = render(<AxisPictures basis={BASIS} />);
    type(container, "Acceleration", "fast");
    expect(container.textContent).toContain("“fast” is not a number.");
    expect(container.querySelector(".plot-point-was")).toBeNull();
  });

  it("cool down with the share of the time on run current", () => {
    const { container } = render(<AxisPictures basis={BASIS} />);
    const settled = () => Number(/Winding: settles at ([\d.]+)/.exec(container.textContent ?? "")?.[1]);
    const busy = settled();
    type(container, "Share of the time on run current", "20");
    expect(settled()).toBeLessThan(busy - 5);
  });

  it("say that there is nothing to draw without a baseline", () => {
    const { container } = render(<AxisPictures basis={{ ...BASIS, files: [] }} />);
    expect(container.textContent).toContain("No baseline has been released to this machine");
  });
});
