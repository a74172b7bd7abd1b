// @vitest-environment jsdom
import { QueryClient, QueryClientProvider } from "@tanstack/react-query";
import { cleanup, fireEvent, render, screen, waitFor, within } from "@testing-library/react";
import type { ReactElement } from "react";
import { afterEach, beforeEach, expect, test, vi } from "vitest";
import { MachinesBySite } from "@/components/rehearsals/machines-by-site";
import { RehearsalProgress } from "@/components/rehearsals/rehearsal-progress";
import { StartPartSwap } from "@/components/rehearsals/start-part-swap";
import { StartWarmDay } from "@/components/rehearsals/start-warm-day";
import type { RehearsalMachineView, RehearsalView } from "@/lib/schemas/rehearsals";

const went: string[] = [];
const router = { refresh: () => went.push("again"), push: (to: string) => went.push(to) };
vi.mock("next/navigation", () => ({ useRouter: () => router }));
vi.setConfig({ testTimeout: 30_000 });

const ID = "5b1c2b5e-7f39-4a53-9a0d-0d0b4a6f9a11";
const [OLD, NEW, DRIVER] = [1, 2, 3].map((digit) => `6e4f4d2e-6a51-4b6e-8d3f-0a3d5f1f000${digit}`) as [
  string,
  string,
  string,
];
const SITES = [{ id: ID, name: "North hall" }];
const ITEMS = [
  { id: OLD, kind: "motor", code: "M-1", name: "Long", retired: false, driveTrainKind: null },
  { id: NEW, kind: "motor", code: "M-2", name: "Short", retired: true, driveTrainKind: null },
  { id: DRIVER, kind: "driver", code: "D-1", name: "Small", retired: false, driveTrainKind: null },
] as const;

const VIEW: RehearsalView = {
  id: ID,
  title: "Warm day, 10 K above each site's maximum",
  state: "running",
  startedByName: "Ada",
  startedAt: "2026-03-03T10:00:00.000Z",
  endedAt: null,
  machines: 40,
  rehearsed: 10,
  newlyOver: 1,
  question: { kind: "warm_day", riseK: 10 },
  rulesVersion: "1",
  policyVersion: 1,
  notConcerned: 0,
  withoutAnswer: 0,
};

const MACHINE: RehearsalMachineView = {
  machineId: ID,
  serial: "LD-117",
  modelName: "Label drafter",
  siteId: ID,
  siteName: "North hall",
  siteAmbientC: 30,
  was: "within",
  toBe: "over",
  axes: [],
  graver: [
    {
      ruleId: "mount-temperature",
      axis: "x",
      was: "within",
      toBe: "over",
      sentence: "The motor case settles at 53 °C.",
      unit: "°C",
      valueWas: 43,
      value: 53,
      limit: 50,
      nearLimit: 40,
      limitSense: "upper",
    },
  ],
  hottestRoom: {
    kind: "limited",
    ambientC: 36.9,
    limitedBy: { ruleId: "mount-temperature", axis: "x" },
    alwaysOver: [],
    needs: ["axes.z.motor.resistance_ohm"],
  },
  trouble: null,
};

let answer: unknown = VIEW;
const sent: unknown[] = [];
beforeEach(() => {
  went.length = 0;
  sent.length = 0;
  answer = VIEW;
  vi.stubGlobal("fetch", async (_: string, init: { body: string | null }) => {
    if (init.body !== null) sent.push(JSON.parse(init.body));
    return new Response(JSON.stringify(answer), { status: 200 });
  });
  vi.stubGlobal(
    "ResizeObserver",
    class {
      observe(): void {}
      disconnect(): void {}
    },
  );
});
afterEach(() => {
  cleanup();
  vi.unstubAllGlobals();
});

function show(part: ReactElement): void {
  render(<QueryClientProvider client={new QueryClient()}>{part}</QueryClientProvider>);
}

test("a warm day is asked for with its rise and goes to its page", async () => {
  show(<StartWarmDay sites={SITES} models={[]} />);
  fireEvent.change(screen.getByLabelText("Warmer by"), { target: { value: "7,5" } });
  fireEvent.change(screen.getByLabelText("Site"), { target: { value: ID } });
  fireEvent.click(screen.getByRole("button", { name: "Rehearse the warm day" }));
  await waitFor(() => expect(went).toContain(`/rehearsals/${ID}`));
  expect(sent).toEqual([{ question: { kind: "warm_day", riseK: 7.5 }, siteId: ID, modelId: null }]);
});

test("a warm day without a rise is refused at its field and not sent", async () => {
  show(<StartWarmDay sites={SITES} models={[]} />);
  fireEvent.change(screen.getByLabelText("Warmer by"), { target: { value: "" } });
  fireEvent.click(screen.getByRole("button", { name: "Rehearse the warm day" }));
  expect(await screen.findByText("Type a number in K.")).toBeTruthy();
  expect(sent).toEqual([]);
});

test("a part swap offers items of its kind and sends what takes the place of what", async () => {
  show(<StartPartSwap sites={SITES} models={[]} items={ITEMS} />);
  const fitted = screen.getByLabelText("To be fitted");
  expect(
    within(fitted)
      .getAllByRole("option")
      .map(({ textContent }) => textContent),
  ).toEqual(["choose one", "M-1 Long", "M-2 Short (retired)"]);
  fireEvent.click(screen.getByRole("button", { name: "Rehearse the swap" }));
  expect(await screen.findByText("Choose the part to be fitted.")).toBeTruthy();
  fireEvent.change(fitted, { target: { value: NEW } });
  fireEvent.change(screen.getByLabelText("In place of"), { target: { value: OLD } });
  fireEvent.click(screen.getByRole("button", { name: "Rehearse the swap" }));
  await waitFor(() => expect(sent).toHaveLength(1));
  expect(sent[0]).toEqual({
    question: { kind: "part_swap", part: "motor", itemId: NEW, replacesId: OLD },
    siteId: null,
    modelId: null,
  });
});

test("another kind of part takes back what was chosen", async () => {
  show(<StartPartSwap sites={SITES} models={[]} items={ITEMS} />);
  fireEvent.change(screen.getByLabelText("To be fitted"), { target: { value: NEW } });
  fireEvent.change(screen.getByLabelText("Part"), { target: { value: "driver" } });
  await waitFor(() => expect(screen.getByRole("option", { name: "every driver" })).toBeTruthy());
  expect((screen.getByLabelText("To be fitted") as HTMLSelectElement).value).toBe("");
});

test("progress is looked at until it is done, and the page is then loaded again", async () => {
  answer = { ...VIEW, rehearsed: 25, newlyOver: 3 };
  show(<RehearsalProgress rehearsal={VIEW} />);
  expect(await screen.findByText("25 of 40 machines, 3 of them newly over limit so far")).toBeTruthy();
  expect(screen.getByRole("progressbar").getAttribute("value")).toBe("25");
  expect(went).toEqual([]);
  answer = { ...VIEW, state: "done", rehearsed: 40 };
  await waitFor(() => expect(went).toEqual(["again"]), { timeout: 5_000 });
});

test("machines stand under their site with level, sentence and the hottest room with what limits it", () => {
  const other = {
    ...MACHINE,
    machineId: NEW,
    serial: "LD-118",
    siteId: NEW,
    siteName: "Attic",
    siteAmbientC: null,
  };
  show(<MachinesBySite machines={[MACHINE, other]} />);
  expect(screen.getAllByRole("heading", { level: 2 }).map(({ textContent }) => textContent)).toEqual([
    "North hall",
    "Attic",
  ]);
  const row = screen.getByRole("row", { name: /LD-117/ });
  expect(within(row).getByRole("link", { name: "LD-117" }).getAttribute("href")).toBe(`/machines/${ID}`);
  const words = row.textContent?.replaceAll("\u00a0", " ");
  for (const part of [
    "within limits",
    "over limit",
    "The motor case settles at 53 °C.",
    "36.9 °C",
    "Limited by X",
  ])
    expect(words).toContain(part);
  expect(words).toContain("Missing: winding resistance at 20 °C of the Z motor");
  expect(screen.getByText(/ambient temperature not stated/)).toBeTruthy();
});

test("a machine of which nothing can be said says why", () => {
  const trouble = "No baseline has been released to it yet, so there is nothing to rehearse.";
  show(<MachinesBySite machines={[{ ...MACHINE, graver: [], hottestRoom: null, trouble }]} />);
  expect(screen.getByText(trouble)).toBeTruthy();
});
