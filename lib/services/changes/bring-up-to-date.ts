import "server-only";
import { changeLabel } from "@/lib/domain/changes";
import { plural } from "@/lib/domain/sentences";
import { mergeConfigurations } from "@/lib/review/merge";
import type { MergeChoice } from "@/lib/review/merge-types";
import { rebaseEdits } from "@/lib/review/rebase";
import type { RebaseResult } from "@/lib/review/rebase";
import type { BringUpToDate } from "@/lib/schemas/changes";
import type { Context } from "@/lib/services/kernel/context";
import { authorize } from "@/lib/services/kernel/context";
import { ServiceError } from "@/lib/services/kernel/errors";
import { withTransaction } from "@/lib/services/kernel/transaction";
import { appendRecord } from "@/lib/services/record/append";
import type { StoredFile } from "@/lib/services/revisions/files";
import { mergedFiles } from "@/lib/services/texts/merged-files";
import { leaveApproval } from "./edit";
import type { ChangeBrief } from "./load";
import { briefOf, currentVersion, demandMove, lockChange, recordObject, subjectOf } from "./load";
import type { ThreeTexts } from "./three-texts";
import { threeTexts } from "./three-texts";
import { writeVersion } from "./write-version";

type Place = Pick<RebaseResult["reapplied"][number], "axis" | "parameter">;

/** What became of the proposal's edits on the text in force. */
interface Outcome {
  readonly files: StoredFile[];
  readonly reapplied: readonly Place[];
  readonly notFitting: readonly (Place & { readonly reason: string })[];
  readonly textNotFitting: RebaseResult["textNotFitting"];
}

export interface BroughtUpToDate extends Omit<Outcome, "files"> {
  readonly change: ChangeBrief;
}

interface Request extends BringUpToDate {
  readonly id: string;
  readonly ifMatch: number | null;
}

/** Opens the proposal again on its base as it is today: merged as chosen, or its edits reapplied where they still fit and the rest told. */
export async function bringUpToDate(context: Context, request: Request): Promise<BroughtUpToDate> {
  return withTransaction(context, async (tx) => {
    const change = await lockChange(tx, request.id, request.ifMatch);
    authorize(tx, "changes.edit", subjectOf(change));
    if (change.state !== "draft") demandMove(change, { to: "withdrawn", as: "brought up to date" });
    const version = await currentVersion(tx, change);
    const texts = await threeTexts({ change, version, asOf: tx.now, transaction: tx.transaction });
    demandSameBase(texts, request, changeLabel(change.number));
    const { files, ...outcome } = request.choices ? merged(texts, request.choices) : reapplied(texts);
    const { today } = texts;
    await writeVersion(tx, change, { files, base: today, note: `brought up to date with ${today.label}` });
    await leaveApproval(tx, change);
    await appendRecord(tx, {
      action: "change.brought_up_to_date",
      object: recordObject(change),
      changeId: change.id,
      machineId: change.machineId,
      after: {
        version: change.currentVersion,
        base: today.label,
        reapplied: outcome.reapplied.map(({ axis, parameter }) => ({ axis, parameter })),
        notFitting: outcome.notFitting.map(({ axis, parameter, reason }) => ({ axis, parameter, reason })),
      },
    });
    return { change: briefOf(change), ...outcome };
  });
}

function demandSameBase({ today }: ThreeTexts, { baseHash }: Request, label: string): void {
  if (baseHash === undefined || baseHash === today.hash) return;
  throw new ServiceError(
    "conflict",
    `The base of ${label} has moved once more, to ${today.label}. Nothing was done; open the page again and look at the conflicts with it.`,
  );
}

function reapplied({ oldBase, edited, today, keyTable, assembly }: ThreeTexts): Outcome {
  const rebased = rebaseEdits({ oldBase, edited, newBase: today.files, keyTable, assembly });
  // A text that both have takes the encoding of the one in force.
  const files = mergedFiles(rebased.files, { base: edited, ours: edited, theirs: today.files });
  return { ...rebased, files };
}

function merged(texts: ThreeTexts, choices: Readonly<Record<string, MergeChoice>>): Outcome {
  const { oldBase, edited, today, keyTable, assembly } = texts;
  const sides = { base: oldBase, ours: edited, theirs: today.files };
  const result = mergeConfigurations({
    ...sides,
    keyTable,
    assembly,
    choices: new Map(Object.entries(choices)),
  });
  const open = result.conflicts.filter(({ choice }) => choice === null);
  if (!result.files)
    throw new ServiceError(
      "conflict",
      `${plural(open.length, "conflict")} with ${today.label} still ${open.length === 1 ? "has" : "have"} no choice. Nothing was done; choose for each, then try again.`,
      { details: { open: open.map(({ id }) => id) } },
    );
  const chosen = result.conflicts.flatMap(({ places, choice }) =>
    places.flatMap(({ axis, parameter }) => (parameter === null ? [] : [{ axis, parameter, choice }])),
  );
  return {
    files: mergedFiles(result.files, sides),
    reapplied: [
      ...result.merged.filter(({ from }) => from === "ours"),
      ...chosen.filter(({ choice }) => choice === "ours"),
    ].map(({ axis, parameter }) => ({ axis, parameter })),
    notFitting: chosen
      .filter(({ choice }) => choice !== "ours")
      .map(({ axis, parameter, choice }) => ({
        axis,
        parameter,
        reason:
          choice === "base" ? "As it was before both was chosen." : `What ${today.label} has was chosen.`,
      })),
    textNotFitting: [],
  };
}
