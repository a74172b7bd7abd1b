import Link from "next/link";
import { plural } from "@/lib/domain/sentences";
import { axisWord } from "@/lib/review/axis-word";
import { findingWords } from "@/lib/review/finding-words";
import type { RehearsalMachineView } from "@/lib/schemas/rehearsals";
import { LevelMark } from "@/components/ui/level-mark";
import { NoValue, Quantity } from "@/components/ui/quantity";
import { SheetSection } from "@/components/ui/sheet";
import { Head, NumberCell, Table } from "@/components/ui/table";
import { roomLack, roomNotes } from "./room-words";

export interface MachinesBySiteProps {
  /** Site by site, as the list comes. */
  readonly machines: readonly RehearsalMachineView[];
}

/** The machines of a rehearsal under the name of their site. */
export function MachinesBySite({ machines }: MachinesBySiteProps) {
  const sites = new Map<string, RehearsalMachineView[]>();
  for (const machine of machines) sites.set(machine.siteId, [...(sites.get(machine.siteId) ?? []), machine]);
  return [...sites].map(([id, own]) => <SiteMachines key={id} machines={own} />);
}

function SiteMachines({ machines }: MachinesBySiteProps) {
  const [first] = machines;
  if (!first) return null;
  const { siteName, siteAmbientC } = first;
  return (
    <SheetSection
      title={siteName}
      note={
        <>
          {siteAmbientC === null ? (
            "ambient temperature not stated"
          ) : (
            <>
              design maximum <Quantity value={siteAmbientC} unit="°C" />
            </>
          )}
          , {plural(machines.length, "machine")} here
        </>
      }
    >
      <Table caption={`Machines at ${siteName}`} captionHidden>
        <thead>
          <tr>
            <Head>Machine</Head>
            <Head>Today</Head>
            <Head>Would be</Head>
            <Head>Gravest</Head>
            <Head number>Hottest room</Head>
          </tr>
        </thead>
        <tbody>
          {machines.map((machine) => (
            <MachineRow key={machine.machineId} machine={machine} />
          ))}
        </tbody>
      </Table>
    </SheetSection>
  );
}

function MachineRow({ machine }: { readonly machine: RehearsalMachineView }) {
  const { machineId, serial, modelName, was, toBe, axes, trouble } = machine;
  return (
    <tr>
      <th scope="row">
        <Link href={`/machines/${machineId}`}>{serial}</Link>
        <p className="row-note">
          {modelName}
          {axes.length > 0 && `, ${axes.length === 1 ? "axis" : "axes"} ${axes.map(axisWord).join(", ")}`}
        </p>
      </th>
      <td>
        <LevelMark level={was} />
      </td>
      <td>
        <LevelMark level={toBe} />
      </td>
      <td>{trouble === null ? <Gravest machine={machine} /> : trouble}</td>
      <NumberCell>
        <Room machine={machine} />
      </NumberCell>
    </tr>
  );
}

function Gravest({ machine: { graver } }: { readonly machine: RehearsalMachineView }) {
  const [first, ...rest] = graver;
  if (!first) return <>Nothing would be graver than today.</>;
  return (
    <>
      {findingWords(first)}
      {rest.length > 0 && (
        <details>
          <summary>{plural(rest.length, "more check")} graver than today</summary>
          <ul>
            {rest.map((finding) => (
              <li key={`${finding.ruleId} ${finding.axis}`}>
                <LevelMark level={finding.toBe} /> {findingWords(finding)}
              </li>
            ))}
          </ul>
        </details>
      )}
    </>
  );
}

function Room({ machine: { hottestRoom } }: { readonly machine: RehearsalMachineView }) {
  if (!hottestRoom) return <NoValue />;
  const { kind, ambientC } = hottestRoom;
  const lack = roomLack(hottestRoom);
  return (
    <>
      {kind === "cannot" ? (
        <LevelMark level="cannot" />
      ) : (
        <Quantity value={ambientC} unit="°C" sign={kind === "any" ? "≥" : undefined} />
      )}
      {roomNotes(hottestRoom).map((note) => (
        <p key={note} className="row-note">
          {note}
        </p>
      ))}
      {lack !== null && (
        <details className="row-note">
          <summary>Not everything could be checked</summary>
          <p>{lack}</p>
        </details>
      )}
    </>
  );
}
