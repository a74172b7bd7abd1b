import "server-only";
import type { SheetView } from "@/lib/schemas/test-sheets";
import { TestSheet } from "@/models/test-sheets";
import type { Context } from "@/lib/services/kernel/context";
import { authorize } from "@/lib/services/kernel/context";
import { notFound } from "@/lib/services/kernel/errors";
import { sheetView } from "./present";

export async function showSheet(context: Context, id: string): Promise<SheetView> {
  authorize(context, "test_sheets.read");
  const sheet = await TestSheet.findByPk(id);
  if (!sheet) throw notFound("test sheet");
  return sheetView(sheet);
}
