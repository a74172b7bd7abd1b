import "server-only";
import type { Transaction } from "sequelize";
import { changeLabel } from "@/lib/domain/changes";
import { sheetLabel, testPlanSchema, TEST_WORDS, type Trial } from "@/lib/domain/test-sheets";
import { sheetResult } from "@/lib/review/sheet-result";
import type { SheetRow, SheetView, StoredTrial } from "@/lib/schemas/test-sheets";
import { Site } from "@/models/catalog";
import { ChangeRequest } from "@/models/changes";
import { Machine } from "@/models/machines";
import { TestClosing, TestStrike, TestTrial, type TestSheet } from "@/models/test-sheets";

/** What the record calls a sheet. */
export function sheetObject({ id, number, axis }: TestSheet, { serial }: Machine) {
  return { type: "test_sheet", id, label: `${sheetLabel(number)}, ${serial}, ${axis.toUpperCase()} axis` };
}

/** Sheets as lists show them; five queries however many. */
export async function sheetRows(
  sheets: readonly TestSheet[],
  transaction?: Transaction,
): Promise<SheetRow[]> {
  const within = { transaction: transaction ?? null };
  const sheetId = sheets.map(({ id }) => id);
  const machines = await Machine.findAll({
    where: { id: [...new Set(sheets.map(({ machineId }) => machineId))] },
    include: [{ model: Site, as: "site", required: true }],
    ...within,
  });
  const changes = await ChangeRequest.findAll({
    where: { id: [...new Set(sheets.flatMap(({ changeId }) => changeId ?? []))] },
    ...within,
  });
  const closings = await TestClosing.findAll({ where: { sheetId }, ...within });
  const trials = await TestTrial.findAll({ where: { sheetId }, attributes: ["id", "sheetId"], ...within });
  const strikes = await TestStrike.findAll({ where: { sheetId }, attributes: ["trialId"], ...within });
  const struck = new Set(strikes.map(({ trialId }) => trialId));
  return sheets.map((sheet) =>
    rowOf(sheet, {
      machine: machines.find(({ id }) => id === sheet.machineId),
      change: changes.find(({ id }) => id === sheet.changeId),
      closing: closings.find((one) => one.sheetId === sheet.id),
      entries: trials.filter((one) => one.sheetId === sheet.id && !struck.has(one.id)).length,
    }),
  );
}

interface Facts {
  readonly machine: Machine | undefined;
  readonly change: ChangeRequest | undefined;
  readonly closing: TestClosing | undefined;
  readonly entries: number;
}

function rowOf(sheet: TestSheet, { machine, change, closing, entries }: Facts): SheetRow {
  return {
    id: sheet.id,
    label: sheetLabel(sheet.number),
    test: sheet.test,
    title: TEST_WORDS[sheet.test].title,
    machine: { id: sheet.machineId, serial: machine?.serial ?? "" },
    siteName: machine?.site?.name ?? "",
    axis: sheet.axis,
    change: change ? { id: change.id, label: changeLabel(change.number) } : null,
    createdAt: sheet.createdAt.toISOString(),
    actorName: sheet.actorName,
    state: closing?.outcome ?? "open",
    entries,
  };
}

/** A sheet with everything on it, its result as it stands or as it was closed. */
export async function sheetView(sheet: TestSheet, transaction?: Transaction): Promise<SheetView> {
  const [row] = await sheetRows([sheet], transaction);
  if (!row) throw new Error("A sheet has a row.");
  const where = { sheetId: sheet.id };
  const within = { transaction: transaction ?? null };
  const order: [string, string][] = [
    ["doneAt", "ASC"],
    ["id", "ASC"],
  ];
  const rows = await TestTrial.findAll({ where, order, ...within });
  const strikes = await TestStrike.findAll({ where, ...within });
  const closing = await TestClosing.findOne({ where, ...within });
  const plan = testPlanSchema.parse(sheet.plan);
  const trials = rows.map((trial) => presentTrial(trial, strikes, closing));
  return { ...row, plan, trials, result: resultOf(plan, trials, closing), closing: presentClosing(closing) };
}

function resultOf(
  plan: SheetView["plan"],
  trials: readonly StoredTrial[],
  closing: TestClosing | null,
): SheetView["result"] {
  const { ladder, sentences } = sheetResult(plan, standing(trials));
  const parameter = plan.ladder?.parameter;
  const unit = plan.ladder?.unit ?? "";
  const recommended = ladder?.recommended ?? null;
  return {
    sentences: closing ? [...closing.result] : [...sentences],
    next: ladder && !closing ? { ...ladder.next, unit } : null,
    recommended: recommended === null || !parameter ? null : { parameter, value: recommended, unit },
  };
}

/** Entries that count: neither struck out nor after the closing. */
function standing(trials: readonly StoredTrial[]): Trial[] {
  return trials.filter(({ struck, late }) => struck === null && !late);
}

function presentTrial(
  { id, data, doneAt, receivedAt, actorName }: TestTrial,
  strikes: readonly TestStrike[],
  closing: TestClosing | null,
): StoredTrial {
  const strike = strikes.find(({ trialId }) => trialId === id);
  return {
    id,
    ...data,
    doneAt: doneAt.toISOString(),
    receivedAt: receivedAt.toISOString(),
    actorName,
    struck: strike
      ? { reason: strike.reason, actorName: strike.actorName, at: strike.at.toISOString() }
      : null,
    late: closing !== null && receivedAt.getTime() > closing.at.getTime(),
  };
}

function presentClosing(closing: TestClosing | null): SheetView["closing"] {
  if (!closing) return null;
  const { outcome, note, actorName, at } = closing;
  return { outcome, note, actorName, at: at.toISOString() };
}
