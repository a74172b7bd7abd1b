import "server-only";
import { closeSheetSchema, type CloseSheet, type SheetView } from "@/lib/schemas/test-sheets";
import { TestClosing } from "@/models/test-sheets";
import type { Context } from "@/lib/services/kernel/context";
import { authorize, requirePerson } from "@/lib/services/kernel/context";
import { ServiceError } from "@/lib/services/kernel/errors";
import { withTransaction } from "@/lib/services/kernel/transaction";
import { appendRecord } from "@/lib/services/record/append";
import { lockSheet } from "./find";
import { sheetObject, sheetView } from "./present";

/** Closes a sheet: the result of its standing entries is kept as it is worded now. */
export async function closeSheet(
  context: Context,
  input: CloseSheet & { readonly id: string },
): Promise<SheetView> {
  const { outcome, note } = closeSheetSchema.parse(input);
  const person = requirePerson(context);
  return withTransaction(context, async (tx) => {
    authorize(tx, "test_sheets.write");
    const { sheet, machine } = await lockSheet(tx, input.id);
    const before = await sheetView(sheet, tx.transaction);
    if (before.closing)
      throw new ServiceError(
        "conflict",
        `${before.closing.actorName} has closed this sheet already. Its result stands; start another sheet to test on.`,
      );
    const result = before.result.sentences;
    await TestClosing.create(
      { sheetId: sheet.id, outcome, note, result, at: tx.now, actorId: person.id, actorName: person.name },
      { transaction: tx.transaction },
    );
    await appendRecord(tx, {
      action: outcome === "finished" ? "test_sheet.finished" : "test_sheet.broken_off",
      object: sheetObject(sheet, machine),
      machineId: sheet.machineId,
      changeId: sheet.changeId,
      after: { result, entries: before.entries },
      reason: note || null,
    });
    return sheetView(sheet, tx.transaction);
  });
}
