import "server-only";
import type { z } from "zod";
import { TEST_WORDS, type TestPlan, type Trial } from "@/lib/domain/test-sheets";
import { entriesSchema, type Entries, type SheetView } from "@/lib/schemas/test-sheets";
import { TestStrike, TestTrial, type TestSheet } from "@/models/test-sheets";
import type { Context, Tx } from "@/lib/services/kernel/context";
import { authorize, requirePerson } from "@/lib/services/kernel/context";
import { ServiceError } from "@/lib/services/kernel/errors";
import { withTransaction } from "@/lib/services/kernel/transaction";
import { appendRecord } from "@/lib/services/record/append";
import { lockSheet } from "./find";
import { sheetObject, sheetView } from "./present";

type Sent = z.output<typeof entriesSchema>;

/**
 * Keeps what a device has gathered, each entry once however often it is sent. Entries that come in after the closing are
 * kept too, so that nothing is lost that somebody did; they are not in the result.
 */
export async function enterOnSheet(
  context: Context,
  input: Entries & { readonly id: string },
): Promise<SheetView> {
  const sent = entriesSchema.parse(input);
  const person = requirePerson(context);
  return withTransaction(context, async (tx) => {
    authorize(tx, "test_sheets.write");
    const { sheet, machine } = await lockSheet(tx, input.id);
    demandFitting(sheet.plan, sent.trials);
    const trials = await keepTrials(tx, { sheet, sent, person });
    const strikes = await keepStrikes(tx, { sheet, sent, person });
    if (trials.length > 0 || strikes.length > 0)
      await appendRecord(tx, {
        action: "test_sheet.entered",
        object: sheetObject(sheet, machine),
        machineId: sheet.machineId,
        changeId: sheet.changeId,
        after: { trials, struck: strikes },
      });
    return sheetView(sheet, tx.transaction);
  });
}

/** A trial has an outcome, on a ladder also its rung; a heat record has temperatures instead. */
function demandFitting({ test }: TestPlan, trials: readonly Trial[]): void {
  const { kind } = TEST_WORDS[test];
  const wrong = trials.findIndex(({ rung, result, temperatures }) =>
    kind === "heat"
      ? result !== null || rung !== null || temperatures.length === 0
      : result === null || (kind === "ladder") !== (rung !== null),
  );
  if (wrong >= 0)
    throw new ServiceError(
      "invalid",
      kind === "heat"
        ? "An entry of a heat record has at least one temperature and no outcome. Nothing was stored."
        : "An entry has an outcome, and on a ladder the rung it was made on. Nothing was stored.",
      { pointer: `/trials/${wrong}` },
    );
}

interface Keep {
  readonly sheet: TestSheet;
  readonly sent: Sent;
  readonly person: { readonly id: string; readonly name: string };
}

async function keepTrials(tx: Tx, { sheet, sent, person }: Keep): Promise<Trial[]> {
  const { transaction } = tx;
  const own = [...new Map(sent.trials.map((trial) => [trial.id, trial])).values()];
  const known = await TestTrial.findAll({ where: { id: own.map(({ id }) => id) }, transaction });
  if (known.some(({ sheetId }) => sheetId !== sheet.id))
    throw new ServiceError(
      "conflict",
      "One of these entries stands on another test sheet. Nothing was stored.",
    );
  const kept = new Set(known.map(({ id }) => id));
  const fresh = own.filter(({ id }) => !kept.has(id));
  const rows = fresh.map(({ id, doneAt, ...data }) => ({
    id,
    data,
    sheetId: sheet.id,
    doneAt: new Date(doneAt),
    receivedAt: tx.now,
    actorId: person.id,
    actorName: person.name,
  }));
  await TestTrial.bulkCreate(rows, { transaction });
  return fresh;
}

async function keepStrikes(tx: Tx, { sheet, sent, person }: Keep): Promise<Sent["strikes"]> {
  const { transaction } = tx;
  const ids = sent.strikes.map(({ trialId }) => trialId);
  const trials = await TestTrial.findAll({ where: { id: ids, sheetId: sheet.id }, transaction });
  const standing = new Set(trials.map(({ id }) => id));
  const missing = sent.strikes.findIndex(({ trialId }) => !standing.has(trialId));
  if (missing >= 0)
    throw new ServiceError("invalid", "What is to be struck out does not stand on this sheet.", {
      pointer: `/strikes/${missing}/trialId`,
    });
  const struck = await TestStrike.findAll({ where: { trialId: ids }, transaction });
  const known = new Set(struck.map(({ trialId }) => trialId));
  const fresh = [...new Map(sent.strikes.map((strike) => [strike.trialId, strike])).values()].filter(
    ({ trialId }) => !known.has(trialId),
  );
  const by = { sheetId: sheet.id, at: tx.now, actorId: person.id, actorName: person.name };
  await TestStrike.bulkCreate(
    fresh.map((strike) => ({ ...strike, ...by })),
    { transaction },
  );
  return fresh;
}
