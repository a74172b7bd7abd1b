import "server-only";
import type { z } from "zod";
import { sheetLabel, TEST_WORDS, type TestPlan } from "@/lib/domain/test-sheets";
import { planTest } from "@/lib/review/test-plan";
import { createSheetSchema, type CreateSheet, type SheetView } from "@/lib/schemas/test-sheets";
import { TestSheet } from "@/models/test-sheets";
import type { Context, Tx } from "@/lib/services/kernel/context";
import { authorize, requirePerson } from "@/lib/services/kernel/context";
import { ServiceError } from "@/lib/services/kernel/errors";
import { once } from "@/lib/services/kernel/idempotency";
import { withTransaction } from "@/lib/services/kernel/transaction";
import { appendRecord } from "@/lib/services/record/append";
import { testBasis, type TestBasis } from "./basis";
import { sheetObject, sheetView } from "./present";

type Request = z.output<typeof createSheetSchema>;

/** Starts a test sheet with the plan that follows from the prediction at this moment. */
export async function createSheet(
  context: Context,
  input: CreateSheet & { readonly idempotencyKey: string | null },
): Promise<SheetView> {
  const request = createSheetSchema.parse(input);
  const person = requirePerson(context);
  return withTransaction(context, async (tx) => {
    authorize(tx, "test_sheets.write");
    const { answer } = await once(tx, { key: input.idempotencyKey, request }, async () => {
      const basis = await basisOf(tx, request);
      const { axis, plan } = demandPlan(basis, request);
      const { machineId, test, changeId = null } = request;
      const sheet = await TestSheet.create(
        {
          machineId,
          axis,
          test,
          changeId,
          plan,
          actorId: person.id,
          actorName: person.name,
          createdAt: tx.now,
        },
        { transaction: tx.transaction },
      );
      await appendRecord(tx, {
        action: "test_sheet.started",
        object: sheetObject(sheet, basis.machine),
        machineId,
        changeId,
        after: { sheet: sheetLabel(sheet.number), axis, test: TEST_WORDS[test].title, plan },
      });
      return sheetView(sheet, tx.transaction);
    });
    return answer;
  });
}

async function basisOf(tx: Tx, { machineId, changeId }: Request): Promise<TestBasis> {
  const { transaction, now } = tx;
  const basis = await testBasis({ machineId, changeId: changeId ?? null, asOf: now, transaction });
  if (basis.machine.state === "retired")
    throw new ServiceError(
      "conflict",
      `The machine ${basis.machine.serial} is retired. Nothing was started; put it into service first if it runs again.`,
    );
  return basis;
}

function demandPlan(basis: TestBasis, request: Request): { axis: string; plan: TestPlan } {
  const { axis, test, start, step, reliability, confidence, repeatability } = request;
  const planned = planTest(
    { ...basis, axis, test },
    {
      start: start ?? null,
      step: step ?? null,
      reliability,
      confidence,
      repeatability: repeatability ?? null,
    },
  );
  if (!planned)
    throw new ServiceError(
      "invalid",
      `The machine ${basis.machine.serial} has no axis “${axis}”. Nothing was started.`,
      { pointer: "/axis" },
    );
  if (!planned.ok)
    throw new ServiceError(
      "invalid",
      `No boundary can be predicted, so start and step have to be given. ${planned.why}`,
      { pointer: start ? "/step" : "/start" },
    );
  const own = basis.assembly.axes.find((one) => one.axis.toLowerCase() === axis.toLowerCase());
  return { axis: own?.axis ?? axis, plan: planned.plan };
}
