import "server-only";
import type { CreationOptional, InferAttributes, InferCreationAttributes } from "sequelize";
import { DataTypes, Model } from "sequelize";
import type { Actor } from "@/lib/domain/roles";
import { define } from "./define";

export class RecordEvent extends Model<InferAttributes<RecordEvent>, InferCreationAttributes<RecordEvent>> {
  declare seq: CreationOptional<string>;
  declare at: Date;
  declare actorKind: Actor["kind"];
  declare actorId: CreationOptional<string | null>;
  declare actorName: string;
  declare action: string;
  declare objectType: string;
  declare objectId: string;
  declare objectLabel: string;
  declare machineId: CreationOptional<string | null>;
  declare changeId: CreationOptional<string | null>;
  declare before: unknown;
  declare after: unknown;
  declare reason: CreationOptional<string | null>;
  declare previousHash: string;
  declare hash: string;
}

define(
  RecordEvent,
  { name: "RecordEvent", table: "record_events" },
  {
    seq: { type: DataTypes.BIGINT, primaryKey: true, autoIncrement: true, allowNull: false },
    at: { type: DataTypes.DATE, allowNull: false },
    actorKind: { type: DataTypes.TEXT, allowNull: false },
    actorId: { type: DataTypes.UUID },
    actorName: { type: DataTypes.TEXT, allowNull: false },
    action: { type: DataTypes.TEXT, allowNull: false },
    objectType: { type: DataTypes.TEXT, allowNull: false },
    objectId: { type: DataTypes.TEXT, allowNull: false },
    objectLabel: { type: DataTypes.TEXT, allowNull: false },
    machineId: { type: DataTypes.UUID },
    changeId: { type: DataTypes.UUID },
    before: { type: DataTypes.JSONB },
    after: { type: DataTypes.JSONB },
    reason: { type: DataTypes.TEXT },
    previousHash: { type: DataTypes.CHAR(64), allowNull: false },
    hash: { type: DataTypes.CHAR(64), allowNull: false },
  },
);
