import "server-only";
import type { CreationOptional, InferAttributes, InferCreationAttributes } from "sequelize";
import { DataTypes, Model } from "sequelize";
import type { DeviationEdit, MeasuredTemperature } from "@/lib/domain/changes";
import { define } from "./define";

export class Lot extends Model<InferAttributes<Lot>, InferCreationAttributes<Lot>> {
  declare id: CreationOptional<string>;
  declare changeId: string;
  declare number: number;
  declare releasedByName: string;
  declare releasedAt: Date;
}

define(
  Lot,
  { name: "Lot", table: "lots" },
  {
    id: { type: DataTypes.UUID, primaryKey: true, defaultValue: DataTypes.UUIDV4, allowNull: false },
    changeId: { type: DataTypes.UUID, allowNull: false },
    number: { type: DataTypes.INTEGER, allowNull: false },
    releasedByName: { type: DataTypes.TEXT, allowNull: false },
    releasedAt: { type: DataTypes.DATE, allowNull: false },
  },
);

export class LotMachine extends Model<InferAttributes<LotMachine>, InferCreationAttributes<LotMachine>> {
  declare id: CreationOptional<string>;
  declare lotId: string;
  declare changeId: string;
  declare machineId: string;
  declare releasedAt: Date;
  declare downloadedAt: CreationOptional<Date | null>;
  declare appliedAt: CreationOptional<Date | null>;
  declare appliedReadingId: CreationOptional<string | null>;
  declare verifiedAt: CreationOptional<Date | null>;
  declare endedAt: CreationOptional<Date | null>;
}

define(
  LotMachine,
  { name: "LotMachine", table: "lot_machines" },
  {
    id: { type: DataTypes.UUID, primaryKey: true, defaultValue: DataTypes.UUIDV4, allowNull: false },
    lotId: { type: DataTypes.UUID, allowNull: false },
    changeId: { type: DataTypes.UUID, allowNull: false },
    machineId: { type: DataTypes.UUID, allowNull: false },
    releasedAt: { type: DataTypes.DATE, allowNull: false },
    downloadedAt: { type: DataTypes.DATE },
    appliedAt: { type: DataTypes.DATE },
    appliedReadingId: { type: DataTypes.UUID },
    verifiedAt: { type: DataTypes.DATE },
    endedAt: { type: DataTypes.DATE },
  },
);

export class Verification extends Model<
  InferAttributes<Verification>,
  InferCreationAttributes<Verification>
> {
  declare id: CreationOptional<string>;
  declare changeId: string;
  declare machineId: string;
  declare lotMachineId: string;
  declare tested: string;
  declare result: "pass" | "fail";
  declare ambientC: CreationOptional<number | null>;
  declare temperatures: CreationOptional<MeasuredTemperature[]>;
  declare statement: CreationOptional<string | null>;
  declare note: CreationOptional<string>;
  declare actorId: string;
  declare actorName: string;
  declare at: Date;
}

define(
  Verification,
  { name: "Verification", table: "verifications" },
  {
    id: { type: DataTypes.UUID, primaryKey: true, defaultValue: DataTypes.UUIDV4, allowNull: false },
    changeId: { type: DataTypes.UUID, allowNull: false },
    machineId: { type: DataTypes.UUID, allowNull: false },
    lotMachineId: { type: DataTypes.UUID, allowNull: false },
    tested: { type: DataTypes.TEXT, allowNull: false },
    result: { type: DataTypes.TEXT, allowNull: false },
    ambientC: { type: DataTypes.DOUBLE },
    temperatures: { type: DataTypes.JSONB, defaultValue: [], allowNull: false },
    statement: { type: DataTypes.TEXT },
    note: { type: DataTypes.TEXT, defaultValue: "", allowNull: false },
    actorId: { type: DataTypes.UUID, allowNull: false },
    actorName: { type: DataTypes.TEXT, allowNull: false },
    at: { type: DataTypes.DATE, allowNull: false },
  },
);

export class Attachment extends Model<InferAttributes<Attachment>, InferCreationAttributes<Attachment>> {
  declare id: CreationOptional<string>;
  declare verificationId: string;
  declare name: string;
  declare mediaType: string;
  declare size: number;
  declare sha256: string;
  declare createdAt: CreationOptional<Date>;
}

define(
  Attachment,
  { name: "Attachment", table: "attachments" },
  {
    id: { type: DataTypes.UUID, primaryKey: true, defaultValue: DataTypes.UUIDV4, allowNull: false },
    verificationId: { type: DataTypes.UUID, allowNull: false },
    name: { type: DataTypes.TEXT, allowNull: false },
    mediaType: { type: DataTypes.TEXT, allowNull: false },
    size: { type: DataTypes.INTEGER, allowNull: false },
    sha256: { type: DataTypes.CHAR(64), allowNull: false },
    createdAt: { type: DataTypes.DATE, defaultValue: DataTypes.NOW, allowNull: false },
  },
);

export class Deviation extends Model<InferAttributes<Deviation>, InferCreationAttributes<Deviation>> {
  declare id: CreationOptional<string>;
  declare machineId: string;
  declare changeId: CreationOptional<string | null>;
  declare revisionId: string;
  declare baseBaselineId: string;
  declare edits: DeviationEdit[];
  declare reason: string;
  declare approvedByName: string;
  declare fromAt: Date;
  declare untilOn: string;
  declare endedAt: CreationOptional<Date | null>;
  declare endReason: CreationOptional<string | null>;
}

define(
  Deviation,
  { name: "Deviation", table: "deviations" },
  {
    id: { type: DataTypes.UUID, primaryKey: true, defaultValue: DataTypes.UUIDV4, allowNull: false },
    machineId: { type: DataTypes.UUID, allowNull: false },
    changeId: { type: DataTypes.UUID },
    revisionId: { type: DataTypes.UUID, allowNull: false },
    baseBaselineId: { type: DataTypes.UUID, allowNull: false },
    edits: { type: DataTypes.JSONB, allowNull: false },
    reason: { type: DataTypes.TEXT, allowNull: false },
    approvedByName: { type: DataTypes.TEXT, allowNull: false },
    fromAt: { type: DataTypes.DATE, allowNull: false },
    untilOn: { type: DataTypes.DATEONLY, allowNull: false },
    endedAt: { type: DataTypes.DATE },
    endReason: { type: DataTypes.TEXT },
  },
);
