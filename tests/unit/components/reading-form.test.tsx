// @vitest-environment jsdom
import { QueryClient, QueryClientProvider } from "@tanstack/react-query";
import { cleanup, fireEvent, render, screen, waitFor } from "@testing-library/react";
import { afterEach, beforeEach, expect, test, vi } from "vitest";
import { ReadingForm } from "@/components/readings/reading-form";

vi.mock("next/navigation", () => ({ useRouter: () => ({ refresh: () => undefined }) }));

const MACHINE = {
  id: "5b1c2b5e-7f39-4a53-9a0d-0d0b4a6f9a11",
  serial: "LD-117",
  modelId: "0b1c2b5e-7f39-4a53-9a0d-0d0b4a6f9a11",
  modelName: "Label drafter 2",
  siteName: "North hall",
};

const KEPT = {
  id: "1b1c2b5e-7f39-4a53-9a0d-0d0b4a6f9a11",
  machineId: MACHINE.id,
  serial: MACHINE.serial,
  unchanged: false,
  level: "near",
  levels: { over: 0, near: 1, cannot: 2, within: 3 },
  parameters: 4,
  unmapped: 1,
  documents: [],
  machine: { standing: "near", level: "near", sentence: "X motor case 51 → 57 °C" },
  step: null,
};

// The first rendering of a form in jsdom takes seconds on a busy machine.
vi.setConfig({ testTimeout: 30_000 });

let answers: (() => Promise<Response>)[] = [];
const sent: { url: string; headers: Record<string, string>; body: Record<string, unknown> }[] = [];

beforeEach(() => {
  answers = [];
  sent.length = 0;
  vi.stubGlobal("fetch", (url: string, init: { headers: Record<string, string>; body: string }) => {
    sent.push({ url, headers: init.headers, body: JSON.parse(init.body) as Record<string, unknown> });
    return (answers.shift() ?? (() => Promise.reject(new Error("no answer left"))))();
  });
});
afterEach(() => {
  cleanup();
  vi.unstubAllGlobals();
});

const ok = (body: unknown) => () => Promise.resolve(new Response(JSON.stringify(body), { status: 201 }));
const refused = (detail: string, pointer: string) => () =>
  Promise.resolve(
    new Response(
      JSON.stringify({
        type: "about:blank",
        title: "Not valid",
        status: 422,
        detail,
        code: "invalid",
        pointer,
      }),
      { status: 422 },
    ),
  );

function show(more: Partial<Parameters<typeof ReadingForm>[0]> = {}) {
  render(
    <QueryClientProvider client={new QueryClient()}>
      <ReadingForm
        machine={MACHINE}
        models={[]}
        mayKeep
        mayMap={false}
        startWithCheck={false}
        formats={["lines", "defines"]}
        {...more}
      />
    </QueryClientProvider>,
  );
}

const paste = (text: string) => fireEvent.input(screen.getByLabelText("Text"), { target: { value: text } });
const press = (name: string) => fireEvent.click(screen.getByRole("button", { name }));

test("without a text nothing is sent, and the sentence stands at the field", async () => {
  show();
  press("Keep the reading");
  expect(await screen.findByText("Drop a file, choose one, or paste the text.")).toBeTruthy();
  expect(sent).toHaveLength(0);
});

test("a reading is sent with what was said of it, and its outcome shown", async () => {
  answers = [ok(KEPT)];
  show();
  paste("run_ma = 800");
  fireEvent.click(screen.getByLabelText(/^stored values/));
  fireEvent.input(screen.getByLabelText(/^Serial number off the plate/), { target: { value: "LD-117" } });
  press("Keep the reading");
  expect(await screen.findByText("Kept for LD-117")).toBeTruthy();
  expect(screen.getByText(/X motor case 51 → 57 °C/)).toBeTruthy();
  expect(sent[0]?.url).toBe(`/api/v1/machines/${MACHINE.id}/readings`);
  expect(sent[0]?.body).toMatchObject({
    kind: "as_found",
    layer: "stored",
    serial: "LD-117",
    files: [{ path: "pasted.conf", text: "run_ma = 800" }],
  });
});

test("a refusal stands at its field, and what was typed is still there", async () => {
  answers = [refused("The serial number read is LD-118, but this machine is LD-117.", "/serial")];
  show();
  paste("run_ma = 800");
  press("Keep the reading");
  const field = await screen.findByLabelText(/^Serial number off the plate/);
  await waitFor(() => expect(field.getAttribute("aria-invalid")).toBe("true"));
  expect((screen.getByLabelText("Text") as HTMLTextAreaElement).value).toBe("run_ma = 800");
});

test("after a lost answer the same key goes out again; after a refusal another one", async () => {
  answers = [() => Promise.reject(new TypeError("network")), refused("No.", "/note"), ok(KEPT)];
  show();
  paste("run_ma = 800");
  for (const calls of [1, 2, 3]) {
    await waitFor(() =>
      expect(screen.getByRole("button", { name: "Keep the reading" })).toHaveProperty("disabled", false),
    );
    press("Keep the reading");
    await waitFor(() => expect(sent).toHaveLength(calls));
  }
  await screen.findByText("Kept for LD-117");
  const keys = sent.map(({ headers }) => headers["idempotency-key"]);
  expect(keys[0]).toBe(keys[1]);
  expect(keys[2]).not.toBe(keys[1]);
});

test("who may not keep readings checks against a machine or a model", async () => {
  show({ mayKeep: false, machine: null, models: [{ id: MACHINE.modelId, name: "LD2" }] });
  expect(screen.queryByLabelText("Keep it as a reading")).toBeNull();
  paste("run_ma = 800");
  press("Check the text");
  expect(await screen.findByText("Choose a machine or a machine model to check against.")).toBeTruthy();
  expect(sent).toHaveLength(0);
});
