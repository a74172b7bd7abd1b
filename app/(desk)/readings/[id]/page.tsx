import type { Metadata } from "next";
import Link from "next/link";
import { notFound } from "next/navigation";
import { z } from "zod";
import { CheckedTexts } from "@/components/readings/checked-texts";
import { ReadingFacts } from "@/components/readings/reading-facts";
import { RecordList } from "@/components/record/record-list";
import { ButtonLink } from "@/components/ui/button";
import { DateTime } from "@/components/ui/date-time";
import { Sheet, SheetHead, SheetSection } from "@/components/ui/sheet";
import { TitleBlock } from "@/components/ui/title-block";
import { LAYER_WORDS, READING_KIND_WORDS } from "@/lib/domain/readings";
import { load, pageActor } from "@/lib/http/page-actor";
import { may } from "@/lib/policies/decide";
import { showReading } from "@/lib/services/readings/show";
import { recordOfObject } from "@/lib/services/record/of-object";

export const metadata: Metadata = { title: "Reading" };

const STATUS_WORDS = { counts: "counts", ended: "no longer counts", past: "of the past" } as const;

export default async function ReadingPage({ params }: { readonly params: Promise<{ id: string }> }) {
  const context = await pageActor("readings.read");
  const { id } = await params;
  if (!z.uuid().safeParse(id).success) notFound();
  const reading = await load(showReading(context, id));
  const events = await load(recordOfObject(context, { type: "reading", id }));
  const { machine, model, site, kind, layer, files, versions } = reading;
  const title = `${machine.serial}, ${READING_KIND_WORDS[kind]}, ${LAYER_WORDS[layer]}`;
  return (
    <Sheet>
      <SheetHead
        kicker={
          <>
            Reading of <Link href={`/machines/${machine.id}`}>{machine.serial}</Link>, {model.name},{" "}
            {site.name}
          </>
        }
        title={title}
        subtitle={
          <>
            Read <DateTime value={reading.readAt} />, by {reading.actorName}
          </>
        }
        acts={
          may(context.actor, "changes.create") && (
            <ButtonLink href={`/changes/new?machine=${machine.id}`}>Propose a change</ButtonLink>
          )
        }
      />
      <ReadingFacts reading={reading} />
      <CheckedTexts
        checked={reading}
        files={files}
        modelId={model.id}
        mayMap={may(context.actor, "key_tables.write")}
        fileActs={files.map(({ position }) => (
          <a
            key={position}
            className="button button-plain"
            href={`/api/v1/readings/${id}/files/${position}`}
            download
          >
            Save as it came in
          </a>
        ))}
      />
      <SheetSection title="Record">
        <RecordList events={events} caption="Record of this reading" />
      </SheetSection>
      <TitleBlock
        title={title}
        documentType="Reading"
        identificationNumber={<span className="code break-all">{id}</span>}
        revision={`key table ${versions.keyTable}, policy ${versions.policy}, rules ${versions.rules}`}
        sheet="1 of 1"
        dateOfIssue={<DateTime value={reading.receivedAt} />}
        creator={reading.actorName}
        status={STATUS_WORDS[reading.standing.state]}
        approvedBy="–"
      />
    </Sheet>
  );
}
