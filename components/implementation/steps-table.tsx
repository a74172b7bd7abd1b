import Link from "next/link";
import { DateTime } from "@/components/ui/date-time";
import { Head, Table } from "@/components/ui/table";

export interface StepRow {
  readonly changeId: string;
  readonly changeLabel: string;
  readonly title: string;
  readonly machineId: string;
  readonly serial: string;
  readonly modelName: string;
  readonly siteName: string;
  readonly releasedAt: string;
  readonly missing: string | null;
}

/** Steps that wait, with what each still lacks. */
export function StepsTable({ steps }: { readonly steps: readonly StepRow[] }) {
  return (
    <Table caption="Steps that wait" captionHidden>
      <thead>
        <tr>
          <Head>Machine</Head>
          <Head>Change</Head>
          <Head>Missing</Head>
          <Head>Released</Head>
        </tr>
      </thead>
      <tbody>
        {steps.map((step) => (
          <tr key={`${step.changeId}${step.machineId}`}>
            <th scope="row">
              <Link href={`/changes/${step.changeId}/machines/${step.machineId}`}>{step.serial}</Link>
              <span className="block quiet">
                {step.modelName}, {step.siteName}
              </span>
            </th>
            <td>
              {step.changeLabel} {step.title}
            </td>
            <td>{step.missing ?? "Nothing."}</td>
            <td>
              <DateTime value={step.releasedAt} dateOnly />
            </td>
          </tr>
        ))}
      </tbody>
    </Table>
  );
}
