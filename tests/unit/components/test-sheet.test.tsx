// @vitest-environment jsdom
import { QueryClient, QueryClientProvider } from "@tanstack/react-query";
import { cleanup, fireEvent, render, screen, waitFor, within } from "@testing-library/react";
import { afterEach, beforeEach, describe, expect, test, vi } from "vitest";
import type { TestPlan, Trial } from "@/lib/domain/test-sheets";
import { planTest } from "@/lib/review/test-plan";
import type { SheetView } from "@/lib/schemas/test-sheets";
import { keepEntry, newEntryId, waitingEntries } from "@/components/test-sheet/entry-store";
import { SheetRunner } from "@/components/test-sheet/sheet-runner";
import { world } from "../rules/world";

vi.mock("next/navigation", () => ({ useRouter: () => ({ refresh: () => undefined }) }));
vi.setConfig({ testTimeout: 30_000 });

const PERSON = { id: "7b1c2b5e-7f39-4a53-9a0d-0d0b4a6f9a11", name: "Ada Test" };
const OTHER = { id: "8b1c2b5e-7f39-4a53-9a0d-0d0b4a6f9a11", name: "Ben Test" };

function plan(test: TestPlan["test"]): TestPlan {
  const planned = planTest({ ...world().input, axis: "x", test });
  if (!planned?.ok) throw new Error("no plan");
  return planned.plan;
}

let counter = 0;
function sheetOf(test: TestPlan["test"]): SheetView {
  counter += 1;
  return {
    id: `00000000-0000-4000-8000-${String(counter).padStart(12, "0")}`,
    label: "TS-0001",
    test,
    title: "Ladder",
    machine: { id: newEntryId(), serial: "LD-117" },
    siteName: "North hall",
    axis: "x",
    change: null,
    createdAt: "2026-12-01T10:00:00.000Z",
    actorName: PERSON.name,
    state: "open",
    entries: 0,
    plan: plan(test),
    trials: [],
    result: { sentences: [], next: null, recommended: null },
    closing: null,
  };
}

function show(sheet: SheetView, mayEnter = true) {
  return render(
    <QueryClientProvider client={new QueryClient()}>
      <SheetRunner initial={sheet} person={PERSON} mayEnter={mayEnter} />
    </QueryClientProvider>,
  );
}

const sent: { trials: Trial[]; strikes: unknown[] }[] = [];
let reached = true;

/** The server's answer: what was stored before with what came now, each once. */
function serve(sheet: SheetView): void {
  const stored = new Map<string, Trial>();
  vi.stubGlobal("fetch", (_url: string, init: { body: string }) => {
    if (!reached) return Promise.reject(new TypeError("no network"));
    const body = JSON.parse(init.body) as { trials: Trial[]; strikes: unknown[] };
    sent.push(body);
    for (const trial of body.trials) stored.set(trial.id, trial);
    const extra = { actorName: PERSON.name, receivedAt: "", struck: null, late: false };
    const answer = { ...sheet, trials: [...stored.values()].map((trial) => ({ ...trial, ...extra })) };
    return Promise.resolve(new Response(JSON.stringify(answer), { status: 200 }));
  });
}

class NoObserver {
  observe(): void {}
  disconnect(): void {}
}

beforeEach(() => {
  vi.stubGlobal("ResizeObserver", NoObserver);
  sent.length = 0;
  reached = true;
  localStorage.clear();
});
afterEach(() => {
  cleanup();
  vi.unstubAllGlobals();
});

const press = (name: RegExp) => fireEvent.click(screen.getByRole("button", { name }));
const level = () => document.querySelector(".next-level strong")?.textContent;

describe("a ladder on the page", () => {
  test("asks for the next level after each outcome", async () => {
    const sheet = sheetOf("acceleration_ladder");
    serve(sheet);
    show(sheet);
    const { start, step } = sheet.plan.ladder!;
    const shown = (rung: number) => `${Math.round((start + rung * step) * 1000)} mm/s²`;
    expect(level()).toBe(shown(0));
    press(/Passed/);
    expect(level()).toBe(shown(4));
    press(/Failed/);
    expect(level()).toBe(shown(2));
    await waitFor(() => expect(sent.flatMap(({ trials }) => trials)).toHaveLength(2));
  });

  test("says what a typed deviation comes to, and keeps it with the trial", async () => {
    const sheet = sheetOf("acceleration_ladder");
    serve(sheet);
    show(sheet);
    fireEvent.change(screen.getByLabelText(/Off after the reference run/), { target: { value: "0,8" } });
    fireEvent.change(screen.getByLabelText("Read in"), { target: { value: "mm" } });
    // A full step is 0.2 mm: four of them.
    expect(screen.getByText(/4 full steps lost, remainder 0: whole slips/)).toBeDefined();
    press(/Failed/);
    await waitFor(() => expect(sent[0]?.trials[0]?.deviation).toEqual({ value: 0.8, unit: "mm" }));
    expect(screen.getByLabelText<HTMLInputElement>(/Off after the reference run/).value).toBe("");
  });

  test("enters nothing that is not a number", () => {
    const sheet = sheetOf("acceleration_ladder");
    serve(sheet);
    show(sheet);
    fireEvent.change(screen.getByLabelText(/Off after the reference run/), { target: { value: "four" } });
    press(/Failed/);
    expect(screen.getByRole("alert").textContent).toContain("“four” is not a number");
    expect(waitingEntries(sheet.id)).toEqual([]);
  });
});

describe("without a connection", () => {
  test("entries wait, outlive the page, and are sent once when the connection is back", async () => {
    const sheet = sheetOf("move_run");
    serve(sheet);
    reached = false;
    const { unmount } = show(sheet);
    press(/Passed/);
    press(/Passed/);
    press(/Failed/);
    await screen.findByText(/Keepstep is not reached/);
    expect(screen.getByText("3 entries wait to be sent")).toBeDefined();
    fireEvent.change(screen.getByLabelText(/Off after the reference run/), { target: { value: "8" } });
    unmount();
    const { unmount: leave } = show(sheet);
    expect(screen.getByText("3 entries wait to be sent")).toBeDefined();
    expect(screen.getByLabelText<HTMLInputElement>(/Off after the reference run/).value).toBe("8");
    expect(screen.getByText(/Steps lost in 1 of 3 trials/)).toBeDefined();
    reached = true;
    window.dispatchEvent(new Event("online"));
    await waitFor(() => expect(screen.queryByText(/wait to be sent/)).toBeNull());
    expect(new Set(sent.flatMap(({ trials }) => trials.map(({ id }) => id))).size).toBe(3);
    expect(within(screen.getByRole("table", { name: "Entries" })).getAllByRole("row")).toHaveLength(4);
    leave();
    expect(waitingEntries(sheet.id)).toEqual([]);
  });

  test("somebody else's entries are not sent under this name", async () => {
    const sheet = sheetOf("move_run");
    serve(sheet);
    const trial: Trial = {
      id: newEntryId(),
      rung: null,
      result: "pass",
      deviation: null,
      temperatures: [],
      ambientC: null,
      minutes: null,
      note: "",
      doneAt: "2026-12-01T10:05:00.000Z",
    };
    keepEntry(sheet.id, { kind: "trial", trial, by: OTHER });
    show(sheet);
    expect(screen.getByText(/Entries of Ben Test wait on this device/)).toBeDefined();
    press(/Passed/);
    await waitFor(() => expect(sent).toHaveLength(1));
    expect(sent[0]!.trials.map(({ id }) => id)).not.toContain(trial.id);
    expect(waitingEntries(sheet.id).map(({ by }) => by.name)).toEqual(["Ben Test"]);
  });
});

describe("who may only read", () => {
  test("sees entries and result without a way to enter", () => {
    const sheet = sheetOf("heat_record");
    serve(sheet);
    show(sheet, false);
    expect(screen.queryByRole("button")).toBeNull();
    expect(screen.getByText("No temperature is entered yet.")).toBeDefined();
  });
});

test("a heat record takes the winding by its resistance", async () => {
  const sheet = sheetOf("heat_record");
  serve(sheet);
  show(sheet);
  const type = (label: RegExp, value: string) =>
    fireEvent.change(screen.getByLabelText(label), { target: { value } });
  type(/^Resistance cold/, "2.1");
  type(/winding temperature of/, "20");
  type(/^Resistance hot/, "2.5");
  type(/^Ambient/, "22");
  press(/Keep this reading/);
  await waitFor(() => expect(sent).toHaveLength(1));
  // (234.5 + 20)·2.5/2.1 − 234.5 = 68.5 °C
  expect(sent[0]!.trials[0]).toMatchObject({
    result: null,
    ambientC: 22,
    temperatures: [{ place: "winding", celsius: 68.5, by: "resistance" }],
  });
  expect(screen.getByText(/^Winding: 46.5 K above 22 °C/)).toBeDefined();
});
