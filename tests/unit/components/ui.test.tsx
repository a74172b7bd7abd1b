import { cleanup, fireEvent, render, screen, within } from "@testing-library/react";
import { afterEach, describe, expect, it, vi } from "vitest";
import { LEVELS, LEVEL_WORDS } from "@/lib/domain/levels";
import { Button } from "@/components/ui/button";
import { Facts } from "@/components/ui/facts";
import { CheckboxField, RadioField, SelectField, TextField } from "@/components/ui/field";
import { addFiles, FileDrop } from "@/components/ui/file-drop";
import { fileSize } from "@/components/ui/file-size";
import { LevelMark } from "@/components/ui/level-mark";
import { Notice } from "@/components/ui/notice";
import { Pager } from "@/components/ui/pager";
import { ParameterQuantity, Quantity } from "@/components/ui/quantity";
import { RevisionMarks } from "@/components/ui/revision-mark";
import { Sheet, SheetHead } from "@/components/ui/sheet";
import { Head, NumberCell, Table } from "@/components/ui/table";
import { TitleBlock } from "@/components/ui/title-block";

afterEach(cleanup);
vi.stubGlobal(
  "ResizeObserver",
  class {
    observe() {}
    disconnect() {}
  },
);

describe("LevelMark", () => {
  it("says every level in words and draws each with a shape of its own", () => {
    const shapes = LEVELS.map((level) => {
      const { container } = render(<LevelMark level={level} />);
      expect(container.textContent).toBe(LEVEL_WORDS[level]);
      return container.querySelector("svg")?.innerHTML;
    });
    expect(new Set(shapes).size).toBe(LEVELS.length);
  });

  it("keeps the word as text alternative where the mark stands alone", () => {
    render(<LevelMark level="cannot" word={false} />);
    expect(screen.getByRole("img", { name: "cannot check" })).toBeTruthy();
  });
});

describe("Quantity", () => {
  it("binds number and unit with a no-break space, in the unit of the floor", () => {
    const { container } = render(<Quantity value={0.455} unit="m/s" />);
    expect(container.textContent).toBe("455\u00a0mm/s");
    expect(container.querySelector(".quantity-unit")?.textContent).toBe("\u00a0mm/s");
  });

  it("shows a true minus sign and the basis of a current", () => {
    const { container } = render(<Quantity value={-1.5} unit="A" basis="rms" />);
    expect(container.textContent).toBe("\u22121.5\u00a0A rms");
  });

  it("says that there is no value", () => {
    const { container } = render(<Quantity value={null} unit="A" />);
    expect(container.textContent).toContain("no value");
  });

  it("says a switch in words and keeps six digits of a setting", () => {
    const reversed = render(
      <ParameterQuantity parameter="direction_reversed" value={1} unit="" basis={null} />,
    );
    expect(reversed.container.textContent).toBe("yes");
    const scale = render(
      <ParameterQuantity parameter="steps_per_mm" value={79.7612} unit="1/mm" basis={null} />,
    );
    expect(scale.container.textContent).toBe("79.7612\u00a01/mm");
  });
});

describe("RevisionMarks", () => {
  it("reads letters out one by one and draws nothing for none", () => {
    const { container, rerender } = render(<RevisionMarks letters={["A", "AA"]} />);
    expect([...container.querySelectorAll(".visually-hidden")].map((word) => word.textContent)).toEqual([
      "revision A",
      "revision AA",
    ]);
    rerender(<RevisionMarks letters={[]} />);
    expect(container.innerHTML).toBe("");
  });
});

describe("Sheet", () => {
  it("is the page's main part, which the skip link leads to", () => {
    render(
      <Sheet>
        <SheetHead kicker="CR-0042" title="Faster X travel" />
      </Sheet>,
    );
    expect(screen.getByRole("main").id).toBe("sheet");
    expect(screen.getByRole("heading", { level: 1 }).textContent).toBe("Faster X travel");
  });
});

describe("TitleBlock", () => {
  const fields = {
    title: "Slower feed",
    documentType: "Change request",
    identificationNumber: "CR-0007",
    revision: "2",
    sheet: "1/1",
    dateOfIssue: "2026-11-30",
    creator: "I. Okafor",
    status: "in evaluation",
  };

  it("carries the data fields of ISO 7200, each under its name", () => {
    const { container } = render(<TitleBlock {...fields} approvedBy="" />);
    const names = [...container.querySelectorAll("dt")].map((term) => term.textContent);
    expect(new Set(names)).toEqual(
      new Set([
        "Legal owner",
        "Title",
        "Document type",
        "Identification number",
        "Revision",
        "Sheet",
        "Date of issue",
        "Creator",
        "Status",
        "Approved by",
      ]),
    );
    for (const value of Object.values(fields)) expect(container.textContent).toContain(value);
  });

  it("holds the decision in its field and washes it while it is open", () => {
    const { container } = render(
      <TitleBlock {...fields} approvedBy={<Button>Sign here</Button>} openToDecide />,
    );
    const open = container.querySelector<HTMLElement>(".title-cell-open");
    expect(open && within(open).getByRole("button", { name: "Sign here" })).toBeTruthy();
  });
});

describe("Button", () => {
  it("does not submit by itself and takes no second press while busy", () => {
    const press = vi.fn();
    render(
      <Button busy onClick={press}>
        Submit
      </Button>,
    );
    const button = screen.getByRole("button", { name: "Submit" });
    fireEvent.click(button);
    expect(press).not.toHaveBeenCalled();
    expect(button.getAttribute("type")).toBe("button");
    expect(button.getAttribute("aria-busy")).toBe("true");
  });
});

describe("fields", () => {
  it("tie label, unit, help and error to the input", () => {
    render(<TextField label="Winding resistance" unit="Ω" help="At 20 °C" error="More than 0." />);
    const input = screen.getByLabelText("Winding resistance");
    const described = (input.getAttribute("aria-describedby") ?? "")
      .split(" ")
      .map((id) => document.getElementById(id)?.textContent);
    expect(described).toEqual(["Ω", "At 20 °C", "More than 0."]);
    expect(input.getAttribute("aria-invalid")).toBe("true");
  });

  it("leave a sound field without a mark of error", () => {
    render(<SelectField label="Basis" />);
    const select = screen.getByLabelText("Basis");
    expect(select.hasAttribute("aria-invalid")).toBe(false);
    expect(select.hasAttribute("aria-describedby")).toBe(false);
  });

  it("name a choice as a group and each of its options", () => {
    render(
      <RadioField
        label="Layer"
        name="layer"
        options={[
          { value: "file", label: "File" },
          { value: "stored", label: "Stored values" },
        ]}
      />,
    );
    const group = screen.getByRole("group", { name: "Layer" });
    expect(within(group).getByLabelText("Stored values").getAttribute("value")).toBe("stored");
  });

  it("set the words of a checkbox beside it", () => {
    render(<CheckboxField label="Holding brake" />);
    expect(screen.getByLabelText("Holding brake").getAttribute("type")).toBe("checkbox");
  });
});

describe("FileDrop", () => {
  const axes = new File(["a"], "axes.conf");
  const limits = new File(["b"], "limits.h");

  it("takes dropped files beside those already there", () => {
    const change = vi.fn();
    render(<FileDrop label="Text" files={[axes]} onChange={change} multiple />);
    const place = screen.getByText("Text").closest("label");
    expect(place).not.toBeNull();
    if (place) fireEvent.drop(place, { dataTransfer: { files: [limits] } });
    expect(change).toHaveBeenCalledWith([axes, limits]);
  });

  it("leaves a file out again", () => {
    const change = vi.fn();
    render(<FileDrop label="Text" files={[axes, limits]} onChange={change} multiple />);
    fireEvent.click(screen.getByRole("button", { name: "Leave out axes.conf" }));
    expect(change).toHaveBeenCalledWith([limits]);
  });

  it("lets a second file of one name take the place of the first", () => {
    const newer = new File(["c"], "axes.conf");
    expect(addFiles([axes, limits], [newer], true)).toEqual([limits, newer]);
    expect(addFiles([axes], [limits, newer], false)).toEqual([limits]);
  });

  it("tells sizes with a unit", () => {
    expect([1, 999, 1000, 2_500_000].map(fileSize)).toEqual(["1 byte", "999 bytes", "1.0 kB", "2.5 MB"]);
  });
});

describe("Table", () => {
  it("is named by its caption and heads its columns", () => {
    render(
      <Table caption="Changed parameters" captionHidden>
        <thead>
          <tr>
            <Head>Parameter</Head>
            <Head number>Was</Head>
          </tr>
        </thead>
        <tbody>
          <tr>
            <th scope="row">Run current</th>
            <NumberCell>0.85 A</NumberCell>
          </tr>
        </tbody>
      </Table>,
    );
    const table = screen.getByRole("table", { name: "Changed parameters" });
    expect(
      within(table)
        .getAllByRole("columnheader")
        .map((head) => head.textContent),
    ).toEqual(["Parameter", "Was"]);
    expect(within(table).getByRole("rowheader").textContent).toBe("Run current");
  });
});

describe("small parts", () => {
  it("a notice is read out when it tells of a failure", () => {
    render(
      <Notice title="Not saved" live="alert">
        The text was kept.
      </Notice>,
    );
    expect(screen.getByRole("alert").textContent).toContain("The text was kept.");
  });

  it("a pager leads on only where there is more", () => {
    render(<Pager label="Changes" summary="41 to 80 of 80" previousHref="?page=1" nextHref={null} />);
    expect(screen.getAllByRole("link").map((link) => link.textContent)).toEqual(["Previous"]);
  });

  it("facts pair a name with a value and its evidence", () => {
    const { container } = render(
      <Facts facts={[{ label: "Sense resistance", value: "0.11 Ω", note: "marking read" }]} />,
    );
    expect(container.querySelector("dt")?.textContent).toBe("Sense resistance");
    expect(container.querySelector("dd")?.textContent).toBe("0.11 Ωmarking read");
  });
});
