import { act, cleanup, fireEvent, render, screen } from "@testing-library/react";
import { useState } from "react";
import { afterEach, describe, expect, it, vi } from "vitest";
import { CounterBox } from "@/components/editor/counter-box";
import type { EditedFile } from "@/components/editor/file-editor";
import { CounterSection } from "@/components/solve/counter-section";
import { OrderSection, OrderWords } from "@/components/solve/order-section";
import { checkConfiguration } from "@/lib/review/check";
import { check, edited, input, TEXT } from "../review/support/gantry";

afterEach(cleanup);
vi.stubGlobal(
  "ResizeObserver",
  class {
    observe() {}
    disconnect() {}
  },
);

const FAST = edited("x", "corner = 12 ", "corner = 300 ");
const { files: _files, ...grounds } = input(TEXT);

function Editor({ text }: { readonly text: string }) {
  const [files, setFiles] = useState<readonly EditedFile[]>(input(text).files);
  return (
    <>
      <CounterBox
        start={grounds}
        files={files}
        report={checkConfiguration({ ...grounds, files })}
        onTake={setFiles}
      />
      <pre data-testid="text">{files[0]?.text}</pre>
    </>
  );
}

const press = (name: RegExp) => act(async () => void fireEvent.click(screen.getByRole("button", { name })));
const text = () => screen.getByTestId("text").textContent ?? "";

describe("the counter-proposal beside the editor", () => {
  it("finds the smallest change on request, takes it into the text, and puts the text back", async () => {
    render(<Editor text={FAST} />);
    await press(/Find the smallest change/);
    expect(screen.getByText(/^The smallest change that clears/)).toBeTruthy();
    expect(screen.getByRole("rowheader", { name: /X corner speed/ })).toBeTruthy();
    await press(/Take it into the text/);
    expect(text()).not.toBe(FAST);
    expect(text()).not.toContain("corner = 300");
    await press(/put back the text/);
    expect(text()).toBe(FAST);
  });

  it("is not there while nothing is over limit", () => {
    const { container } = render(
      <CounterBox start={grounds} files={input(TEXT).files} report={null} onTake={() => undefined} />,
    );
    expect(container.textContent).toBe("");
  });
});

describe("the counter-proposal beside the decision", () => {
  it("is worded for reading, with a way to the editor for who may edit", async () => {
    const basis = input(FAST);
    await act(async () => void render(<CounterSection basis={basis} editHref="/changes/1/edit" />));
    expect(screen.getByText(/^The smallest change that clears/)).toBeTruthy();
    expect(screen.queryByRole("button")).toBeNull();
    expect(screen.getByRole("link", { name: "Edit the proposal" }).getAttribute("href")).toBe(
      "/changes/1/edit",
    );
  });
});

describe("the order of typing", () => {
  it("lists the values with what stands before and after", async () => {
    const after = edited("x", "acc = 6000", "acc = 5000", edited("x", "vmax = 300", "vmax = 250"));
    const basis = { ...grounds, was: check(TEXT).parameters, toBe: check(after).parameters };
    await act(async () => void render(<OrderSection basis={basis} fromReadings />));
    const items = screen.getAllByRole("listitem").map(({ textContent }) => textContent);
    expect(items).toHaveLength(2);
    expect(items.join()).toContain("X acceleration: 6000\u00a0mm/s");
  });

  it("says what stands in the way where there is none, and what to do", () => {
    const blocking = [{ ruleId: "steps-per-mm", axis: "x" }];
    render(<OrderWords order={{ kind: "none", steps: [], blocking, tried: 2 }} kinds={{}} />);
    expect(screen.getByText(/There is no order/).textContent).toContain("motors off");
    expect(screen.getByText(/X steps per mm/)).toBeTruthy();
  });

  it("says how much was tried where not every order was", () => {
    render(<OrderWords order={{ kind: "not-found", steps: [], blocking: [], tried: 4096 }} kinds={{}} />);
    expect(screen.getByText(/4096 states; not every order was tried/)).toBeTruthy();
  });
});
