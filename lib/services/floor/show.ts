import "server-only";
import { STANDINGS, type FloorCell, type FloorColumn, type FloorRow } from "@/lib/domain/floor";
import { MAX_AS_OF_ROWS, MAX_FLOOR_ROWS, type Floor, type FloorQuery } from "@/lib/schemas/floor";
import type { Context } from "@/lib/services/kernel/context";
import { authorize } from "@/lib/services/kernel/context";
import { momentOf } from "@/lib/services/machines/as-of";
import { machineCondition } from "@/lib/services/machines/condition";
import { fleetRows, type FleetRow } from "@/lib/services/machines/fleet-rows";
import { keptStatus } from "@/lib/services/machines/list";
import { statusOf } from "@/lib/services/machines/refresh-status";
import { standingOf, type KeptStatus } from "@/lib/services/machines/standing";
import { floorColumns } from "./columns";
import { floorChoices, floorCounts } from "./counts";

export interface FloorView extends Omit<Floor, "columns" | "rows"> {
  readonly columns: readonly FloorColumn[];
  readonly rows: readonly FloorRow[];
}

/** Machines by parameters, by consequence: what is off its required configuration, now or at a moment in the past. */
export async function showFloor(context: Context, query: FloorQuery): Promise<FloorView> {
  authorize(context, "floor.read");
  const asOf = momentOf(context, query.asOf);
  const past = query.asOf !== undefined;
  const pageSize = query.pageSize ?? (past ? MAX_AS_OF_ROWS : MAX_FLOOR_ROWS);
  const { page } = query;
  const found = await fleetRows({ ...query, page, pageSize, order: past ? "serial" : "consequence" });
  const rows = past ? await rowsAt(found.rows, asOf) : found.rows.map((row) => toRow(row, keptCells(row)));
  const columns = await floorColumns({
    modelIds: [...new Set(rows.map(({ modelId }) => modelId))],
    asOf,
    cellKeys: rows.flatMap(({ modelId, cells }) => Object.keys(cells).map((key) => ({ modelId, key }))),
  });
  return {
    asOf: asOf.toISOString(),
    columns,
    rows,
    counts: past ? countRows(rows) : await floorCounts(query, asOf),
    page,
    pageSize,
    total: found.total,
    ...(await floorChoices()),
  };
}

interface Kept {
  readonly status: KeptStatus | null;
  readonly cells: Readonly<Record<string, FloorCell>>;
}

/** Cells are written by `refreshStatus` alone. */
function keptCells(row: FleetRow): Kept {
  return { status: keptStatus(row), cells: (row.cells ?? {}) as Record<string, FloorCell> };
}

function toRow(row: FleetRow, { status, cells }: Kept): FloorRow {
  const { standing, sentence } = standingOf(row.state, status);
  return {
    machineId: row.id,
    serial: row.serial,
    modelId: row.modelId,
    modelName: row.modelName,
    siteName: row.siteName,
    standing,
    sentence,
    cells,
  };
}

/** The same machines as they stood at a moment, worked out from what had been read and released by then. */
async function rowsAt(machines: readonly FleetRow[], asOf: Date): Promise<FloorRow[]> {
  const rows: FloorRow[] = [];
  for (const machine of machines) {
    const { cells, ...status } = statusOf(await machineCondition(machine.id, asOf));
    rows.push(toRow(machine, { status, cells }));
  }
  return rows.sort(
    (a, b) =>
      STANDINGS.indexOf(a.standing) - STANDINGS.indexOf(b.standing) || a.serial.localeCompare(b.serial),
  );
}

/** For a moment in the past the numbers are those of the machines worked out. */
function countRows(rows: readonly FloorRow[]): Floor["counts"] {
  const inService = rows.filter(({ standing }) => standing !== "out_of_service");
  const has = (kind: FloorCell["kind"]) => (row: FloorRow) =>
    Object.values(row.cells).some((cell) => cell.kind === kind);
  const off = inService.filter(has("drift"));
  const onBaseline = inService.filter(({ standing }) => standing === "on_baseline");
  return {
    inService: inService.length,
    offBaseline: off.length,
    notRead: inService.length - off.length - onBaseline.length,
    outOfService: rows.length - inService.length,
    over: rows.filter(({ standing }) => standing === "over").length,
    onDeviation: inService.filter(has("deviation")).length,
    nextDeviationEnd: null,
  };
}
