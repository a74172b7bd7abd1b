import { cleanup, render, screen } from "@testing-library/react";
import { afterEach, describe, expect, it } from "vitest";
import { gaugeScale } from "@/lib/review/gauge-scale";
import { Gauge } from "@/components/charts/gauge";

afterEach(cleanup);

const mount = { value: 64, before: 51, limit: 58, nearLimit: 48, sense: "upper" } as const;
const torque = { value: 0.83, before: 1.4, limit: 1, nearLimit: 1.2, sense: "lower" } as const;

function numberOf(element: Element | null, attribute: string): number {
  return Number(element?.getAttribute(attribute));
}

function tickX(container: HTMLElement): number {
  return Number(/^M([\d.]+)/.exec(container.querySelector(".gauge-tick")?.getAttribute("d") ?? "")?.[1]);
}

describe("Gauge", () => {
  it("says in words what it draws", () => {
    render(<Gauge reading={mount} unit="°C" level="over" />);
    expect(
      screen.getByRole("img", { name: "64 °C, was 51 °C, limit at most 58 °C: over limit" }),
    ).toBeTruthy();
  });

  it("puts the bad side on the right, for an upper and for a lower limit", () => {
    for (const reading of [mount, torque]) {
      const { container } = render(<Gauge reading={reading} unit="" level="over" />);
      const now = numberOf(container.querySelector(".gauge-now circle"), "cx");
      const before = numberOf(container.querySelector(".gauge-before circle"), "cx");
      expect(before).toBeLessThan(tickX(container));
      expect(now).toBeGreaterThan(tickX(container));
    }
  });

  it("sets the limits of one table in one line, whatever the units", () => {
    const scale = gaugeScale([mount, torque]);
    const ticks = [mount, torque].map((reading) =>
      tickX(render(<Gauge reading={reading} unit="" level="over" scale={scale} />).container),
    );
    expect(ticks[0]).toBe(ticks[1]);
  });

  it("draws the open dot only for a value before", () => {
    const { container } = render(<Gauge reading={{ ...mount, before: null }} unit="°C" level="over" />);
    expect(container.querySelector(".gauge-before")).toBeNull();
    expect(container.querySelector(".gauge-now")).not.toBeNull();
  });

  it("has no hatching where a check is never over", () => {
    const reading = { value: 66, limit: null, nearLimit: 60, sense: "upper" } as const;
    const { container } = render(<Gauge reading={reading} unit="°C" level="near" />);
    expect(container.querySelector(".gauge-hatch")).toBeNull();
    expect(container.querySelector(".gauge-tick-near")).not.toBeNull();
  });

  it("keeps a value off the scale inside the drawing and points beyond it", () => {
    const { container } = render(
      <Gauge reading={{ value: 5000, limit: 10, sense: "upper" }} unit="" level="over" />,
    );
    expect(numberOf(container.querySelector(".gauge-now circle"), "cx")).toBeLessThanOrEqual(128);
    expect(container.querySelector(".gauge-now path")).not.toBeNull();
  });

  it("draws nothing without a value or without anything to hold it against", () => {
    const { container } = render(
      <>
        <Gauge reading={{ ...mount, value: null }} unit="°C" level="cannot" />
        <Gauge reading={{ value: 3, limit: null, sense: null }} unit="Hz" level="within" />
      </>,
    );
    expect(container.innerHTML).toBe("");
  });
});
