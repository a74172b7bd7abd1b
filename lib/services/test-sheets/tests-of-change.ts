import "server-only";
import { TEST_WORDS } from "@/lib/domain/test-sheets";
import { effects } from "@/lib/review/effects";
import { movedTests } from "@/lib/review/moved-tests";
import { parameterChanges } from "@/lib/review/parameter-changes";
import { planTest } from "@/lib/review/test-plan";
import type { MovedTests } from "@/lib/schemas/test-sheets";
import { TestSheet } from "@/models/test-sheets";
import type { Context } from "@/lib/services/kernel/context";
import { authorize } from "@/lib/services/kernel/context";
import { testBasis } from "./basis";
import { sheetRows } from "./present";

/** Only what moved: the tests that a change asks for on one machine, with the readings to expect. */
export async function testsOfChange(
  context: Context,
  { changeId, machineId }: { readonly changeId: string; readonly machineId: string },
): Promise<MovedTests> {
  authorize(context, "changes.read");
  const { report, before, ...basis } = await testBasis({ machineId, changeId, asOf: context.now });
  if (!before) return { items: [] };
  const changes = parameterChanges(before, report);
  const moved = movedTests(effects({ before, after: report, changes }), changes);
  const rows = await TestSheet.findAll({ where: { machineId, changeId }, order: [["number", "ASC"]] });
  const sheets = await sheetRows(rows);
  return {
    items: moved.map(({ axis, test, because }) => {
      const planned = planTest({ ...basis, axis, test });
      return {
        axis,
        test,
        title: TEST_WORDS[test].title,
        because: [...because],
        expected: planned?.ok ? planned.plan.expected : [],
        why: planned?.ok === false ? planned.why : null,
        sheets: sheets.filter((sheet) => sheet.test === test && sheet.axis === axis),
      };
    }),
  };
}
