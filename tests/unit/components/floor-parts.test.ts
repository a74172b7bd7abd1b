import { describe, expect, it } from "vitest";
import { cellOf, cellWords, columnWords, offRequired } from "@/components/floor/cell-words";
import {
  columnAt,
  columnGroups,
  floorLayout,
  groupsBeyond,
  LEADING_COLUMNS,
} from "@/components/floor/column-groups";
import { nextCell } from "@/components/floor/grid-keys";
import { aColumn, aRow } from "./fixtures";

const size = { rows: 100, columns: 10, page: 20 };
const press = (key: string, ctrlKey = false) => ({ key, ctrlKey });

describe("nextCell (grid pattern of the ARIA authoring practices)", () => {
  const from = { row: 50, column: 5 };
  it.each([
    ["ArrowUp", false, 49, 5],
    ["ArrowDown", false, 51, 5],
    ["ArrowLeft", false, 50, 4],
    ["ArrowRight", false, 50, 6],
    ["Home", false, 50, 0],
    ["End", false, 50, 9],
    ["Home", true, 0, 0],
    ["End", true, 99, 9],
    ["PageUp", false, 30, 5],
    ["PageDown", false, 70, 5],
  ])("%s (Ctrl: %s) leads to row %i, column %i", (key, ctrl, row, column) => {
    expect(nextCell(from, press(key, ctrl), size)).toEqual({ row, column });
  });

  it("stops at the edges", () => {
    expect(nextCell({ row: 0, column: 0 }, press("ArrowUp"), size)).toEqual({ row: 0, column: 0 });
    expect(nextCell({ row: 99, column: 9 }, press("PageDown"), size)).toEqual({ row: 99, column: 9 });
  });

  it("leaves other keys alone", () => {
    expect(nextCell(from, press("a"), size)).toBeNull();
    expect(nextCell(from, press("Tab"), size)).toBeNull();
  });
});

describe("columns", () => {
  const columns = [aColumn("x", "run_current"), aColumn("x", "hold_current"), aColumn("z", "run_current")];

  it("stand together by axis", () => {
    expect(columnGroups(columns)).toEqual([
      { axis: "x", start: 0, count: 2 },
      { axis: "z", start: 2, count: 1 },
    ]);
  });

  it("are found again by their place on the row", () => {
    const { tracks, width } = floorLayout(columns);
    let left = 0;
    tracks.forEach((track, column) => {
      expect(columnAt(left + track / 2, tracks)).toBe(column);
      left += track;
    });
    expect(width).toBe(left);
    expect(columnAt(width + 500, tracks)).toBe(LEADING_COLUMNS + 2);
  });
});

describe("groupsBeyond", () => {
  const layout = floorLayout([
    aColumn("x", "run_current"),
    aColumn("y", "run_current"),
    aColumn("z", "run_current"),
  ]);
  const axes = (right: number) => groupsBeyond(right, layout).map(({ axis }) => axis);

  it("names the axes that end beyond the edge, one cut in half among them", () => {
    expect(axes(layout.width)).toEqual([]);
    expect(axes(layout.width - 10)).toEqual(["z"]);
    expect(axes(0)).toEqual(["x", "y", "z"]);
  });

  it("tells where each begins", () => {
    const [first] = groupsBeyond(0, layout);
    expect(columnAt((first?.left ?? 0) + 1, layout.tracks)).toBe(LEADING_COLUMNS);
  });
});

describe("cells in words", () => {
  const current = aColumn("x", "run_current");

  it("name axis and parameter", () => {
    expect(columnWords(current)).toBe("X run current");
    expect(columnWords(aColumn(null, "supply_voltage"))).toBe("Supply voltage");
  });

  it("say drift with its consequence, deviation, not read and as required", () => {
    expect(cellWords({ kind: "drift", level: "over", share: -0.5, title: "0.4 A, required 0.8 A" })).toBe(
      "drift, over limit: 0.4 A, required 0.8 A",
    );
    expect(cellWords({ kind: "deviation", title: "32 until 2026-12-10" })).toBe(
      "permitted deviation: 32 until 2026-12-10",
    );
    expect(cellWords({ kind: "not_read", title: "" })).toBe("not read");
    expect(cellWords(undefined)).toBe("as required");
  });

  it("are blank for a model without the axis and for what is neither required nor read", () => {
    expect(cellOf(aRow(1), aColumn("z", "run_current", ["gantry"]))).toBe("blank");
    expect(cellOf(aRow(1), aColumn("z", "run_current", ["sorter"]))).toBeUndefined();
    expect(cellOf(aRow(1, { cells: { [current.key]: { kind: "absent", title: "" } } }), current)).toBe(
      "blank",
    );
  });

  it("list what is off in the order of the columns, what is not read by name alone", () => {
    const columns = [current, aColumn("x", "hold_current"), aColumn("x", "max_speed")];
    const row = aRow(1, {
      cells: {
        "x|max_speed": { kind: "drift", level: "near", title: "500 mm/s, required 300 mm/s" },
        "x|hold_current": { kind: "not_read", title: "" },
        "x|run_current": { kind: "deviation", title: "0.9 A" },
      },
    });
    const { told, notRead } = offRequired(row, columns);
    expect(told.map(({ words }) => words)).toEqual([
      "X run current: 0.9 A",
      "X maximum speed: 500 mm/s, required 300 mm/s",
    ]);
    expect(notRead).toEqual(["X hold current"]);
  });
});
