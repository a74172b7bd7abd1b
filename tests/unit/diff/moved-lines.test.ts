import { describe, expect, it } from "vitest";
import { reviseText } from "@/lib/diff/revise-text";

const block = (axis: string) => `[axis.${axis}]\nrun_${axis} = 800\nhold_${axis} = 400\n`;

/** Rows as "kind line → line of the other text". */
function moves(was: string, toBe: string): string[] {
  return reviseText(was, toBe)
    .flatMap(({ lines }) => lines)
    .filter(({ kind }) => kind !== "same")
    .map(
      ({ kind, wasLine, toBeLine, moved }) =>
        `${kind} ${wasLine ?? toBeLine}${moved === undefined ? "" : ` → ${moved}`}`,
    );
}

describe("moved lines", () => {
  it("tell both where they went and where they came from", () => {
    const [x, y, z] = [block("x"), block("y"), block("z")];
    const rows = moves(x + y + z, y + z + x);
    expect(rows).toEqual([
      "removed 1 → 7",
      "removed 2 → 8",
      "removed 3 → 9",
      "added 7 → 1",
      "added 8 → 2",
      "added 9 → 3",
    ]);
  });

  it("are those of the block alone, where other lines came beside it", () => {
    const [x, y, z] = [block("x"), block("y"), block("z")];
    expect(moves(x + y + z, `${y}${z}extra = 1\n${x}`)).toContain("added 7");
  });

  it("are no blank lines and no lone brackets", () => {
    expect(moves("}\n\na = 1\nb = 2\n", "a = 1\nb = 2\n}\n\n").some((row) => row.includes("→"))).toBe(false);
  });

  it("are told once, though the block came twice", () => {
    const [x, y, z] = [block("x"), block("y"), block("z")];
    const rows = moves(x + y + z, y + z + x + x);
    expect(rows.filter((row) => row.startsWith("added") && row.includes("→"))).toHaveLength(3);
    expect(rows.filter((row) => row.startsWith("added"))).toHaveLength(6);
  });
});
