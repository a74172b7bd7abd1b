// @vitest-environment jsdom
import { QueryClient, QueryClientProvider } from "@tanstack/react-query";
import { cleanup, fireEvent, render, screen, waitFor, within } from "@testing-library/react";
import type { ReactElement } from "react";
import { afterEach, beforeEach, expect, test, vi } from "vitest";
import type { AxisBasis } from "@/components/axis/types";
import { FaultFingerprint } from "@/components/axis/fault-fingerprint";
import { MeasuredPredicted } from "@/components/axis/measured-predicted";
import { ToleranceOdds } from "@/components/axis/tolerance-odds";
import { Temperatures } from "@/components/implementation/temperatures";
import { runOdds } from "@/lib/review/odds-protocol";
import type { OddsInput } from "@/lib/review/tolerance-odds";
import type { MeasuredHeatView } from "@/lib/schemas/measured-heat";
import { ASSEMBLY, files, KEY_TABLE, POLICY, TEXT } from "../review/support/gantry";

vi.setConfig({ testTimeout: 30_000 });

const AXIS_BASIS: AxisBasis = {
  machineId: "5b1c2b5e-7f39-4a53-9a0d-0d0b4a6f9a11",
  serial: "LD-117",
  axis: "x",
  kind: "linear",
  files: files(TEXT),
  keyTable: KEY_TABLE,
  assembly: ASSEMBLY,
  policy: POLICY,
};

/** Answers as the page's worker does. */
class OneWorker {
  onmessage: ((event: { data: unknown }) => void) | null = null;
  postMessage(input: OddsInput): void {
    setTimeout(() => runOdds({ ...input, samples: 100 }, (data) => this.onmessage?.({ data })));
  }
  terminate(): void {}
}

/** jsdom lays nothing out. */
class NoResizing {
  observe(): void {}
  disconnect(): void {}
}

const READING: MeasuredHeatView["readings"][number] = {
  axis: AXIS_BASIS.axis,
  place: "case",
  celsius: 72.5,
  verificationId: "5b1c2b5e-7f39-4a53-9a0d-0d0b4a6f9a11",
  at: "2026-03-03T10:00:00.000Z",
  ambientC: 23,
  current: 0.8,
  sameMotor: true,
  power: 3.3,
  rise: 49.5,
  predicted: 46,
  ignored: null,
};
let heat: MeasuredHeatView = { readings: [], fits: [] };

beforeEach(() => {
  heat = { readings: [], fits: [] };
  vi.stubGlobal("Worker", OneWorker);
  vi.stubGlobal("ResizeObserver", NoResizing);
  vi.stubGlobal("fetch", async () => new Response(JSON.stringify(heat), { status: 200 }));
});
afterEach(() => {
  cleanup();
  vi.unstubAllGlobals();
});

function show(section: ReactElement): void {
  render(<QueryClientProvider client={new QueryClient()}>{section}</QueryClientProvider>);
}

test("a typed temperature gets its explanations with odds, and the next measurement", () => {
  show(<FaultFingerprint basis={AXIS_BASIS} />);
  expect(screen.queryByRole("table", { name: /Explanations/ })).toBeNull();
  fireEvent.change(screen.getByLabelText("Measured"), { target: { value: "160" } });
  fireEvent.change(screen.getByLabelText("Air around the motor"), { target: { value: "23" } });
  const rows = within(screen.getByRole("table", { name: /Explanations/ }))
    .getAllByRole("row")
    .slice(1);
  expect(rows).toHaveLength(6);
  const percent = rows.map((row) => Number(/(\d+)\s%/.exec(row.textContent ?? "")?.[1]));
  expect(percent).toEqual([...percent].sort((a, b) => b - a));
  expect(screen.getByText(/To tell them apart: /)).toBeTruthy();
});

test("a temperature that is no number is said so and weighs nothing", () => {
  show(<FaultFingerprint basis={AXIS_BASIS} />);
  fireEvent.change(screen.getByLabelText("Measured"), { target: { value: "warm" } });
  expect(screen.getByText(/“warm” is not a number/)).toBeTruthy();
  expect(screen.queryByRole("table", { name: /Explanations/ })).toBeNull();
});

test("the temperatures of the newest verification are taken over", async () => {
  heat = { readings: [READING], fits: [] };
  show(<FaultFingerprint basis={AXIS_BASIS} />);
  fireEvent.click(await screen.findByRole("button", { name: "Take those of the newest verification" }));
  expect((screen.getByLabelText("Measured") as HTMLInputElement).value).toBe("72.5");
  expect(screen.getByText(/Fits best:/)).toBeTruthy();
});

test("a fingerprint without the thermal data names what is missing", () => {
  const axes = AXIS_BASIS.assembly.axes.map((axis) => ({
    ...axis,
    motor: { ...axis.motor, winding_to_ambient_k_per_w: undefined },
  }));
  show(<FaultFingerprint basis={{ ...AXIS_BASIS, assembly: { ...AXIS_BASIS.assembly, axes } }} />);
  expect(screen.getByText(/Missing: thermal resistance, winding to ambient/)).toBeTruthy();
});

test("measured temperatures stand beside the predicted ones, a refined value beside the catalog's", async () => {
  heat = {
    readings: [
      READING,
      { ...READING, celsius: 71, ignored: "The ambient temperature was not measured beside it." },
    ],
    fits: [
      {
        axis: AXIS_BASIS.axis,
        field: "case_to_ambient_k_per_w",
        catalog: 7,
        readings: 2,
        fit: { ok: true, value: 9.4, uncertainty: 0.7, low: 8, high: 10.8, weight: 0.93 },
      },
    ],
  };
  show(<MeasuredPredicted basis={AXIS_BASIS} />);
  const refined = await screen.findByRole("row", { name: /case to ambient/ });
  for (const words of ["7 K/W", "9.4 K/W", "8 K/W to 10.8 K/W", "2 temperatures, with 93 % of the weight"])
    expect(refined.textContent?.replaceAll("\u00a0", " ")).toContain(words);
  expect(screen.getByText("The ambient temperature was not measured beside it.")).toBeTruthy();
});

test("a fit far from the catalog is refused with a sentence", async () => {
  heat = {
    readings: [READING],
    fits: [
      {
        axis: AXIS_BASIS.axis,
        field: "case_to_ambient_k_per_w",
        catalog: 7,
        readings: 2,
        fit: { ok: false, because: "far_from_catalog" },
      },
    ],
  };
  show(<MeasuredPredicted basis={AXIS_BASIS} />);
  expect(await screen.findByText(/the catalog value is kept: .*by more than 60 %/)).toBeTruthy();
});

test("the field of a measured temperature says how the motor must stand", () => {
  const row = { axis: "x", place: "case", celsius: "" } as const;
  show(<Temperatures axes={["x"]} value={[row]} onChange={() => undefined} />);
  const help = screen.getByLabelText("Measured").getAttribute("aria-describedby")?.split(" ") ?? [];
  const words = help.map((id) => document.getElementById(id)?.textContent).join(" ");
  expect(words).toContain("Standing on run current, settled");
});

test("an axis that was never measured says what belongs there", async () => {
  heat = { readings: [{ ...READING, axis: "another" }], fits: [] };
  show(<MeasuredPredicted basis={AXIS_BASIS} />);
  expect(await screen.findByText(/No temperature of this axis has been measured/)).toBeTruthy();
});

test("the odds of each limit stand beside the nominal verdict, with their standard error", async () => {
  show(<ToleranceOdds basis={AXIS_BASIS} />);
  fireEvent.click(screen.getByRole("button", { name: "Work out the odds" }));
  const table = await waitFor(() => screen.getByRole("table", { name: /from 100 samples/ }));
  const row = within(table).getByRole("row", { name: /Winding temperature/ });
  expect(row.textContent).toMatch(/within limits|near limit|over limit/);
  expect(row.textContent).toMatch(/below 3\s%|±/);
});

test("a spread that is no number is refused at its field", async () => {
  show(<ToleranceOdds basis={AXIS_BASIS} />);
  fireEvent.change(screen.getByLabelText("Winding resistance, ±"), { target: { value: "much" } });
  fireEvent.click(screen.getByRole("button", { name: "Work out the odds" }));
  expect(await screen.findByText(/“much” is not a number/)).toBeTruthy();
  expect(screen.queryByRole("table")).toBeNull();
});
