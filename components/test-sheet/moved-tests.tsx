import Link from "next/link";
import { axisWord } from "@/lib/review/axis-word";
import type { MovedTests } from "@/lib/schemas/test-sheets";
import { ButtonLink } from "@/components/ui/button";
import { SHEET_STATE_WORDS } from "./sheets-table";

export interface MovedTestListProps {
  readonly tests: MovedTests["items"];
  readonly changeId: string;
  readonly machineId: string;
  readonly mayStart: boolean;
}

/** The tests that a change asks for, why, and what each is expected to read. */
export function MovedTestList({ tests, changeId, machineId, mayStart }: MovedTestListProps) {
  if (tests.length === 0)
    return <p className="quiet">The change moves no prediction that a test on the machine could settle.</p>;
  return (
    <ul className="moved-tests">
      {tests.map(({ axis, test, title, because, expected, why, sheets }) => (
        <li key={`${axis} ${test}`}>
          <h3>
            {axisWord(axis)} axis: {title.charAt(0).toLowerCase()}
            {title.slice(1)}
          </h3>
          <p className="quiet">Moved: {because.join("; ")}.</p>
          {expected.map((line) => (
            <p key={line}>{line}</p>
          ))}
          {why !== null && <p>No boundary can be predicted: start and step are given by hand. {why}</p>}
          {sheets.map(({ id, label, state }) => (
            <p key={id}>
              <Link href={`/test-sheets/${id}`}>{label}</Link>, {SHEET_STATE_WORDS[state]}
            </p>
          ))}
          {mayStart && (
            <ButtonLink
              href={`/test-sheets/new?${new URLSearchParams({ machineId, axis, test, changeId }).toString()}`}
            >
              Start the test sheet
            </ButtonLink>
          )}
        </li>
      ))}
    </ul>
  );
}
