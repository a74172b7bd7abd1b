import type { Metadata } from "next";
import Link from "next/link";
import { notFound } from "next/navigation";
import { z } from "zod";
import { MapsOfChange } from "@/components/axis/maps-of-change";
import { ChangeTexts } from "@/components/changes/change-texts";
import { ChangeTitleBlock } from "@/components/changes/change-title-block";
import { ChangedParameters } from "@/components/changes/changed-parameters";
import { CommentForm } from "@/components/changes/comment-form";
import { Comments } from "@/components/changes/comments";
import { DeviationsTouched } from "@/components/changes/deviations-touched";
import { EvaluationFindings } from "@/components/changes/evaluation-findings";
import { MachinesProgress } from "@/components/changes/machines-progress";
import { StaleNotice } from "@/components/changes/stale-notice";
import { UnsentNotice } from "@/components/changes/unsent-notice";
import { Versions } from "@/components/changes/versions";
import { CounterSection } from "@/components/solve/counter-section";
import { EffectsTable } from "@/components/findings/effects-table";
import { RecordList } from "@/components/record/record-list";
import { Quantity } from "@/components/ui/quantity";
import { Sheet, SheetHead, SheetSection } from "@/components/ui/sheet";
import { load, pageActor } from "@/lib/http/page-actor";
import { readParams, type SearchParams } from "@/lib/http/search-params";
import { may } from "@/lib/policies/decide";
import { counterBasis } from "@/lib/services/changes/counter-basis";
import { operatingMapsOfChange } from "@/lib/services/changes/operating-maps";
import type { ChangeView } from "@/lib/services/changes/show";
import { showChange } from "@/lib/services/changes/show";
import { recordOfObject } from "@/lib/services/record/of-object";

interface ChangePageProps {
  readonly params: Promise<{ id: string }>;
  readonly searchParams: SearchParams;
}

const query = z.object({ version: z.coerce.number().int().min(1).optional() });

export const metadata: Metadata = { title: "Change" };

export default async function ChangePage({ params, searchParams }: ChangePageProps) {
  const context = await pageActor("changes.read");
  const { id } = await params;
  if (!z.uuid().safeParse(id).success) notFound();
  const asked = (await readParams(query, searchParams)).query.version;
  const change = await load(showChange(context, id, asked));
  const counter = await load(counterBasis(context, { changeId: id, version: asked }));
  const maps = await load(operatingMapsOfChange(context, { changeId: id, version: change.proposal.version }));
  const events = await load(recordOfObject(context, { type: "change", id }));
  const past = change.proposal.version !== change.versions.at(-1)?.version;
  const mayComment = may(context.actor, "changes.comment");
  return (
    <Sheet>
      <Head change={change} past={past} />
      {change.state === "draft" && <UnsentNotice changeId={id} />}
      <StaleNotice changeId={id} stale={change.stale} mayEdit={may(context.actor, "changes.edit")} />
      <EvaluationFindings evaluation={change.evaluation} />
      {counter && (
        <CounterSection
          basis={counter}
          editHref={
            !past && may(context.actor, "changes.edit") && isEditable(change) ? `/changes/${id}/edit` : null
          }
        />
      )}
      <div className="two-columns">
        <SheetSection title="Effects" note={<EvaluatedOn change={change} />}>
          <Effects change={change} />
        </SheetSection>
        <SheetSection title="Parameters">
          <ChangedParameters change={change} mayComment={mayComment} />
          <DeviationsTouched touched={change.deviationsTouched} />
        </SheetSection>
      </div>
      <SheetSection title="Operating map" note="was and to be, on the hardware of the evaluation">
        {maps.length > 0 ? (
          <MapsOfChange maps={maps} />
        ) : (
          <p className="quiet">No axis moves on its operating map.</p>
        )}
      </SheetSection>
      <SheetSection title="Text" note={`was: ${change.base.label}`}>
        <ChangeTexts change={change} mayComment={mayComment} />
      </SheetSection>
      <SheetSection title="Comments on the whole change">
        <Comments comments={change.comments.filter(({ anchor }) => anchor.kind === "change")} />
        {mayComment && (
          <CommentForm
            changeId={id}
            proposalVersion={change.proposal.version}
            anchor={{ kind: "change" }}
            on="the whole change"
          />
        )}
      </SheetSection>
      <SheetSection title="Proposal versions">
        <Versions changeId={id} versions={change.versions} shown={change.proposal.version} />
      </SheetSection>
      {change.machines.length > 0 && (
        <SheetSection title="On the machines">
          <MachinesProgress change={change} />
        </SheetSection>
      )}
      <SheetSection title="Record">
        <RecordList events={events} caption="Record of this change" />
      </SheetSection>
      <ChangeTitleBlock change={change} actor={context.actor} past={past} />
    </Sheet>
  );
}

const EDITABLE = ["draft", "evaluation", "approved"];

function isEditable({ state }: ChangeView): boolean {
  return EDITABLE.includes(state);
}

function Head({ change, past }: { readonly change: ChangeView; readonly past: boolean }) {
  const { label, effectivityWords, machine, model, deviationUntil, title, reason, proposal } = change;
  return (
    <SheetHead
      kicker={
        <>
          {label} · {machine ? <Link href={`/machines/${machine.id}`}>{machine.serial}</Link> : model.name} ·
          effectivity: {effectivityWords}
          {deviationUntil && `, permitted until ${deviationUntil}`}
          {past && ` · version ${proposal.version}, not the newest`}
        </>
      }
      title={title}
      subtitle={<span className="whitespace-pre-line">{reason}</span>}
    />
  );
}

function EvaluatedOn({ change: { evaluation, machine } }: { readonly change: ChangeView }) {
  const { ambientC, rulesVersion, policyVersion, keyTableVersion } = evaluation;
  return (
    <>
      on {machine ? "this machine's own hardware" : "the design"}, ambient{" "}
      {ambientC === null ? "not known" : <Quantity value={ambientC} unit="°C" />}; rules {rulesVersion},
      policy {policyVersion}, key table {keyTableVersion}
    </>
  );
}

function Effects({ change: { evaluation } }: { readonly change: ChangeView }) {
  if (evaluation.effects.length === 0) return <p className="quiet">No physical quantity changes.</p>;
  return <EffectsTable effects={evaluation.effects} />;
}
