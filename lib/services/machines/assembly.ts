import "server-only";
import { Op } from "sequelize";
import type { Transaction } from "sequelize";
import type { Assembly } from "@/lib/domain/assembly";
import type { HardwareFact, ModelHardware } from "@/lib/domain/catalog";
import type { CatalogEntry, ResolvedAssembly, ResolveInput } from "@/lib/review/resolve-assembly";
import type { RefinedOfAxis } from "@/lib/review/refined-assembly";
import { resolveAssembly } from "@/lib/review/resolve-assembly";
import { Axis, CatalogItem, CatalogVersion, MachineModel, MachineModelVersion, Site } from "@/models/catalog";
import { Machine, MachineHardware } from "@/models/machines";
import { ThermalFitRow } from "@/models/thermal-fits";
import { notFound } from "@/lib/services/kernel/errors";

/** The newest version of a model's hardware as the domain has it. */
export async function modelHardware(modelId: string, transaction?: Transaction): Promise<ModelHardware> {
  const version = await MachineModelVersion.findOne({
    where: { modelId },
    order: [
      ["version", "DESC"],
      [{ model: Axis, as: "axes" }, "position", "ASC"],
    ],
    include: [{ model: Axis, as: "axes" }],
    transaction: transaction ?? null,
  });
  if (!version) throw notFound("machine model");
  return hardwareOf(version);
}

export function hardwareOf(version: MachineModelVersion): ModelHardware {
  return {
    supply: version.supplyId,
    controller_board: version.controllerBoardId,
    enclosure_rise_k: version.enclosureRiseK ?? undefined,
    has_read_back: version.hasReadBack,
    axes: (version.axes ?? []).map((axis) => ({
      axis: axis.axis,
      motor_count: axis.motorCount,
      motor: axis.motorId,
      driver: axis.driverId,
      drive_train: axis.driveTrainId,
      mount: axis.mountId,
      load: axis.load,
      travel_mm: axis.travelMm ?? undefined,
      travel_deg: axis.travelDeg ?? undefined,
      coupled_with: axis.coupledWith,
    })),
  };
}

/** The newest data of catalog items. */
async function catalogEntries(
  ids: readonly string[],
  transaction?: Transaction,
): Promise<Map<string, CatalogEntry>> {
  const items = await CatalogItem.findAll({ where: { id: [...ids] }, transaction: transaction ?? null });
  const versions = await CatalogVersion.findAll({
    where: { [Op.or]: items.map(({ id, version }) => ({ itemId: id, version })) },
    transaction: transaction ?? null,
  });
  const data = new Map(versions.map((version) => [version.itemId, version.data]));
  return new Map(items.map(({ id, kind }) => [id, { kind, data: data.get(id) ?? {} }]));
}

function namedItems(model: ModelHardware, facts: readonly HardwareFact[]): string[] {
  const ofAxes = model.axes.flatMap(({ motor, driver, drive_train, mount }) => [
    motor,
    driver,
    drive_train,
    mount,
  ]);
  const ids = [model.supply, model.controller_board, ...ofAxes, ...facts.map(({ itemId }) => itemId)];
  return [...new Set(ids.filter((id): id is string => id !== null))];
}

export interface MachineAssembly extends ResolvedAssembly {
  readonly facts: readonly HardwareFact[];
  readonly hasReadBack: boolean;
}

interface Sought {
  readonly modelId: string;
  readonly ambientC: number | null;
  readonly facts: readonly HardwareFact[];
  readonly refined?: readonly RefinedOfAxis[];
  /** Catalog items to have at hand beside those that are fitted. */
  readonly alsoItems?: readonly string[];
  readonly transaction?: Transaction | undefined;
}

interface Parts {
  readonly input: ResolveInput;
  readonly hasReadBack: boolean;
}

async function partsOf(sought: Sought): Promise<Parts> {
  const { modelId, ambientC, facts, refined = [], alsoItems = [], transaction } = sought;
  const model = await modelHardware(modelId, transaction);
  const items = await catalogEntries([...namedItems(model, facts), ...alsoItems], transaction);
  return {
    input: { model, items, facts, site: { ambient_c: ambientC }, refined },
    hasReadBack: model.has_read_back,
  };
}

export function toFact(row: MachineHardware): HardwareFact {
  return { axis: row.axis, part: row.part, itemId: row.itemId, data: row.data, evidence: row.evidence };
}

function toRefined(row: ThermalFitRow): RefinedOfAxis {
  const { axis, field, catalogKPerW, valueKPerW, lowKPerW, highKPerW, readings } = row;
  return { axis, field, catalog: catalogKPerW, value: valueKPerW, low: lowKPerW, high: highKPerW, readings };
}

export interface MachineParts extends Parts {
  readonly machine: Machine;
}

/** Everything that the hardware of one machine is put together from: its own recorded facts, its model, its site. */
export async function machineParts(
  machineId: string,
  more: Pick<Sought, "alsoItems" | "transaction"> = {},
): Promise<MachineParts> {
  const transaction = more.transaction ?? null;
  const machine = await Machine.findByPk(machineId, { include: [{ model: Site, as: "site" }], transaction });
  if (!machine) throw notFound("machine");
  const rows = await MachineHardware.findAll({
    where: { machineId, endedAt: null },
    order: [["recordedAt", "ASC"]],
    transaction,
  });
  const fits = await ThermalFitRow.findAll({ where: { machineId }, transaction });
  const parts = await partsOf({
    modelId: machine.modelId,
    ambientC: machine.site?.ambientC ?? null,
    facts: rows.map(toFact),
    refined: fits.map(toRefined),
    ...more,
  });
  return { machine, ...parts };
}

/** The hardware that counts for one machine: its own recorded facts over its model's, at its site's ambient. */
export async function machineAssembly(
  machineId: string,
  transaction?: Transaction,
): Promise<MachineAssembly> {
  const { input, hasReadBack } = await machineParts(machineId, { transaction });
  return { ...resolveAssembly(input), facts: input.facts, hasReadBack };
}

/** The hardware of a model as designed, at a given ambient. */
export async function modelAssembly(
  modelId: string,
  ambientC: number | null,
  transaction?: Transaction,
): Promise<Assembly> {
  const model = await MachineModel.findByPk(modelId, { transaction: transaction ?? null });
  if (!model) throw notFound("machine model");
  const { input } = await partsOf({ modelId, ambientC, facts: [], transaction });
  return resolveAssembly(input).assembly;
}
