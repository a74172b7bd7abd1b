import {
  CHANGE_CLASS_WORDS,
  CHANGE_STATE_WORDS,
  mayMove,
  type ChangeState,
} from "@/lib/domain/change-states";
import { SIGNATURE_MEANINGS } from "@/lib/domain/changes";
import type { Action } from "@/lib/domain/actions";
import type { Actor } from "@/lib/domain/roles";
import { decide } from "@/lib/policies/decide";
import { DateTime } from "@/components/ui/date-time";
import { ButtonLink } from "@/components/ui/button";
import { TitleBlock } from "@/components/ui/title-block";
import { ActForm } from "./act-form";
import type { ChangeView } from "./change-view";
import { SignedHash, SignField } from "./sign-field";

export interface ChangeTitleBlockProps {
  readonly change: ChangeView;
  readonly actor: Actor;
  /** An older proposal version is shown: nothing is decided upon it. */
  readonly past: boolean;
}

/** The title block of a change: approved, declined, deferred and moved on in its own fields. */
export function ChangeTitleBlock({ change, actor, past }: ChangeTitleBlockProps) {
  const { label, title, class: changeClass, kind, author, createdAt, decidedAt, proposal } = change;
  const type = kind === "deviation" ? "Permitted deviation" : "Change request";
  const maySign = !past && change.state === "evaluation" && refusal(change, actor, "changes.decide") === null;
  return (
    <TitleBlock
      title={title}
      documentType={
        <>
          {type}, <span title={CHANGE_CLASS_WORDS[changeClass]}>class {changeClass}</span>
        </>
      }
      identificationNumber={label}
      revision={proposal.version}
      sheet="1 of 1"
      dateOfIssue={<DateTime value={decidedAt ?? createdAt} dateOnly />}
      creator={author.name}
      status={<StatusField change={change} actor={actor} past={past} />}
      approvedBy={<ApprovedField change={change} actor={actor} past={past} />}
      openToDecide={maySign && change.stale === null}
    />
  );
}

/** Why this person may not do it, or null. */
function refusal(change: ChangeView, actor: Actor, action: Action): string | null {
  const verdict = decide(actor, action, { authorId: change.author.id, lastEditorId: change.lastEditorId });
  return verdict.allowed ? null : verdict.reason;
}

function ApprovedField({ change, actor, past }: ChangeTitleBlockProps) {
  const signature = change.dispositions.findLast(
    ({ decision, voidAt }) => decision === "approved" && voidAt === null,
  );
  if (signature)
    return (
      <>
        {signature.actorName}, <DateTime value={signature.at} />
        <p className="quiet">{signature.meaning}</p>
        {Object.entries(signature.justifications).map(([key, words]) => (
          <p key={key} className="quiet">
            {sentenceOf(change, key)} Justified: {words}
          </p>
        ))}
        <SignedHash version={signature.proposalVersion} hash={signature.signedHash} />
      </>
    );
  if (past) return <span className="quiet">An earlier version is shown; sign on the newest.</span>;
  if (change.state !== "evaluation") return <span className="quiet">not approved</span>;
  if (change.stale !== null)
    return <span className="quiet">Its base has moved; bring it up to date first.</span>;
  const why = refusal(change, actor, "changes.decide");
  if (why !== null) return <span className="quiet">not yet. {why}</span>;
  return (
    <SignField
      changeId={change.id}
      lockVersion={change.lockVersion}
      proposalVersion={change.proposal.version}
      signedContentHash={change.proposal.signedContentHash}
      overKeys={change.evaluation.overKeys}
    />
  );
}

function sentenceOf({ evaluation }: ChangeView, key: string): string {
  return evaluation.overKeys.find((one) => one.key === key)?.sentence ?? "";
}

function StatusField({ change, actor, past }: ChangeTitleBlockProps) {
  const last = change.dispositions.at(-1);
  return (
    <>
      {CHANGE_STATE_WORDS[change.state]}
      {last && last.decision !== "approved" && last.reason !== "" && (
        <p className="quiet">
          {last.actorName}: {last.reason}
        </p>
      )}
      {last?.voidReason && <p className="quiet">The approval is void: {last.voidReason}.</p>}
      {!past && (
        <div className="title-acts">
          <Acts change={change} actor={actor} />
        </div>
      )}
    </>
  );
}

function Acts({ change, actor }: Omit<ChangeTitleBlockProps, "past">) {
  const { id, state, lockVersion, proposal } = change;
  const can = (action: Action, to: ChangeState) =>
    mayMove(state, to) && refusal(change, actor, action) === null;
  const shared = { lockVersion };
  const seen = { proposalVersion: proposal.version, signedContentHash: proposal.signedContentHash };
  const decides = state === "evaluation" && refusal(change, actor, "changes.decide") === null;
  const act = (name: string) => `/changes/${id}/${name}`;
  return (
    <>
      {state === "draft" && can("changes.submit", "evaluation") && (
        <ActForm
          {...shared}
          primary
          label="Submit"
          act="Submit for evaluation"
          path={act("submit")}
          reason="welcome"
        />
      )}
      {state === "approved" && can("changes.release", "implementation") && (
        <ActForm
          {...shared}
          primary
          label="Release"
          act="Release to the machines"
          path={act("release")}
          reason="welcome"
        >
          <p>
            From now on {change.effectivityWords} require this text; their technicians are told by e-mail.
          </p>
        </ActForm>
      )}
      {decides && <Decisions change={change} seen={seen} path={act("disposition")} />}
      {state === "deferred" && can("changes.resume", "evaluation") && (
        <ActForm
          {...shared}
          label="take up again"
          act="Take it up again"
          path={act("resume")}
          reason="welcome"
        />
      )}
      {["draft", "evaluation", "approved"].includes(state) &&
        refusal(change, actor, "changes.edit") === null && (
          <ButtonLink variant="quiet" href={`/changes/${id}/edit`}>
            edit
          </ButtonLink>
        )}
      {state === "evaluation" && can("changes.take_back", "draft") && (
        <ActForm
          {...shared}
          label="take back"
          act="Take back into draft"
          path={act("take-back")}
          reason="welcome"
        />
      )}
      {can("changes.withdraw", "withdrawn") && (
        <ActForm
          {...shared}
          label="withdraw"
          act="Withdraw the change"
          path={act("withdraw")}
          reason="needed"
        />
      )}
      {can("changes.back_out", "backed_out") && (
        <ActForm
          {...shared}
          label="back out"
          act="Back out and sign"
          path={act("back-out")}
          reason="needed"
          meaning={SIGNATURE_MEANINGS.backed_out}
        />
      )}
    </>
  );
}

interface DecisionsProps {
  readonly change: ChangeView;
  readonly seen: Readonly<Record<string, unknown>>;
  readonly path: string;
}

function Decisions({ change: { lockVersion }, seen, path }: DecisionsProps) {
  return (
    <>
      <ActForm
        lockVersion={lockVersion}
        label="decline"
        act="Decline and sign"
        path={path}
        reason="needed"
        meaning={SIGNATURE_MEANINGS.declined}
        more={{ ...seen, decision: "declined" }}
      />
      <ActForm
        lockVersion={lockVersion}
        label="defer"
        act="Defer and sign"
        path={path}
        reason="needed"
        meaning={SIGNATURE_MEANINGS.deferred}
        more={{ ...seen, decision: "deferred" }}
      />
    </>
  );
}
