import { axisKind, type AxisKind } from "@/lib/domain/axis-kind";
import { parameterLabel } from "@/lib/domain/parameters";
import { ParameterChangesTable } from "@/components/findings/parameter-changes-table";
import { axisWord } from "@/lib/review/axis-word";
import { respelled } from "@/lib/review/respelled";
import type { ChangeView } from "./change-view";
import { CommentForm } from "./comment-form";
import { Comments, onParameter } from "./comments";
import { RespelledValues } from "./respelled-values";

export interface ChangedParametersProps {
  readonly change: ChangeView;
  readonly mayComment: boolean;
}

/** Rotary axes are told by the unit of their values. */
function kindsOf({ evaluation }: ChangeView): Record<string, AxisKind> {
  const rotary = evaluation.report.parameters.filter(({ unit }) => unit.includes("rad") || unit === "1/deg");
  return Object.fromEntries(rotary.map(({ axis }) => [axis?.toLowerCase() ?? "", axisKind("rotary")]));
}

/** The parameters that change, each with its comments and the way to add one. */
export function ChangedParameters({ change, mayComment }: ChangedParametersProps) {
  const { changes, report, baseReport } = change.evaluation;
  const rewritten = <RespelledValues values={respelled(baseReport, report)} />;
  if (changes.length === 0)
    return (
      <>
        <p className="quiet">No parameter changes its meaning.</p>
        {rewritten}
      </>
    );
  const notes = changes.flatMap(({ letter, axis, parameter }) => {
    const comments = onParameter(change.comments, { axis, parameter });
    if (comments.length === 0 && !mayComment) return [];
    const label = parameterLabel(parameter).toLowerCase();
    const note = (
      <>
        <Comments comments={comments} />
        {mayComment && (
          <CommentForm
            changeId={change.id}
            proposalVersion={change.proposal.version}
            anchor={{ kind: "parameter", axis, parameter }}
            on={axis === null ? label : `${axisWord(axis)} ${label}`}
          />
        )}
      </>
    );
    return [[letter, note] as const];
  });
  return (
    <>
      <ParameterChangesTable changes={changes} kinds={kindsOf(change)} notes={Object.fromEntries(notes)} />
      {rewritten}
    </>
  );
}
