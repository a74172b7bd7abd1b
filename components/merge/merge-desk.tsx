"use client";

import { useRouter } from "next/navigation";
import { useMemo, useState } from "react";
import { reviseText } from "@/lib/diff/revise-text";
import { parameterLabel } from "@/lib/domain/parameters";
import { joinWords, plural } from "@/lib/domain/sentences";
import type { Policy } from "@/lib/domain/policy";
import { onAxis } from "@/lib/review/axis-word";
import type { Choices, MergeAnswer } from "@/lib/review/merge-protocol";
import type { MergedParameter, MergeInput } from "@/lib/review/merge-types";
import type { ConfigurationFile } from "@/lib/review/types";
import { apiCall } from "@/components/api";
import { EffectsTable } from "@/components/findings/effects-table";
import { ParameterChangesTable } from "@/components/findings/parameter-changes-table";
import { Form } from "@/components/forms/form";
import { Refusal } from "@/components/forms/refusal";
import { SubmitButton } from "@/components/forms/submit-button";
import { useSave } from "@/components/forms/use-save";
import { DrawingRevision } from "@/components/revision/drawing-revision";
import { SheetSection } from "@/components/ui/sheet";
import { ConflictBox } from "./conflict-box";
import { useMerge } from "./use-merge";

export interface MergeDeskProps {
  readonly changeId: string;
  readonly lockVersion: number;
  /** Of the proposal that is merged. */
  readonly version: number;
  readonly todayLabel: string;
  readonly texts: Omit<MergeInput, "choices"> & { readonly baseHash: string; readonly policy: Policy };
}

/** A proposal merged with the text in force: conflicts are settled here, and the new version is made of it. */
export function MergeDesk({ changeId, lockVersion, version, todayLabel, texts }: MergeDeskProps) {
  const router = useRouter();
  const [choices, setChoices] = useState<Choices>({});
  const { baseHash, policy } = texts;
  const input = useMemo(() => {
    const { base, ours, theirs, keyTable, assembly } = texts;
    return { base, ours, theirs, keyTable, assembly };
  }, [texts]);
  const answer = useMerge({ input, policy, choices });
  const save = useSave({
    send: () =>
      apiCall("POST", `/changes/${changeId}/bring-up-to-date`, {
        body: { baseHash, choices },
        ifMatch: lockVersion,
      }),
    onSaved: () => router.push(`/changes/${changeId}`),
  });
  if (!answer) return <p className="quiet">Merging the texts …</p>;
  const open = answer.conflicts.filter(({ conflict }) => conflict.choice === null).length;
  return (
    <Form
      onSubmit={async (event) => {
        event.preventDefault();
        await save.mutateAsync(undefined).catch(() => undefined);
      }}
    >
      <p aria-live="polite">{summary(answer.merged, { open, total: answer.conflicts.length, todayLabel })}</p>
      {answer.conflicts.length > 0 && (
        <SheetSection title="Conflicts" note={`${open} of ${answer.conflicts.length} open`}>
          {answer.conflicts.map((outlook) => (
            <ConflictBox
              key={outlook.conflict.id}
              outlook={outlook}
              todayLabel={todayLabel}
              onChoose={(id, choice) => setChoices({ ...choices, [id]: choice })}
            />
          ))}
        </SheetSection>
      )}
      {answer.files && <Outcome answer={answer} files={answer.files} theirs={texts.theirs} />}
      <Refusal error={save.error} />
      <SubmitButton busy={save.isPending} disabled={open > 0}>
        Make version {version + 1} upon {todayLabel}
      </SubmitButton>
    </Form>
  );
}

interface Counts {
  readonly open: number;
  readonly total: number;
  readonly todayLabel: string;
}

function summary(merged: readonly MergedParameter[], { open, total, todayLabel }: Counts): string {
  const from = (side: MergedParameter["from"]) =>
    merged
      .filter((one) => one.from === side)
      .map(({ axis, parameter }) => onAxis(axis, parameterLabel(parameter).toLowerCase()));
  const parts = [
    from("ours").length > 0 && `From the proposal: ${joinWords(from("ours"), "and")}.`,
    from("theirs").length > 0 && `From ${todayLabel}: ${joinWords(from("theirs"), "and")}.`,
    from("both").length > 0 && `Changed alike in both: ${joinWords(from("both"), "and")}.`,
    total === 0
      ? "Nothing conflicts."
      : open === 0
        ? "Every conflict has a choice."
        : `${plural(open, "conflict")} to settle.`,
  ];
  return parts.filter(Boolean).join(" ");
}

interface OutcomeProps {
  readonly answer: MergeAnswer;
  readonly files: readonly ConfigurationFile[];
  readonly theirs: readonly ConfigurationFile[];
}

/** What the merged proposal changes of the text in force. */
function Outcome({ answer: { changes, effects }, files, theirs }: OutcomeProps) {
  const paths = [...new Set([...theirs, ...files].map(({ path }) => path))];
  const textAt = (list: readonly ConfigurationFile[], path: string) =>
    list.find((file) => file.path === path)?.text ?? "";
  return (
    <>
      {changes.length > 0 && (
        <SheetSection title="Changed parameters">
          <ParameterChangesTable changes={changes} />
        </SheetSection>
      )}
      {effects.length > 0 && (
        <SheetSection title="Effects">
          <EffectsTable effects={effects} />
        </SheetSection>
      )}
      <SheetSection title="Text as merged">
        {paths.map((path, index) => (
          <div key={path} className="mb-4">
            <h3 className="code">{path}</h3>
            <DrawingRevision
              path={path}
              index={index}
              stretches={reviseText(textAt(theirs, path), textAt(files, path))}
            />
          </div>
        ))}
      </SheetSection>
    </>
  );
}
