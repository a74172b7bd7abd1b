import type { Metadata } from "next";
import Link from "next/link";
import { notFound } from "next/navigation";
import { z } from "zod";
import { FindingsBox } from "@/components/findings/findings-box";
import { StandingMark } from "@/components/floor/standing-mark";
import { DayChoice } from "@/components/machines/day-choice";
import { DriftList } from "@/components/machines/drift-list";
import { HardwareTables } from "@/components/machines/hardware-tables";
import { LayersTable } from "@/components/machines/layers-table";
import { MachineFacts } from "@/components/machines/machine-facts";
import { OpenChanges } from "@/components/machines/open-changes";
import { RequiredSection } from "@/components/machines/required-section";
import { ReadingsTable } from "@/components/readings/readings-table";
import { RecordList } from "@/components/record/record-list";
import { ButtonLink } from "@/components/ui/button";
import { DateTime } from "@/components/ui/date-time";
import { Empty } from "@/components/ui/empty";
import { Sheet, SheetHead, SheetSection } from "@/components/ui/sheet";
import { TitleBlock } from "@/components/ui/title-block";
import { axisKind } from "@/lib/domain/axis-kind";
import type { Finding } from "@/lib/domain/findings";
import { STANDING_WORDS } from "@/lib/domain/floor";
import { LEVEL_WORDS } from "@/lib/domain/levels";
import { plural } from "@/lib/domain/sentences";
import { daySchema, endOfDay } from "@/lib/http/day-query";
import { load, pageActor, type PageContext } from "@/lib/http/page-actor";
import { readParams, type SearchParams } from "@/lib/http/search-params";
import { may } from "@/lib/policies/decide";
import { showMachine, type MachineSheetView } from "@/lib/services/machines/show";
import { recordOfObject } from "@/lib/services/record/of-object";

export const metadata: Metadata = { title: "Machine" };

const query = z.object({ on: daySchema.optional() });

interface PageProps {
  readonly params: Promise<{ id: string }>;
  readonly searchParams: SearchParams;
}

interface PartProps {
  readonly machine: MachineSheetView;
  readonly context: PageContext;
  readonly past: boolean;
}

export default async function MachinePage({ params, searchParams }: PageProps) {
  const context = await pageActor("machines.read");
  const { id } = await params;
  if (!z.uuid().safeParse(id).success) notFound();
  const { query: asked, typed, errors } = await readParams(query, searchParams);
  const asOf = endOfDay(asked.on, context.now);
  const machine = await load(showMachine(context, { id, asOf }));
  const events = await load(recordOfObject(context, { type: "machine", id }));
  const part = { machine, context, past: asOf !== undefined };
  return (
    <Sheet>
      <SheetHead
        kicker={
          <>
            <Link href="/floor">Floor</Link>, {machine.site.name}
          </>
        }
        title={`${machine.serial}, ${machine.model.name}`}
        subtitle={
          <>
            <StandingMark standing={machine.standing} /> {machine.sentence}
          </>
        }
        acts={!part.past && <Acts {...part} />}
      />
      {part.past && (
        <p>
          As of <DateTime value={machine.drift.asOf} />, with the hardware and the key table of today.
        </p>
      )}
      <DayChoice path={`/machines/${id}`} day={typed.on ?? ""} error={errors.on} />
      <MachineFacts machine={machine} />
      <Standing {...part} />
      <Layers {...part} />
      <Required {...part} />
      <Readings {...part} />
      <Changes {...part} />
      <Hardware {...part} />
      <SheetSection title="Record" id="record">
        <RecordList events={events} caption="Record of this machine" />
      </SheetSection>
      <MachineTitleBlock {...part} />
    </Sheet>
  );
}

function Acts({ machine, context: { actor } }: PartProps) {
  const { id, state } = machine;
  return (
    <>
      {may(actor, "machines.write") && <ButtonLink href={`/machines/${id}/edit`}>Edit</ButtonLink>}
      {may(actor, "changes.create") && (
        <ButtonLink href={`/changes/new?machine=${id}`}>Propose a change</ButtonLink>
      )}
      {may(actor, "readings.create") && state !== "retired" && (
        <ButtonLink variant="primary" href={`/readings/new?machine=${id}`}>
          Add a reading
        </ButtonLink>
      )}
    </>
  );
}

function Standing({ machine }: PartProps) {
  const { drift, findings } = machine;
  return (
    <SheetSection title="Where it stands" id="drift" note={STANDING_WORDS[machine.standing]}>
      {drift.items.length > 0 ? (
        <DriftList items={drift.items} />
      ) : (
        <p>
          {drift.baseline === null
            ? "No baseline has been released to this machine, so there is nothing to hold it against."
            : "What counts on the machine is what is required."}
        </p>
      )}
      <details className="mt-3" open={findings.some(({ level }) => level === "over")}>
        <summary>Every check of the values that count{levelCounts(findings)}</summary>
        <FindingsBox
          findings={findings}
          label="Checks of the values that count"
          empty="There is nothing to check: neither a reading nor a required text."
        />
      </details>
    </SheetSection>
  );
}

/** ": 2 over limit, 1 near limit"; empty where nothing stands out. */
function levelCounts(findings: readonly Finding[]): string {
  const words = (["over", "near", "cannot"] as const).flatMap((level) => {
    const count = findings.filter((finding) => finding.level === level).length;
    return count === 0 ? [] : [`${count} ${LEVEL_WORDS[level]}`];
  });
  return words.length === 0 ? "" : `: ${words.join(", ")}`;
}

function Layers({ machine }: PartProps) {
  const { id, layers, standingReadings, assembly } = machine;
  const kinds = Object.fromEntries(
    assembly.axes.map(({ axis, drive_train: train }) => [axis.toLowerCase(), axisKind(train?.kind)]),
  );
  if (layers.length === 0) return null;
  return (
    <SheetSection title="Three layers" id="layers" note="The highest layer that has a value counts">
      <LayersTable
        machineId={id}
        rows={layers}
        read={standingReadings.map(({ layer }) => layer)}
        kinds={kinds}
      />
    </SheetSection>
  );
}

function Required({ machine, context, past }: PartProps) {
  const { id, required } = machine;
  return (
    <SheetSection title="Required configuration" id="required">
      {required ? (
        <RequiredSection machineId={id} required={required} past={past} />
      ) : (
        <Empty
          act={
            may(context.actor, "changes.create") && (
              <ButtonLink href={`/changes/new?model=${machine.model.id}`}>
                Propose the first configuration of its model
              </ButtonLink>
            )
          }
        >
          Here stands the exact text that this machine has to run, once a baseline is released to it.
        </Empty>
      )}
    </SheetSection>
  );
}

function Readings({ machine, context }: PartProps) {
  const { id, readings, readingsTotal } = machine;
  return (
    <SheetSection title="Readings" id="readings" note={plural(readingsTotal, "reading")}>
      {readings.length > 0 ? (
        <ReadingsTable readings={readings} />
      ) : (
        <Empty
          act={
            may(context.actor, "readings.create") && (
              <ButtonLink variant="primary" href={`/readings/new?machine=${id}`}>
                Add a reading
              </ButtonLink>
            )
          }
        >
          Here stands every text read from this machine. It was never read.
        </Empty>
      )}
      {readingsTotal > readings.length && (
        <p>
          <Link href={`/readings?machineId=${id}`}>All {readingsTotal} readings of this machine</Link>
        </p>
      )}
    </SheetSection>
  );
}

function Changes({ machine: { changes } }: PartProps) {
  return (
    <SheetSection title="Open changes" id="changes" note={plural(changes.length, "change")}>
      {changes.length > 0 ? <OpenChanges changes={changes} /> : <p>No open change takes this machine in.</p>}
    </SheetSection>
  );
}

function Hardware({ machine }: PartProps) {
  const { id, assembly, fitted, own, ignored } = machine;
  return (
    <SheetSection title="Hardware" id="hardware" note="Its own recorded hardware counts before its model's">
      <HardwareTables assembly={assembly} fitted={fitted} own={own} machineId={id} />
      {ignored.length > 0 && (
        <ul>
          {ignored.map(({ path, reason }) => (
            <li key={path}>
              Recorded but not used: <span className="code">{path}</span>. {reason}
            </li>
          ))}
        </ul>
      )}
    </SheetSection>
  );
}

function MachineTitleBlock({ machine }: PartProps) {
  const { serial, model, required, standing } = machine;
  return (
    <TitleBlock
      title={`${serial}, ${model.name}`}
      documentType="Machine sheet"
      identificationNumber={serial}
      revision={required ? `baseline ${required.baseline.number}` : "no baseline"}
      sheet="1 of 1"
      dateOfIssue={<DateTime value={machine.drift.asOf} />}
      creator="Keepstep, from readings and baselines"
      status={STANDING_WORDS[standing]}
      approvedBy="–"
    />
  );
}
