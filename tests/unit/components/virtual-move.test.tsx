// @vitest-environment jsdom
import { cleanup, fireEvent, render, screen, waitFor } from "@testing-library/react";
import { afterEach, beforeEach, expect, test, vi } from "vitest";
import type { AxisBasis } from "@/components/axis/types";
import { VirtualMove } from "@/components/axis/virtual-move";
import type { MoveInput } from "@/lib/physics/simulate/run";
import { runMove } from "@/lib/review/virtual-move";
import { AXIS_BASIS } from "../../support/axis-basis";

// The first rendering of a form in jsdom takes seconds on a busy machine.
vi.setConfig({ testTimeout: 30_000 });

const ended: boolean[] = [];
let idle = false;

/** Answers as the page's worker does, or never. */
class OneWorker {
  onmessage: ((event: { data: unknown }) => void) | null = null;
  postMessage(input: MoveInput): void {
    if (!idle) setTimeout(() => runMove(input, (data) => this.onmessage?.({ data })));
  }
  terminate(): void {
    ended.push(true);
  }
}

/** jsdom lays nothing out. */
class NoResizing {
  observe(): void {}
  disconnect(): void {}
}

beforeEach(() => {
  idle = false;
  ended.length = 0;
  vi.stubGlobal("Worker", OneWorker);
  vi.stubGlobal("ResizeObserver", NoResizing);
});
afterEach(() => {
  cleanup();
  vi.unstubAllGlobals();
});

/** Ten times the load, hurled. */
const TOO_MUCH: AxisBasis = {
  ...AXIS_BASIS,
  files: AXIS_BASIS.files.map((file) => ({
    ...file,
    text: file.text.replace("accel = 3000", "accel = 20000"),
  })),
  assembly: {
    ...AXIS_BASIS.assembly,
    axes: AXIS_BASIS.assembly.axes.map((axis) => ({ ...axis, load: { ...axis.load, mass_kg: 6 } })),
  },
};

test("says that no step is lost, with the lag and a table of the numbers", async () => {
  render(<VirtualMove basis={AXIS_BASIS} />);
  fireEvent.click(screen.getByRole("button", { name: "Simulate the move" }));
  await waitFor(() => screen.getByText("No step lost"));
  expect(screen.getByText(/keeps step\. Its rotor is at most 0\.\d+ full steps away/)).toBeTruthy();
  const rows = screen.getAllByRole("row", { hidden: true });
  expect(rows.length).toBeGreaterThan(20);
  expect(screen.getByRole("slider", { name: "Read off currents at" }).getAttribute("aria-valuetext")).toMatch(
    /^At .+: phase a .+A, phase b .+A$/,
  );
});

test("says how many steps are lost, and when, where the acceleration asks too much", async () => {
  render(<VirtualMove basis={TOO_MUCH} />);
  fireEvent.click(screen.getByRole("button", { name: "Simulate the move" }));
  await waitFor(() => screen.getByText("Steps lost"));
  const words = screen.getByText(/full steps short of the command/).textContent;
  const lost = Number(/ends (\d+) full steps/.exec(words)?.[1]);
  expect(lost % 4).toBe(0);
  expect(lost).toBeGreaterThan(0);
  expect(words).toMatch(/falls out of step .+ after the start, while .+mm\/s are commanded/);
});

test("names what is missing in place of a move", () => {
  const axes = AXIS_BASIS.assembly.axes.map((axis) => ({
    ...axis,
    motor: { ...axis.motor, inductance_mh: undefined },
  }));
  render(<VirtualMove basis={{ ...AXIS_BASIS, assembly: { ...AXIS_BASIS.assembly, axes } }} />);
  expect(screen.getByText(/cannot be simulated\. Not known: the motor's winding inductance/)).toBeTruthy();
  expect(screen.queryByRole("button", { name: "Simulate the move" })).toBeNull();
});

test("asks for a jerk before it simulates an S-curve", async () => {
  render(<VirtualMove basis={AXIS_BASIS} />);
  fireEvent.click(screen.getByRole("radio", { name: "S-curve, jerk limited" }));
  await waitFor(() => screen.getByText("The text has no jerk: type one to try."));
  fireEvent.click(screen.getByRole("button", { name: "Simulate the move" }));
  await waitFor(() => screen.getByText("An S-curve needs the jerk."));
  fireEvent.change(screen.getByRole("spinbutton", { name: "Jerk" }), { target: { value: "100000" } });
  fireEvent.click(screen.getByRole("button", { name: "Simulate the move" }));
  await waitFor(() => screen.getByText("No step lost"));
});

test("stops at once and says that nothing is shown", async () => {
  idle = true;
  render(<VirtualMove basis={AXIS_BASIS} />);
  fireEvent.click(screen.getByRole("button", { name: "Simulate the move" }));
  await waitFor(() => screen.getByRole("progressbar", { name: "Simulating, 0 % done" }));
  fireEvent.click(screen.getByRole("button", { name: "Stop" }));
  expect(screen.getByText(/Stopped at 0 %\. Nothing is shown/)).toBeTruthy();
  expect(ended).toContain(true);
});
