import "server-only";
import type { CreationOptional, InferAttributes, InferCreationAttributes, NonAttribute } from "sequelize";
import { DataTypes, Model } from "sequelize";
import type { Load } from "@/lib/domain/assembly";
import type { CatalogKind } from "@/lib/domain/catalog";
import type { KeyRule } from "@/lib/domain/key-table";
import type { Policy } from "@/lib/domain/policy";
import { define } from "./define";

export class Site extends Model<InferAttributes<Site>, InferCreationAttributes<Site>> {
  declare id: CreationOptional<string>;
  declare code: string;
  declare name: string;
  declare ambientC: CreationOptional<number | null>;
  declare version: CreationOptional<number>;
  declare retiredAt: CreationOptional<Date | null>;
  declare createdAt: CreationOptional<Date>;
  declare updatedAt: CreationOptional<Date>;
}

define(
  Site,
  { name: "Site", table: "sites", timestamps: true },
  {
    id: { type: DataTypes.UUID, primaryKey: true, defaultValue: DataTypes.UUIDV4, allowNull: false },
    code: { type: DataTypes.TEXT, allowNull: false },
    name: { type: DataTypes.TEXT, allowNull: false },
    ambientC: { type: DataTypes.DOUBLE },
    version: { type: DataTypes.INTEGER, defaultValue: 1, allowNull: false },
    retiredAt: { type: DataTypes.DATE },
    createdAt: { type: DataTypes.DATE, allowNull: false },
    updatedAt: { type: DataTypes.DATE, allowNull: false },
  },
);

export class CatalogItem extends Model<InferAttributes<CatalogItem>, InferCreationAttributes<CatalogItem>> {
  declare id: CreationOptional<string>;
  declare kind: CatalogKind;
  declare code: string;
  declare name: string;
  declare version: CreationOptional<number>;
  declare retiredAt: CreationOptional<Date | null>;
  declare createdAt: CreationOptional<Date>;
  declare updatedAt: CreationOptional<Date>;
}

define(
  CatalogItem,
  { name: "CatalogItem", table: "catalog_items", timestamps: true },
  {
    id: { type: DataTypes.UUID, primaryKey: true, defaultValue: DataTypes.UUIDV4, allowNull: false },
    kind: { type: DataTypes.TEXT, allowNull: false },
    code: { type: DataTypes.TEXT, allowNull: false },
    name: { type: DataTypes.TEXT, allowNull: false },
    version: { type: DataTypes.INTEGER, defaultValue: 1, allowNull: false },
    retiredAt: { type: DataTypes.DATE },
    createdAt: { type: DataTypes.DATE, allowNull: false },
    updatedAt: { type: DataTypes.DATE, allowNull: false },
  },
);

export class CatalogVersion extends Model<
  InferAttributes<CatalogVersion>,
  InferCreationAttributes<CatalogVersion>
> {
  declare itemId: string;
  declare version: number;
  declare name: string;
  declare data: Record<string, unknown>;
  declare evidence: CreationOptional<string>;
  declare createdBy: CreationOptional<string | null>;
  declare createdByName: string;
  declare createdAt: CreationOptional<Date>;
}

define(
  CatalogVersion,
  { name: "CatalogVersion", table: "catalog_versions" },
  {
    itemId: { type: DataTypes.UUID, primaryKey: true, allowNull: false },
    version: { type: DataTypes.INTEGER, primaryKey: true, allowNull: false },
    name: { type: DataTypes.TEXT, allowNull: false },
    data: { type: DataTypes.JSONB, allowNull: false },
    evidence: { type: DataTypes.TEXT, defaultValue: "", allowNull: false },
    createdBy: { type: DataTypes.UUID },
    createdByName: { type: DataTypes.TEXT, allowNull: false },
    createdAt: { type: DataTypes.DATE, defaultValue: DataTypes.NOW, allowNull: false },
  },
);

export class MachineModel extends Model<
  InferAttributes<MachineModel>,
  InferCreationAttributes<MachineModel>
> {
  declare id: CreationOptional<string>;
  declare code: string;
  declare name: string;
  declare version: CreationOptional<number>;
  declare retiredAt: CreationOptional<Date | null>;
  declare createdAt: CreationOptional<Date>;
  declare updatedAt: CreationOptional<Date>;
}

define(
  MachineModel,
  { name: "MachineModel", table: "machine_models", timestamps: true },
  {
    id: { type: DataTypes.UUID, primaryKey: true, defaultValue: DataTypes.UUIDV4, allowNull: false },
    code: { type: DataTypes.TEXT, allowNull: false },
    name: { type: DataTypes.TEXT, allowNull: false },
    version: { type: DataTypes.INTEGER, defaultValue: 1, allowNull: false },
    retiredAt: { type: DataTypes.DATE },
    createdAt: { type: DataTypes.DATE, allowNull: false },
    updatedAt: { type: DataTypes.DATE, allowNull: false },
  },
);

export class MachineModelVersion extends Model<
  InferAttributes<MachineModelVersion>,
  InferCreationAttributes<MachineModelVersion>
> {
  declare axes?: NonAttribute<Axis[]>;
  declare id: CreationOptional<string>;
  declare modelId: string;
  declare version: number;
  declare supplyId: CreationOptional<string | null>;
  declare controllerBoardId: CreationOptional<string | null>;
  declare enclosureRiseK: CreationOptional<number | null>;
  declare hasReadBack: CreationOptional<boolean>;
  declare createdBy: CreationOptional<string | null>;
  declare createdByName: string;
  declare createdAt: CreationOptional<Date>;
}

define(
  MachineModelVersion,
  { name: "MachineModelVersion", table: "machine_model_versions" },
  {
    id: { type: DataTypes.UUID, primaryKey: true, defaultValue: DataTypes.UUIDV4, allowNull: false },
    modelId: { type: DataTypes.UUID, allowNull: false },
    version: { type: DataTypes.INTEGER, allowNull: false },
    supplyId: { type: DataTypes.UUID },
    controllerBoardId: { type: DataTypes.UUID },
    enclosureRiseK: { type: DataTypes.DOUBLE },
    hasReadBack: { type: DataTypes.BOOLEAN, defaultValue: true, allowNull: false },
    createdBy: { type: DataTypes.UUID },
    createdByName: { type: DataTypes.TEXT, allowNull: false },
    createdAt: { type: DataTypes.DATE, defaultValue: DataTypes.NOW, allowNull: false },
  },
);

export class Axis extends Model<InferAttributes<Axis>, InferCreationAttributes<Axis>> {
  declare modelVersionId: string;
  declare position: number;
  declare axis: string;
  declare motorCount: CreationOptional<number>;
  declare motorId: CreationOptional<string | null>;
  declare driverId: CreationOptional<string | null>;
  declare driveTrainId: CreationOptional<string | null>;
  declare mountId: CreationOptional<string | null>;
  declare load: CreationOptional<Load>;
  declare travelMm: CreationOptional<number | null>;
  declare travelDeg: CreationOptional<number | null>;
  declare coupledWith: CreationOptional<string[]>;
}

define(
  Axis,
  { name: "Axis", table: "axes" },
  {
    modelVersionId: { type: DataTypes.UUID, primaryKey: true, allowNull: false },
    position: { type: DataTypes.INTEGER, primaryKey: true, allowNull: false },
    axis: { type: DataTypes.TEXT, allowNull: false },
    motorCount: { type: DataTypes.INTEGER, defaultValue: 1, allowNull: false },
    motorId: { type: DataTypes.UUID },
    driverId: { type: DataTypes.UUID },
    driveTrainId: { type: DataTypes.UUID },
    mountId: { type: DataTypes.UUID },
    load: { type: DataTypes.JSONB, defaultValue: {}, allowNull: false },
    travelMm: { type: DataTypes.DOUBLE },
    travelDeg: { type: DataTypes.DOUBLE },
    coupledWith: { type: DataTypes.ARRAY(DataTypes.TEXT), defaultValue: [], allowNull: false },
  },
);

export class KeyTableVersion extends Model<
  InferAttributes<KeyTableVersion>,
  InferCreationAttributes<KeyTableVersion>
> {
  declare id: CreationOptional<string>;
  declare modelId: string;
  declare version: number;
  declare rules: KeyRule[];
  declare note: CreationOptional<string>;
  declare createdBy: CreationOptional<string | null>;
  declare createdByName: string;
  declare createdAt: CreationOptional<Date>;
}

define(
  KeyTableVersion,
  { name: "KeyTableVersion", table: "key_tables" },
  {
    id: { type: DataTypes.UUID, primaryKey: true, defaultValue: DataTypes.UUIDV4, allowNull: false },
    modelId: { type: DataTypes.UUID, allowNull: false },
    version: { type: DataTypes.INTEGER, allowNull: false },
    rules: { type: DataTypes.JSONB, allowNull: false },
    note: { type: DataTypes.TEXT, defaultValue: "", allowNull: false },
    createdBy: { type: DataTypes.UUID },
    createdByName: { type: DataTypes.TEXT, allowNull: false },
    createdAt: { type: DataTypes.DATE, defaultValue: DataTypes.NOW, allowNull: false },
  },
);

export class PolicyVersion extends Model<
  InferAttributes<PolicyVersion>,
  InferCreationAttributes<PolicyVersion>
> {
  declare version: number;
  declare data: Policy;
  declare note: CreationOptional<string>;
  declare createdBy: CreationOptional<string | null>;
  declare createdByName: string;
  declare createdAt: CreationOptional<Date>;
}

define(
  PolicyVersion,
  { name: "PolicyVersion", table: "policies" },
  {
    version: { type: DataTypes.INTEGER, primaryKey: true, allowNull: false },
    data: { type: DataTypes.JSONB, allowNull: false },
    note: { type: DataTypes.TEXT, defaultValue: "", allowNull: false },
    createdBy: { type: DataTypes.UUID },
    createdByName: { type: DataTypes.TEXT, allowNull: false },
    createdAt: { type: DataTypes.DATE, defaultValue: DataTypes.NOW, allowNull: false },
  },
);
