import type { Metadata } from "next";
import { notFound } from "next/navigation";
import { z } from "zod";
import { MergeDesk } from "@/components/merge/merge-desk";
import { ButtonLink } from "@/components/ui/button";
import { Notice } from "@/components/ui/notice";
import { Sheet, SheetHead } from "@/components/ui/sheet";
import { load, pageActor } from "@/lib/http/page-actor";
import { mergeStart } from "@/lib/services/changes/merge-start";

export const metadata: Metadata = { title: "Bring a change up to date" };

export default async function MergePage({ params }: { readonly params: Promise<{ id: string }> }) {
  const context = await pageActor("changes.edit");
  const { id } = await params;
  if (!z.uuid().safeParse(id).success) notFound();
  const { label, title, version, lockVersion, todayLabel, texts } = await load(mergeStart(context, id));
  return (
    <Sheet>
      <SheetHead
        kicker={`${label}, version ${version}, upon ${todayLabel}`}
        title={`Bring ${title} up to date`}
        subtitle="What only one text changed is taken by itself. Where the proposal and the text in force say different things, choose."
      />
      {texts === null ? (
        <Notice
          title="It is up to date"
          acts={<ButtonLink href={`/changes/${id}`}>To the change</ButtonLink>}
        >
          <p>The proposal stands on {todayLabel}, the text in force.</p>
        </Notice>
      ) : (
        <MergeDesk
          changeId={id}
          lockVersion={lockVersion}
          version={version}
          todayLabel={todayLabel}
          texts={texts}
        />
      )}
    </Sheet>
  );
}
