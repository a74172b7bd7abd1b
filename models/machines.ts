import "server-only";
import type { CreationOptional, InferAttributes, InferCreationAttributes, NonAttribute } from "sequelize";
import { DataTypes, Model } from "sequelize";
import type { DifferingPart, HardwareFact } from "@/lib/domain/catalog";
import type { Level } from "@/lib/domain/levels";
import type { MachineState } from "@/lib/domain/machines";
import type { ParameterName } from "@/lib/domain/parameters";
import type { Layer } from "@/lib/domain/readings";
import type { MachineModel, Site } from "./catalog";
import { define } from "./define";

export class Machine extends Model<InferAttributes<Machine>, InferCreationAttributes<Machine>> {
  declare id: CreationOptional<string>;
  declare model?: NonAttribute<MachineModel>;
  declare site?: NonAttribute<Site>;
  declare status?: NonAttribute<MachineStatus>;
  declare hardware?: NonAttribute<MachineHardware[]>;
  declare serial: string;
  declare modelId: string;
  declare siteId: string;
  declare state: CreationOptional<MachineState>;
  declare stateReason: CreationOptional<string>;
  declare note: CreationOptional<string>;
  declare version: CreationOptional<number>;
  declare createdAt: CreationOptional<Date>;
  declare updatedAt: CreationOptional<Date>;
}

define(
  Machine,
  { name: "Machine", table: "machines", timestamps: true },
  {
    id: { type: DataTypes.UUID, primaryKey: true, defaultValue: DataTypes.UUIDV4, allowNull: false },
    serial: { type: DataTypes.TEXT, allowNull: false },
    modelId: { type: DataTypes.UUID, allowNull: false },
    siteId: { type: DataTypes.UUID, allowNull: false },
    state: { type: DataTypes.TEXT, defaultValue: "in_service", allowNull: false },
    stateReason: { type: DataTypes.TEXT, defaultValue: "", allowNull: false },
    note: { type: DataTypes.TEXT, defaultValue: "", allowNull: false },
    version: { type: DataTypes.INTEGER, defaultValue: 1, allowNull: false },
    createdAt: { type: DataTypes.DATE, allowNull: false },
    updatedAt: { type: DataTypes.DATE, allowNull: false },
  },
);

export class MachineHardware extends Model<
  InferAttributes<MachineHardware>,
  InferCreationAttributes<MachineHardware>
> {
  declare id: CreationOptional<string>;
  declare machineId: string;
  declare axis: CreationOptional<string | null>;
  declare part: DifferingPart;
  declare itemId: CreationOptional<string | null>;
  declare data: CreationOptional<HardwareFact["data"]>;
  declare evidence: string;
  declare recordedBy: CreationOptional<string | null>;
  declare recordedByName: string;
  declare recordedAt: CreationOptional<Date>;
  declare endedAt: CreationOptional<Date | null>;
}

define(
  MachineHardware,
  { name: "MachineHardware", table: "machine_hardware" },
  {
    id: { type: DataTypes.UUID, primaryKey: true, defaultValue: DataTypes.UUIDV4, allowNull: false },
    machineId: { type: DataTypes.UUID, allowNull: false },
    axis: { type: DataTypes.TEXT },
    part: { type: DataTypes.TEXT, allowNull: false },
    itemId: { type: DataTypes.UUID },
    data: { type: DataTypes.JSONB, defaultValue: {}, allowNull: false },
    evidence: { type: DataTypes.TEXT, allowNull: false },
    recordedBy: { type: DataTypes.UUID },
    recordedByName: { type: DataTypes.TEXT, allowNull: false },
    recordedAt: { type: DataTypes.DATE, defaultValue: DataTypes.NOW, allowNull: false },
    endedAt: { type: DataTypes.DATE },
  },
);

export class MachineStatus extends Model<
  InferAttributes<MachineStatus>,
  InferCreationAttributes<MachineStatus>
> {
  declare machineId: string;
  declare level: CreationOptional<Level | null>;
  declare read: boolean;
  declare stale: CreationOptional<boolean>;
  declare sentence: string;
  declare cells: CreationOptional<Record<string, unknown>>;
  declare lastReadAt: CreationOptional<Date | null>;
  declare computedAt: Date;
}

define(
  MachineStatus,
  { name: "MachineStatus", table: "machine_status" },
  {
    machineId: { type: DataTypes.UUID, primaryKey: true, allowNull: false },
    level: { type: DataTypes.TEXT },
    read: { type: DataTypes.BOOLEAN, allowNull: false },
    stale: { type: DataTypes.BOOLEAN, defaultValue: false, allowNull: false },
    sentence: { type: DataTypes.TEXT, allowNull: false },
    cells: { type: DataTypes.JSONB, defaultValue: {}, allowNull: false },
    lastReadAt: { type: DataTypes.DATE },
    computedAt: { type: DataTypes.DATE, allowNull: false },
  },
);

export class DriftItemRow extends Model<
  InferAttributes<DriftItemRow>,
  InferCreationAttributes<DriftItemRow>
> {
  declare id: CreationOptional<string>;
  declare machineId: string;
  declare position: number;
  declare axis: CreationOptional<string | null>;
  declare parameter: ParameterName;
  declare kind: "differs" | "not_read" | "stale";
  declare requiredValue: CreationOptional<number | null>;
  declare actualValue: CreationOptional<number | null>;
  declare unit: string;
  declare layer: CreationOptional<Layer | null>;
  declare share: CreationOptional<number | null>;
  declare level: Level;
  declare sentence: string;
}

define(
  DriftItemRow,
  { name: "DriftItemRow", table: "drift_items" },
  {
    id: { type: DataTypes.UUID, primaryKey: true, defaultValue: DataTypes.UUIDV4, allowNull: false },
    machineId: { type: DataTypes.UUID, allowNull: false },
    position: { type: DataTypes.INTEGER, allowNull: false },
    axis: { type: DataTypes.TEXT },
    parameter: { type: DataTypes.TEXT, allowNull: false },
    kind: { type: DataTypes.TEXT, allowNull: false },
    requiredValue: { type: DataTypes.DOUBLE },
    actualValue: { type: DataTypes.DOUBLE },
    unit: { type: DataTypes.TEXT, allowNull: false },
    layer: { type: DataTypes.TEXT },
    share: { type: DataTypes.DOUBLE },
    level: { type: DataTypes.TEXT, allowNull: false },
    sentence: { type: DataTypes.TEXT, allowNull: false },
  },
);
