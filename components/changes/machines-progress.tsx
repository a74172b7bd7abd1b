import Link from "next/link";
import { plural } from "@/lib/domain/sentences";
import { DateTime } from "@/components/ui/date-time";
import { Quantity } from "@/components/ui/quantity";
import { Head, Table } from "@/components/ui/table";
import type { ChangeView } from "./change-view";

type Machine = ChangeView["machines"][number];

/** Where the change stands on each machine: released, applied and verified kept apart. */
export function MachinesProgress({ change }: { readonly change: Pick<ChangeView, "id" | "machines"> }) {
  return (
    <Table caption="Machines of this change" captionHidden>
      <thead>
        <tr>
          <Head>Machine</Head>
          <Head>Released</Head>
          <Head>Applied</Head>
          <Head>Verified</Head>
          <Head>Missing</Head>
        </tr>
      </thead>
      <tbody>
        {change.machines.map((machine) => (
          <Row key={machine.machineId} changeId={change.id} machine={machine} />
        ))}
      </tbody>
    </Table>
  );
}

function Row({ changeId, machine }: { readonly changeId: string; readonly machine: Machine }) {
  const { machineId, serial, siteName, releasedAt, appliedAt, verifiedAt, endedAt, missing, verifications } =
    machine;
  return (
    <tr>
      <th scope="row">
        <Link href={`/changes/${changeId}/machines/${machineId}`}>{serial}</Link>{" "}
        <span className="quiet">{siteName}</span>
      </th>
      <td>
        <DateTime value={releasedAt} />
      </td>
      <td>{appliedAt ? <DateTime value={appliedAt} /> : <span className="quiet">not yet</span>}</td>
      <td>{verifiedAt ? <DateTime value={verifiedAt} /> : <span className="quiet">not yet</span>}</td>
      <td>
        {endedAt ? "Backed out here." : (missing ?? "Nothing.")}
        <Tests tests={verifications} />
      </td>
    </tr>
  );
}

/** The tests recorded on one machine. */
export function Tests({ tests }: { readonly tests: Machine["verifications"] }) {
  if (tests.length === 0) return null;
  return (
    <details>
      <summary className="quiet">{plural(tests.length, "test")}</summary>
      <ul className="comments">
        {tests.map((test) => (
          <Test key={test.id} test={test} />
        ))}
      </ul>
    </details>
  );
}

function Test({ test }: { readonly test: Machine["verifications"][number] }) {
  const { tested, result, ambientC, temperatures, note, statement, actorName, at, attachments } = test;
  return (
    <li>
      <p className="quiet">
        {actorName}, <DateTime value={at} />
      </p>
      <p>
        {result === "pass" ? "Passed" : "Failed"}: {tested}
      </p>
      {ambientC !== null && (
        <p>
          Ambient <Quantity value={ambientC} unit="°C" />
        </p>
      )}
      {temperatures.map(({ axis, place, celsius }, index) => (
        <p key={index}>
          {axis === null ? "Machine" : `${axis.toUpperCase()} axis`}, {place}:{" "}
          <Quantity value={celsius} unit="°C" />
        </p>
      ))}
      {statement && <p>Stated: {statement}</p>}
      {note && <p>{note}</p>}
      {attachments.map(({ id, name }) => (
        <p key={id}>
          <a href={`/api/v1/attachments/${id}`} download>
            {name}
          </a>
        </p>
      ))}
    </li>
  );
}
