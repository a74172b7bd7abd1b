import { cleanup, fireEvent, render, screen, within } from "@testing-library/react";
import { useForm } from "react-hook-form";
import { afterEach, describe, expect, it } from "vitest";
import { SchemaForm } from "@/components/catalog/schema-form";
import { CATALOG_DATA, type CatalogKind } from "@/lib/domain/catalog";
import { unlockedBy } from "@/lib/rules/unlocks";
import { formFields, typedValues } from "@/lib/schemas/form-fields";

afterEach(cleanup);

function Form({ kind, data }: { kind: CatalogKind; data: Record<string, unknown> }) {
  const schema = CATALOG_DATA[kind];
  const form = useForm({ defaultValues: { data: typedValues(schema, data) } });
  return <SchemaForm subject={kind} schema={schema} form={form} prefix="data" />;
}

function described(label: string): string {
  const entry = screen.getByLabelText(label);
  const ids = entry.getAttribute("aria-describedby")?.split(" ") ?? [];
  return ids.map((id) => document.getElementById(id)?.textContent).join(" ");
}

describe("the form of a schema", () => {
  it("puts the unit behind every number that has one", () => {
    render(<Form kind="motor" data={{}} />);
    for (const { label, unit, entry } of formFields(CATALOG_DATA.motor))
      if (entry === "number") expect(described(label)).toContain(unit);
  });

  it("says only at an empty field which checks it would unlock", () => {
    const [title] = unlockedBy("motor", "inductance_mh");
    expect(title).toBeDefined();
    render(<Form kind="motor" data={{ resistance_ohm: 2.1 }} />);
    expect(described("Winding inductance")).toContain(title);
    expect(described("Winding resistance at 20 °C")).not.toContain("unlock");
    fireEvent.change(screen.getByLabelText("Winding inductance"), { target: { value: "3" } });
    expect(described("Winding inductance")).not.toContain("unlock");
  });

  it("sets the fields under headings", () => {
    render(<Form kind="driver" data={{}} />);
    const group = screen.getByRole("group", { name: "Chopping" });
    expect(within(group).getByLabelText("Decay mode")).toBeDefined();
  });

  it("asks for what the chosen kind has, and keeps in sight what was filled for another", () => {
    render(<Form kind="drive_train" data={{ kind: "belt", lead_mm: 8 }} />);
    expect(screen.queryByLabelText("Module of the rack")).toBeNull();
    expect(screen.getByLabelText("Belt pitch")).toBeDefined();
    expect(screen.getByLabelText("Lead of the screw")).toHaveProperty("value", "8");
    fireEvent.change(screen.getByLabelText("Kind"), { target: { value: "rack" } });
    expect(screen.getByLabelText("Module of the rack")).toBeDefined();
  });
});
