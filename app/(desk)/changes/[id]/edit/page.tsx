import type { Metadata } from "next";
import { notFound } from "next/navigation";
import { z } from "zod";
import { ProposalEditor } from "@/components/editor/proposal-editor";
import { Notice } from "@/components/ui/notice";
import { Sheet, SheetHead } from "@/components/ui/sheet";
import { load, pageActor } from "@/lib/http/page-actor";
import { editStart } from "@/lib/services/changes/start";

export const metadata: Metadata = { title: "Edit a change" };

export default async function EditChangePage({ params }: { readonly params: Promise<{ id: string }> }) {
  const context = await pageActor("changes.edit");
  const { id } = await params;
  if (!z.uuid().safeParse(id).success) notFound();
  const { change, ...start } = await load(editStart(context, id));
  const { label, lockVersion, state, title, reason, effectivity, deviationUntil, proposal, stale } = change;
  return (
    <Sheet>
      <SheetHead
        kicker={`${label}, version ${proposal.version}, upon ${start.baseLabel}`}
        title={`Edit ${title}`}
      />
      {stale !== null && (
        <Notice title="The base has moved">
          <p>{stale} Saving here keeps the proposal on its old base.</p>
        </Notice>
      )}
      <ProposalEditor
        start={start}
        change={{
          id,
          label,
          lockVersion,
          state,
          files: proposal.files,
          fields: {
            title,
            reason,
            class: change.class,
            effectivity,
            deviationUntil: deviationUntil ?? "",
            note: "",
          },
        }}
      />
    </Sheet>
  );
}
