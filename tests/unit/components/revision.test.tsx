import { cleanup, render, screen, within } from "@testing-library/react";
import { renderToStaticMarkup } from "react-dom/server";
import { afterEach, describe, expect, it } from "vitest";
import { outlineOf } from "@/lib/diff/outline";
import { reviseText } from "@/lib/diff/revise-text";
import { splitLines } from "@/lib/diff/text-lines";
import { DrawingRevision } from "@/components/revision/drawing-revision";
import { lineHref, lineId } from "@/components/revision/line-anchor";
import { MarkedText } from "@/components/revision/marked-text";
import { revisionItems } from "@/components/revision/revision-items";

afterEach(cleanup);

const lines = Array.from({ length: 40 }, (_, index) => `key_${index + 1} = ${index + 1}`);
const was = lines.join("\n");
const toBe = lines
  .map((line) => (line === "key_20 = 20" ? "key_20 = 25" : line))
  .filter((line) => line !== "key_22 = 22")
  .concat("key_41 = 41")
  .join("\n");

describe("DrawingRevision", () => {
  it("strikes the old value and sets the new one beside it, in one column", () => {
    const { container } = render(<DrawingRevision path="a.conf" stretches={reviseText(was, toBe)} />);
    const changed = container.querySelector(".code-line-changed .line-text");
    expect(changed?.textContent).toBe("key_20 = was 20to be 25");
    expect(changed?.querySelector("del")?.textContent).toBe("was 20");
    expect(changed?.querySelector("ins")?.textContent).toBe("to be 25");
  });

  it("closes what stays as it was, with a count, and opens it without script", () => {
    const markup = renderToStaticMarkup(<DrawingRevision path="a.conf" stretches={reviseText(was, toBe)} />);
    expect(markup).toContain("<details><summary>");
    expect(markup).toContain("16 lines as before");
    expect(markup).toContain("key_1 = 1");
  });

  it("puts the revision letter and the comments at the line of the new text", () => {
    const { container } = render(
      <DrawingRevision
        path="a.conf"
        stretches={reviseText(was, toBe)}
        letters={{ toBe: { 20: ["A"] }, was: {} }}
        notes={{ toBe: { 20: <p>Why not 24?</p> }, was: {} }}
      />,
    );
    const line = container.querySelector<HTMLElement>(".code-line-changed");
    expect(line && within(line).getByText("revision A")).toBeTruthy();
    expect(line && within(line).getByText("Why not 24?")).toBeTruthy();
    expect(screen.getAllByText("revision A")).toHaveLength(1);
  });

  it("finds the letter of a line that went by its old number", () => {
    const { container } = render(
      <DrawingRevision
        path="a.conf"
        stretches={reviseText(was, toBe)}
        letters={{ toBe: {}, was: { 22: ["B"] } }}
      />,
    );
    const gone = container.querySelector<HTMLElement>(".code-line-removed");
    expect(gone && within(gone).getByText("revision B")).toBeTruthy();
    expect(gone?.querySelector("del")?.textContent).toContain("key_22 = 22");
    expect(screen.getAllByText("revision B")).toHaveLength(1);
  });

  it("tells a line that a firmware reads as before", () => {
    const { container } = render(<DrawingRevision path="a.conf" stretches={reviseText("a = 1", "a  = 1")} />);
    expect(container.textContent).toContain("only spacing or a comment differs");
    const ends = render(<DrawingRevision path="a.conf" stretches={reviseText("a = 1\r\n", "a = 1\n")} />);
    expect(ends.container.textContent).toContain("only the line end differs");
  });

  it("folds lines away where only spacing or a comment differs, but none that somebody spoke of", () => {
    const stretches = reviseText("a = 1 # x\nb = 2 # x\nc = 3\n", "a = 1 # y\nb = 2 # y\nc = 4\n");
    const { container } = render(
      <DrawingRevision path="a.conf" stretches={stretches} keep={{ toBe: { 2: true }, was: {} }} />,
    );
    expect(screen.getByRole("checkbox", { name: /fold 1 line where/ })).toBeTruthy();
    const foldable = [...container.querySelectorAll(".code-line-foldable")];
    expect(foldable.map(({ id }) => id)).toEqual(["to-be-0-1"]);
    cleanup();
    render(<DrawingRevision path="a.conf" stretches={reviseText("c = 3", "c = 4")} />);
    expect(screen.queryByRole("checkbox")).toBeNull();
  });

  it("tells a moved line where it stands in the other text", () => {
    const [block, rest] = ["alpha = 1\nbeta = 2\n", "gamma = 3\ndelta = 4\nepsilon = 5\n"];
    const { container } = render(
      <DrawingRevision path="a.conf" stretches={reviseText(block + rest, rest + block)} />,
    );
    const asides = [...container.querySelectorAll(".line-aside")].map(({ textContent }) => textContent);
    expect(asides).toEqual(["moved to line 4", "moved to line 5", "moved, was line 1", "moved, was line 2"]);
  });

  it("shows a character that would turn the line around", () => {
    const { container } = render(
      <DrawingRevision path="a.conf" stretches={reviseText("a = 1", "a = \u202e1")} />,
    );
    expect(container.querySelector(".hidden-character")?.textContent).toContain("U+202E");
    expect(container.textContent).not.toContain("\u202e");
  });
});

describe("revisionItems", () => {
  it("lists a break for what stays, its lines once opened, and leaves folded lines out", () => {
    const whole = reviseText(was, toBe);
    const closed = whole.findIndex((stretch) => stretch.closed);
    const list = (opened: readonly number[], folded = false) =>
      revisionItems(outlineOf(whole), {
        opened: new Set(opened),
        folded: ({ kind }) => folded && kind === "same",
        toBe: () => splitLines(toBe),
      });
    expect(list([])).toContainEqual({ kind: "break", stretch: closed, count: 16 });
    const every = whole.flatMap(({ lines: own }) => own.map((line) => ({ kind: "line", line })));
    expect(list(whole.map((_, index) => index))).toEqual(every);
    expect(list([], true).every((item) => item.kind === "break" || item.line.kind !== "same")).toBe(true);
  });
});

describe("MarkedText", () => {
  it("numbers and addresses the lines and marks those with findings by the gravest", () => {
    const { container } = render(
      <MarkedText
        text={"[x]\r\namps = 1\r\nvmax = 2\r\n"}
        path="a.conf"
        marks={[
          { line: 2, level: "near", sentence: "warm" },
          { line: 2, level: "over", sentence: "hot" },
        ]}
      />,
    );
    expect(container.querySelectorAll(".code-line")).toHaveLength(3);
    const second = container.querySelector<HTMLElement>("#L2");
    expect(second?.querySelector(".line-text")?.textContent).toBe("amps = 1");
    expect(second && within(second).getByRole("img", { name: "over limit" })).toBeTruthy();
    expect(second?.querySelector(".line-margin")?.getAttribute("title")).toBe("warm\nhot");
    expect(screen.getAllByRole("img")).toHaveLength(1);
  });

  it("shows hidden characters by their code point", () => {
    const { container } = render(<MarkedText text={"am\u200bps = 1"} path="a.conf" />);
    expect(container.querySelector(".hidden-character")?.textContent).toContain("U+200B");
  });
});

describe("line addresses", () => {
  it("tell the texts of one page apart and lead to another page", () => {
    const anchors = { paths: ["a.conf", "b.h"], base: "/readings/7" };
    expect(lineHref(anchors, "a.conf", 12)).toBe("/readings/7#L12");
    expect(lineHref(anchors, "b.h", 12)).toBe(`/readings/7#${lineId(1, 12)}`);
    expect(lineHref(anchors, "c.h", 1)).toBeNull();
  });
});
