"use client";

import { useState, useSyncExternalStore } from "react";
import { fieldErrors } from "@/components/api";
import { LiveOperatingMap } from "@/components/axis/live-operating-map";
import { Form } from "@/components/forms/form";
import { Refusal } from "@/components/forms/refusal";
import { Button } from "@/components/ui/button";
import { DateTime } from "@/components/ui/date-time";
import { Notice } from "@/components/ui/notice";
import { CounterBox } from "./counter-box";
import { FileEditor } from "./file-editor";
import { forgetDraft, keptDraft, type KeptDraft } from "./kept-draft";
import { LiveFindings } from "./live-findings";
import { ProposalDetails } from "./proposal-details";
import type { EditedChange, ProposalFields, ProposalStartData } from "./proposal-types";
import { useProposal } from "./use-proposal";

export interface ProposalEditorProps {
  readonly start: ProposalStartData;
  /** Null for a change that is being drafted. */
  readonly change: EditedChange | null;
}

/** Edits the text of a proposal with the checks beside it, and saves or submits it. */
export function ProposalEditor({ start, change }: ProposalEditorProps) {
  const proposal = useProposal({ start, change });
  const [goTo, setGoTo] = useState<{ path: string; line: number } | null>(null);
  const { files, fields, answer, save } = proposal;
  const fresh = !change || change.state === "draft";
  return (
    <Form
      onSubmit={async (event) => {
        event.preventDefault();
        save.mutate(false);
      }}
    >
      <KeptNotice place={proposal.place} onRestore={proposal.restore} />
      <div className="editor-columns">
        <section aria-label="Text">
          <FileEditor
            files={files}
            edition={proposal.edition}
            findings={answer?.report.findings ?? []}
            goTo={goTo}
            taken={proposal.taken}
            onChange={proposal.edit}
          />
        </section>
        <section aria-label="What the checks say">
          <CounterBox start={start} files={files} report={answer?.report ?? null} onTake={proposal.take} />
          <LiveFindings
            answer={answer}
            baseReport={proposal.baseReport}
            onGoTo={(path, line) => setGoTo({ path, line })}
          />
          <LiveOperatingMap
            base={start.files}
            files={files}
            keyTable={start.keyTable}
            assembly={start.assembly}
            policy={start.policy}
          />
        </section>
      </div>
      <ProposalDetails
        start={start}
        fields={fields}
        errors={fieldErrors(save.error)}
        editing={change !== null}
        onChange={proposal.setFields}
      />
      <Refusal error={save.error} title="Not saved" />
      <div className="acts">
        {fresh && (
          <Button variant="primary" busy={save.isPending} onClick={() => save.mutate(true)}>
            Submit for evaluation
          </Button>
        )}
        <Button type="submit" variant={fresh ? "plain" : "primary"} busy={save.isPending}>
          {fresh ? "Save the draft" : "Save as a new version"}
        </Button>
        {change?.state === "approved" && <p className="caution">Saving voids the approval.</p>}
      </div>
    </Form>
  );
}

const never = (): (() => void) => () => undefined;

interface KeptNoticeProps {
  readonly place: string;
  readonly onRestore: (kept: { files: KeptDraft["files"]; fields: ProposalFields }) => void;
}

/** Offers back what was typed here before and not saved. */
function KeptNotice({ place, onRestore }: KeptNoticeProps) {
  const [answered, setAnswered] = useState(false);
  const hydrated = useSyncExternalStore(
    never,
    () => true,
    () => false,
  );
  const [kept] = useState(() => (typeof window === "undefined" ? null : keptDraft(place)));
  if (!hydrated || answered || !kept) return null;
  return (
    <Notice
      title="There are words here that were not saved"
      acts={
        <>
          <Button
            onClick={() => {
              // Written by useProposal, whose fields these are.
              onRestore({ files: kept.files, fields: kept.fields as unknown as ProposalFields });
              setAnswered(true);
            }}
          >
            Take them up again
          </Button>
          <Button
            variant="quiet"
            onClick={() => {
              forgetDraft(place);
              setAnswered(true);
            }}
          >
            leave them out
          </Button>
        </>
      }
    >
      <p>
        Typed in this browser <DateTime value={kept.at} /> and kept only here.
      </p>
    </Notice>
  );
}
