import { z } from "zod";
import { idParams } from "@/lib/schemas/common";
import { operation } from "@/lib/schemas/operation";
import {
  closeSheetSchema,
  createSheetSchema,
  entriesSchema,
  movedTestsSchema,
  sheetPageSchema,
  sheetQuery,
  sheetViewSchema,
} from "@/lib/schemas/test-sheets";

const tag = "Test sheets";

export const testSheetOperations = {
  list: operation({
    id: "listTestSheets",
    method: "GET",
    path: "/test-sheets",
    action: "test_sheets.read",
    tag,
    summary: "Test sheets, newest first",
    query: sheetQuery,
    answer: sheetPageSchema,
  }),
  create: operation({
    id: "createTestSheet",
    method: "POST",
    path: "/test-sheets",
    action: "test_sheets.write",
    tag,
    summary: "Start a test sheet; its plan follows from the prediction",
    body: createSheetSchema,
    answer: sheetViewSchema,
    status: 201,
    idempotent: true,
  }),
  show: operation({
    id: "showTestSheet",
    method: "GET",
    path: "/test-sheets/{id}",
    action: "test_sheets.read",
    tag,
    summary: "A test sheet with its plan, entries and result so far",
    params: idParams,
    answer: sheetViewSchema,
  }),
  enter: operation({
    id: "enterOnTestSheet",
    method: "POST",
    path: "/test-sheets/{id}/entries",
    action: "test_sheets.write",
    tag,
    summary: "Keep entries and strike out wrong ones; what was sent before is stored once",
    params: idParams,
    body: entriesSchema,
    answer: sheetViewSchema,
  }),
  close: operation({
    id: "closeTestSheet",
    method: "POST",
    path: "/test-sheets/{id}/close",
    action: "test_sheets.write",
    tag,
    summary: "Close a test sheet; its result stands from then on",
    params: idParams,
    body: closeSheetSchema,
    answer: sheetViewSchema,
  }),
  moved: operation({
    id: "listTestsOfChange",
    method: "GET",
    path: "/changes/{id}/machines/{machineId}/tests",
    action: "changes.read",
    tag,
    summary: "The tests whose prediction a change moves on a machine, with the expected readings",
    params: idParams.extend({ machineId: z.uuid() }),
    answer: movedTestsSchema,
  }),
};
