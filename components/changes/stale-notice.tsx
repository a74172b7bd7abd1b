"use client";

import { parameterLabel, type ParameterName } from "@/lib/domain/parameters";
import { plural } from "@/lib/domain/sentences";
import { apiCall } from "@/components/api";
import { Refusal } from "@/components/forms/refusal";
import { useSave } from "@/components/forms/use-save";
import { Button } from "@/components/ui/button";
import { Notice } from "@/components/ui/notice";

interface Answer {
  readonly reapplied: readonly { axis: string | null; parameter: ParameterName }[];
  readonly notFitting: readonly { axis: string | null; parameter: ParameterName; reason: string }[];
  readonly textNotFitting: readonly { path: string; line: number; text: string }[];
}

export interface StaleNoticeProps {
  readonly changeId: string;
  readonly lockVersion: number;
  /** Why the proposal cannot be decided as it stands; null once it stands on the text in force. */
  readonly stale: string | null;
  readonly mayEdit: boolean;
}

/** Says that the base has moved and brings the proposal up to date; what did not fit stays listed. */
export function StaleNotice({ changeId, lockVersion, stale, mayEdit }: StaleNoticeProps) {
  const save = useSave({
    send: () =>
      apiCall<Answer>("POST", `/changes/${changeId}/bring-up-to-date`, { body: {}, ifMatch: lockVersion }),
  });
  if (save.data) return <BroughtUp answer={save.data} />;
  if (stale === null) return null;
  return (
    <Notice
      title="The base has moved"
      acts={
        mayEdit && (
          <Button variant="primary" busy={save.isPending} onClick={() => save.mutate(undefined)}>
            Bring it up to date
          </Button>
        )
      }
    >
      <p>{stale}</p>
      <Refusal error={save.error} />
    </Notice>
  );
}

function place({ axis, parameter }: { axis: string | null; parameter: ParameterName }): string {
  const label = parameterLabel(parameter).toLowerCase();
  return axis === null ? label : `${axis.toUpperCase()} ${label}`;
}

function BroughtUp({ answer: { reapplied, notFitting, textNotFitting } }: { readonly answer: Answer }) {
  const open = notFitting.length + textNotFitting.length;
  return (
    <Notice live="status" title="A new version stands on the text in force">
      <p>
        {plural(reapplied.length, "edit")} reapplied{open === 0 ? ", and nothing was left over." : "."}
      </p>
      {open > 0 && (
        <>
          <p>These did not fit and were left out; put them in by hand where they are still wanted:</p>
          <ul>
            {notFitting.map((one) => (
              <li key={place(one)}>
                {place(one)}: {one.reason}
              </li>
            ))}
            {textNotFitting.map(({ path, line, text }) => (
              <li key={`${path}:${line}`}>
                {path}, line {line}: <code className="code">{text}</code>
              </li>
            ))}
          </ul>
        </>
      )}
    </Notice>
  );
}
