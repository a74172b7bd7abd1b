import { cleanup, fireEvent, render, screen, within } from "@testing-library/react";
import { afterEach, beforeAll, describe, expect, it, vi } from "vitest";
import { ConflictBox } from "@/components/merge/conflict-box";
import type { ConflictOutlook } from "@/lib/review/merge-protocol";
import type { MergeConflict, MergedValue } from "@/lib/review/merge-types";

beforeAll(() => {
  vi.stubGlobal(
    "ResizeObserver",
    class {
      observe() {}
      unobserve() {}
      disconnect() {}
    },
  );
});
afterEach(cleanup);

const said = (value: number, raw: string): MergedValue => ({
  value,
  unit: "A",
  basis: "rms",
  raw,
  path: "motion.conf",
  line: 5,
});

const CURRENT: MergeConflict = {
  id: "value:motion.conf:axis.x.run_ma#0",
  kind: "value",
  path: "motion.conf",
  places: [
    {
      axis: "x",
      parameter: "run_current",
      key: "axis.x.run_ma",
      base: said(0.8, "800"),
      ours: said(0.9, "900"),
      theirs: null,
    },
  ],
  lines: { base: null, ours: null, theirs: null },
  options: ["base", "ours", "theirs"],
  choice: null,
};

const OUTLOOK: ConflictOutlook = {
  conflict: CURRENT,
  effects: [
    {
      axis: "x",
      quantity: "winding_c",
      label: "Winding temperature",
      unit: "°C",
      by: [
        { choice: "base", value: 62, level: "within" },
        { choice: "ours", value: 71, level: "near" },
        { choice: "theirs", value: null, level: "cannot" },
      ],
    },
  ],
};

describe("ConflictBox", () => {
  it("offers what each text says, with its place, and reports the choice", () => {
    const onChoose = vi.fn();
    render(<ConflictBox outlook={OUTLOOK} todayLabel="baseline 7" onChoose={onChoose} />);
    const box = screen.getByRole("group", { name: "X run current" });
    const proposed = within(box).getByRole("radio", {
      name: /as proposed.*0\.9.*A rms.*motion\.conf, line 5/,
    });
    expect(within(box).getByRole("radio", { name: /as baseline 7 has it.*not in the text/ })).toBeTruthy();
    fireEvent.click(proposed);
    expect(onChoose).toHaveBeenCalledWith(CURRENT.id, "ours");
  });

  it("sets the effects of the choices beside each other, each with its level in words", () => {
    render(<ConflictBox outlook={OUTLOOK} todayLabel="baseline 7" onChoose={() => undefined} />);
    const table = screen.getByRole("table", { name: "What each choice does" });
    const cells = within(table).getAllByRole("cell");
    expect(cells.map(({ textContent }) => textContent)).toEqual([
      expect.stringMatching(/62.*°C.*within limits/),
      expect.stringMatching(/71.*°C.*near limit/),
      expect.stringMatching(/no value.*cannot check/),
    ]);
  });

  it("shows the lines of a conflict that has no value", () => {
    const lines = {
      base: { text: "", line: 3 },
      ours: { text: "# ours\n", line: 3 },
      theirs: { text: "# theirs\n", line: 3 },
    };
    const conflict: MergeConflict = {
      ...CURRENT,
      id: "lines:motion.conf:2-2",
      kind: "lines",
      places: [],
      lines,
      options: ["base", "ours", "theirs", "both"],
    };
    render(
      <ConflictBox outlook={{ conflict, effects: [] }} todayLabel="baseline 7" onChoose={() => undefined} />,
    );
    expect(screen.getByRole("group", { name: "motion.conf, line 3 on" })).toBeTruthy();
    expect(
      screen.getByRole("radio", { name: /both, the proposal's lines first.*# ours.*# theirs/s }),
    ).toBeTruthy();
    expect(screen.getByText("no lines")).toBeTruthy();
    expect(screen.getByText("No physical quantity differs between the choices.")).toBeTruthy();
  });
});
