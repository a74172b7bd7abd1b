import Link from "next/link";
import type { Assembly, AxisAssembly } from "@/lib/domain/assembly";
import { loadSchema } from "@/lib/domain/assembly";
import { CATALOG_DATA, CATALOG_KIND_WORDS, type CatalogKind } from "@/lib/domain/catalog";
import { kindSlug } from "@/lib/schemas/catalog";
import { formFields, valueAt, type FieldData, type FormField } from "@/lib/schemas/form-fields";
import { fieldWords } from "@/components/catalog/item-changes";
import { axisTitle } from "@/components/findings/axis-title";
import { Head, Table } from "@/components/ui/table";

interface FittedItem {
  readonly id: string;
  readonly code: string;
  readonly name: string;
}

export interface HardwareTablesProps {
  readonly assembly: Assembly;
  readonly fitted: Readonly<Record<string, FittedItem>>;
  /** What is this machine's own, with its evidence; paths as in a finding's `needs`. */
  readonly own: readonly { readonly path: string; readonly evidence: string }[];
  /** Leads from each axis to its sheet; left out where there is none. */
  readonly machineId?: string | undefined;
}

type Part = CatalogKind | "load";

const AXIS_PARTS: readonly Part[] = ["motor", "driver", "drive_train", "load", "mount"];
const FIELDS: Readonly<Record<Part, readonly FormField[]>> = {
  motor: formFields(CATALOG_DATA.motor),
  driver: formFields(CATALOG_DATA.driver),
  controller_board: formFields(CATALOG_DATA.controller_board),
  supply: formFields(CATALOG_DATA.supply),
  drive_train: formFields(CATALOG_DATA.drive_train),
  mount: formFields(CATALOG_DATA.mount),
  load: formFields(loadSchema),
};

function capital(words: string): string {
  return words.charAt(0).toUpperCase() + words.slice(1);
}

function partWords(part: Part): string {
  return capital(part === "load" ? "load" : CATALOG_KIND_WORDS[part].one);
}

/** The fields that are known, each with its unit; a part without any says so. */
function Values({ part, data }: { readonly part: Part; readonly data: FieldData | undefined }) {
  const known = FIELDS[part].flatMap((field) => {
    const value = data === undefined ? undefined : valueAt(data, field.path);
    return value === undefined ? [] : [{ field, value }];
  });
  if (known.length === 0)
    return <span className="quiet">Nothing is known of it; the checks that need it cannot be done.</span>;
  return (
    <ul className="flex flex-wrap gap-x-4">
      {known.map(({ field, value }) => (
        <li key={field.path}>
          <span className="quiet">{field.label}</span>{" "}
          <span className="whitespace-nowrap">{fieldWords(field, value)}</span>
        </li>
      ))}
    </ul>
  );
}

interface RowProps extends Pick<HardwareTablesProps, "fitted" | "own"> {
  readonly part: Part;
  readonly path: string;
  readonly data: FieldData | undefined;
}

function Item({ part, item }: { readonly part: Part; readonly item: FittedItem | undefined }) {
  if (part === "load" || !item) return <span className="quiet">–</span>;
  return (
    <Link href={`/catalog/${kindSlug(part)}/${item.id}`}>
      {item.code} {item.name}
    </Link>
  );
}

function Row({ part, path, data, fitted, own }: RowProps) {
  const evidence = own.filter((fact) => fact.path === path || fact.path.startsWith(`${path}.`));
  return (
    <tr>
      <th scope="row">{partWords(part)}</th>
      <td>
        <Item part={part} item={fitted[path]} />
      </td>
      <td className="min-w-80">
        <Values part={part} data={data} />
      </td>
      <td>
        {evidence.length === 0 && <span className="quiet">as its model</span>}
        {evidence.map((fact) => (
          <p key={`${fact.path} ${fact.evidence}`}>
            <strong>{fact.path === path ? "its own" : `its own ${fieldOf(part, fact.path, path)}`}</strong>:{" "}
            {fact.evidence}
          </p>
        ))}
      </td>
    </tr>
  );
}

function fieldOf(part: Part, factPath: string, path: string): string {
  const field = factPath.slice(path.length + 1);
  const label = FIELDS[part].find((known) => known.path === field)?.label;
  return (label ?? field.replaceAll("_", " ")).toLowerCase();
}

function PartHeads() {
  return (
    <thead>
      <tr>
        <Head>Part</Head>
        <Head>Fitted</Head>
        <Head>What is known</Head>
        <Head>Whose</Head>
      </tr>
    </thead>
  );
}

function axisNote({
  motor_count: count,
  travel_mm: mm,
  travel_deg: deg,
  coupled_with: coupled,
}: AxisAssembly) {
  const words = [
    count !== undefined && count > 1 && `${count} motors`,
    mm !== undefined && `travel ${mm} mm`,
    deg !== undefined && `travel ${deg} deg`,
    coupled !== undefined && coupled.length > 0 && `moves together with ${coupled.join(", ").toUpperCase()}`,
  ].filter((word) => word !== false);
  return words.length === 0 ? "" : `: ${words.join(", ")}`;
}

interface AxisHardwareProps extends Pick<HardwareTablesProps, "fitted" | "own"> {
  readonly axis: AxisAssembly;
}

/** The hardware of one axis, part by part. */
export function AxisHardware({ axis, fitted, own }: AxisHardwareProps) {
  return (
    <Table caption={`${axisTitle(axis.axis)}${axisNote(axis)}`}>
      <PartHeads />
      <tbody>
        {AXIS_PARTS.map((part) => (
          <Row
            key={part}
            part={part}
            path={`axes.${axis.axis}.${part}`}
            data={
              axis[part as keyof Pick<AxisAssembly, "motor" | "driver" | "drive_train" | "load" | "mount">]
            }
            fitted={fitted}
            own={own}
          />
        ))}
      </tbody>
    </Table>
  );
}

/** The hardware that counts for a machine, part by part: what is fitted, what is known of it, whose it is. */
export function HardwareTables({ assembly, fitted, own, machineId }: HardwareTablesProps) {
  return (
    <>
      <Table caption="Machine">
        <PartHeads />
        <tbody>
          <Row part="supply" path="supply" data={assembly.supply} fitted={fitted} own={own} />
          <Row
            part="controller_board"
            path="controller_board"
            data={assembly.controller_board}
            fitted={fitted}
            own={own}
          />
        </tbody>
      </Table>
      {assembly.axes.map((axis) => (
        <div key={axis.axis}>
          <AxisHardware axis={axis} fitted={fitted} own={own} />
          {machineId !== undefined && (
            <p>
              <Link href={`/machines/${machineId}/axes/${encodeURIComponent(axis.axis)}`}>
                {axisTitle(axis.axis)}: operating map, torque curve, temperatures
              </Link>
            </p>
          )}
        </div>
      ))}
    </>
  );
}
