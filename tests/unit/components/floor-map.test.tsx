import { act, cleanup, fireEvent, render, within } from "@testing-library/react";
import { afterEach, beforeEach, describe, expect, it, vi } from "vitest";
import { FloorMap } from "@/components/floor/floor-map";
import { aColumn, aRow } from "./fixtures";

vi.mock("next/link", () => ({
  default: ({ prefetch, ...rest }: { prefetch?: boolean } & React.ComponentProps<"a">) => (
    <a data-prefetch={String(prefetch)} {...rest} />
  ),
}));

// Ten thousand rows in a simulated browser on a busy machine.
vi.setConfig({ testTimeout: 30_000 });

let narrow = false;

beforeEach(() => {
  narrow = false;
  vi.stubGlobal("matchMedia", () => ({
    get matches() {
      return narrow;
    },
    addEventListener() {},
    removeEventListener() {},
  }));
  vi.stubGlobal(
    "ResizeObserver",
    class {
      observe() {}
      unobserve() {}
      disconnect() {}
    },
  );
  // jsdom lays nothing out; the virtual rows need a window's height.
  vi.spyOn(Element.prototype, "clientHeight", "get").mockReturnValue(600);
  vi.spyOn(Element.prototype, "clientWidth", "get").mockReturnValue(1200);
  HTMLElement.prototype.scrollTo = () => undefined;
});

afterEach(() => {
  cleanup();
  vi.restoreAllMocks();
});

const columns = [
  aColumn("x", "run_current"),
  aColumn("x", "max_speed"),
  aColumn("z", "hold_current", ["gantry"]),
];
const drifted = aRow(0, {
  standing: "over",
  sentence: "X torque margin 0.91 → 0.07",
  cells: {
    "x|run_current": { kind: "drift", share: -0.66, level: "over", title: "0.40 A rms, required 1.20 A rms" },
  },
});
const rows = [drifted, ...Array.from({ length: 9_999 }, (_, index) => aRow(index + 1))];

describe("the floor as a grid", () => {
  it("tells its true size while it holds few of ten thousand rows", () => {
    render(<FloorMap columns={columns} rows={rows} />);
    const grid = document.querySelector('[role="grid"]');
    expect(grid?.getAttribute("aria-label")).toBe("Machines by parameters");
    expect(grid?.getAttribute("aria-rowcount")).toBe("10001");
    expect(grid?.getAttribute("aria-colcount")).toBe("6");
    const held = document.querySelectorAll('[role="grid"] [role="row"]').length;
    expect(held).toBeGreaterThan(10);
    expect(held).toBeLessThan(80);
  });

  it("names machine, sentence and the drifted cell", () => {
    render(<FloorMap columns={columns} rows={rows} />);
    const row = document.querySelector<HTMLElement>('[aria-rowindex="2"]');
    expect(row && within(row).getByRole("img", { name: "over limit" })).toBeTruthy();
    expect(row?.textContent).toContain("X torque margin 0.91 → 0.07");
    const drift = "X run current, drift, over limit: 0.40 A rms, required 1.20 A rms";
    expect(row && within(row).getByRole("gridcell", { name: drift })).toBeTruthy();
  });

  it("is one stop for Tab and goes from cell to cell by arrows", () => {
    render(<FloorMap columns={columns} rows={rows} />);
    const stops = () => [...document.querySelectorAll<HTMLElement>('[role="grid"] [tabindex="0"]')];
    expect(stops()).toHaveLength(1);
    stops()[0]?.focus();
    for (const key of ["ArrowRight", "ArrowRight", "ArrowRight", "ArrowDown"])
      fireEvent.keyDown(document.activeElement ?? document.body, { key });
    expect(document.activeElement?.getAttribute("aria-label")).toBe("X run current, as required");
    expect(document.activeElement?.closest('[role="row"]')?.getAttribute("aria-rowindex")).toBe("3");
    expect(document.querySelector(".floor-readout")?.textContent).toBe("SO-1, X run current: as required");
    expect(stops()).toEqual([document.activeElement]);
  });

  it("reaches the last of ten thousand machines by one key and keeps the focus", () => {
    render(<FloorMap columns={columns} rows={rows} />);
    document.querySelector<HTMLElement>('[role="grid"] [tabindex="0"]')?.focus();
    fireEvent.keyDown(document.activeElement ?? document.body, { key: "End", ctrlKey: true });
    expect(document.activeElement?.closest('[role="row"]')?.getAttribute("aria-rowindex")).toBe("10001");
    expect(document.activeElement?.getAttribute("aria-label")).toBe("Z hold current, not on this machine");
  });

  it("opens the machine by Enter from any cell of its row", () => {
    render(<FloorMap columns={columns} rows={rows} />);
    const opened = vi.fn((event: Event) => event.preventDefault());
    document.addEventListener("click", opened);
    document.querySelector<HTMLElement>('[role="grid"] [tabindex="0"]')?.focus();
    fireEvent.keyDown(document.activeElement ?? document.body, { key: "ArrowRight" });
    fireEvent.keyDown(document.activeElement ?? document.body, { key: "Enter" });
    document.removeEventListener("click", opened);
    const target = opened.mock.calls[0]?.[0].target;
    expect(target instanceof HTMLAnchorElement && target.getAttribute("href")).toBe("/machines/m-0");
  });

  it("puts every machine onto paper", () => {
    const held = () => document.querySelectorAll('.floor-body [role="row"]').length;
    render(<FloorMap columns={columns} rows={rows.slice(0, 150)} />);
    act(() => {
      window.dispatchEvent(new Event("beforeprint"));
    });
    expect(held()).toBe(150);
    act(() => {
      window.dispatchEvent(new Event("afterprint"));
    });
    expect(held()).toBeLessThan(80);
  });
});

describe("the floor on a phone", () => {
  it("lists machines with their sentence and what is off in words", () => {
    narrow = true;
    vi.spyOn(HTMLElement.prototype, "offsetHeight", "get").mockReturnValue(68);
    vi.spyOn(window, "scrollTo").mockReturnValue();
    render(<FloorMap columns={columns} rows={rows} />);
    expect(document.querySelector('[role="grid"]')).toBeNull();
    const first = document.querySelector('a[href="/machines/m-0"]')?.closest("li");
    for (const words of ["SO-0", "X torque margin 0.91", "X run current: 0.40 A rms, required 1.20 A rms"])
      expect(first?.textContent).toContain(words);
    expect(first?.getAttribute("aria-setsize")).toBe("10000");
  });
});
