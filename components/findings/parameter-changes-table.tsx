import type { ReactNode } from "react";
import type { AxisKind } from "@/lib/domain/axis-kind";
import { parameterLabel } from "@/lib/domain/parameters";
import { formatNumber } from "@/lib/domain/units";
import { axisWord } from "@/lib/review/axis-word";
import type { ParameterChange } from "@/lib/review/types";
import { NoValue, ParameterQuantity } from "@/components/ui/quantity";
import { RevisionMark } from "@/components/ui/revision-mark";
import { Head, NumberCell, Table } from "@/components/ui/table";

export interface ParameterChangesTableProps {
  readonly changes: readonly ParameterChange[];
  /** Kind by axis name in lower case; left out: linear. */
  readonly kinds?: Readonly<Record<string, AxisKind>> | undefined;
  /** What hangs on a parameter, by revision letter: its comments, the way to add one. */
  readonly notes?: Readonly<Record<string, ReactNode>> | undefined;
}

/** "+24 %", "−5 %" */
export function changeWords(change: number): string {
  const sign = change < 0 ? "\u2212" : "+";
  return `${sign}${formatNumber(Math.abs(change) * 100, 2)}\u00a0%`;
}

function Side({ change, side }: { change: ParameterChange; side: "was" | "toBe" }) {
  const value = change[side];
  return value === null ? <NoValue /> : <ParameterQuantity parameter={change.parameter} {...value} />;
}

function labelOf({ axis, parameter }: ParameterChange, kind: AxisKind | undefined): string {
  const label = parameterLabel(parameter, kind);
  return axis === null ? label : `${axisWord(axis)} ${label.toLowerCase()}`;
}

function Row({
  change,
  kind,
  note,
}: {
  change: ParameterChange;
  kind: AxisKind | undefined;
  note: ReactNode | undefined;
}) {
  return (
    <>
      <tr id={`revision-${change.letter}`}>
        <td className="letters">
          <RevisionMark letter={change.letter} />
        </td>
        <th scope="row">{labelOf(change, kind)}</th>
        <NumberCell>
          <Side change={change} side="was" />
        </NumberCell>
        <NumberCell className="to-be">
          <Side change={change} side="toBe" />
        </NumberCell>
        <NumberCell>{change.change === null ? <NoValue /> : changeWords(change.change)}</NumberCell>
      </tr>
      {note !== undefined && (
        <tr className="row-note">
          <td className="letters" />
          <td colSpan={4}>{note}</td>
        </tr>
      )}
    </>
  );
}

/** The parameters that a change touches, by revision letter. */
export function ParameterChangesTable({ changes, kinds, notes }: ParameterChangesTableProps) {
  return (
    <Table caption="Changed parameters" captionHidden className="changes">
      <thead>
        <tr>
          <td className="letters" />
          <Head>Parameter</Head>
          <Head number className="was-head">
            Was
          </Head>
          <Head number className="to-be-head">
            To be
          </Head>
          <Head number>Change</Head>
        </tr>
      </thead>
      <tbody>
        {changes.map((change) => (
          <Row
            key={change.letter}
            change={change}
            kind={kinds?.[change.axis?.toLowerCase() ?? ""]}
            note={notes?.[change.letter]}
          />
        ))}
      </tbody>
    </Table>
  );
}
