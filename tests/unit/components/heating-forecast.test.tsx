import { cleanup, fireEvent, render, screen } from "@testing-library/react";
import { afterEach, describe, expect, it } from "vitest";
import { HeatingForecast } from "@/components/axis/heating-forecast";
import { DEFAULT_POLICY } from "@/lib/domain/policy";
import { assemblyWith } from "../rules/world";

afterEach(cleanup);

function show(): HTMLElement {
  const { container } = render(
    <HeatingForecast
      basis={{
        machineId: "m",
        serial: "DG-1",
        axis: "x",
        kind: "linear",
        files: [],
        keyTable: { rules: [] },
        assembly: assemblyWith((axis) => (axis.mount = { softening_c: 76 })),
        policy: DEFAULT_POLICY,
      }}
    />,
  );
  return container;
}

function record(settled: number): string {
  return Array.from({ length: 9 }, (_, index) => {
    const minutes = 4 * index;
    return `${minutes} ${(settled - (settled - 25) * Math.exp(-minutes / 20)).toFixed(2)}`;
  }).join("\n");
}

describe("the forecast of a heating record", () => {
  it.each([
    [55, "within limits"],
    [72, "over limit"],
  ])("of a case that settles at %d °C is %s of its mount", (settled, words) => {
    const container = show();
    fireEvent.change(screen.getByLabelText(/Readings/), { target: { value: record(settled) } });
    expect(container.textContent).toContain(`It will settle at ${settled}`);
    expect(container.textContent).toContain("At most 66 °C are allowed there.");
    expect(container.textContent).toContain(words);
  });

  it("is refused while the curve says too little, with the reason", () => {
    const container = show();
    fireEvent.change(screen.getByLabelText(/Readings/), { target: { value: "0 25\n4 30" } });
    expect(container.textContent).toContain("At least three readings at different times are needed.");
    fireEvent.change(screen.getByLabelText(/Readings/), { target: { value: "0 25\nx" } });
    expect(container.textContent).toContain("Line 2 is not a time and a temperature");
  });
});
