import "server-only";
import type { CreationOptional, InferAttributes, InferCreationAttributes } from "sequelize";
import { DataTypes, Model } from "sequelize";
import type { Policy } from "@/lib/domain/policy";
import type { RehearsalQuestion, RehearsalState, RehearsedMachine } from "@/lib/domain/rehearsals";
import { define } from "./define";

export class Rehearsal extends Model<InferAttributes<Rehearsal>, InferCreationAttributes<Rehearsal>> {
  declare id: CreationOptional<string>;
  declare question: RehearsalQuestion;
  declare siteId: CreationOptional<string | null>;
  declare modelId: CreationOptional<string | null>;
  declare title: string;
  declare state: CreationOptional<RehearsalState>;
  declare rulesVersion: string;
  declare policyVersion: number;
  declare policy: Policy;
  declare startedBy: CreationOptional<string | null>;
  declare startedByName: string;
  declare startedAt: Date;
  declare endedAt: CreationOptional<Date | null>;
}

define(
  Rehearsal,
  { name: "Rehearsal", table: "rehearsals" },
  {
    id: { type: DataTypes.UUID, primaryKey: true, defaultValue: DataTypes.UUIDV4, allowNull: false },
    question: { type: DataTypes.JSONB, allowNull: false },
    siteId: { type: DataTypes.UUID },
    modelId: { type: DataTypes.UUID },
    title: { type: DataTypes.TEXT, allowNull: false },
    state: { type: DataTypes.TEXT, defaultValue: "waiting", allowNull: false },
    rulesVersion: { type: DataTypes.TEXT, allowNull: false },
    policyVersion: { type: DataTypes.INTEGER, allowNull: false },
    policy: { type: DataTypes.JSONB, allowNull: false },
    startedBy: { type: DataTypes.UUID },
    startedByName: { type: DataTypes.TEXT, allowNull: false },
    startedAt: { type: DataTypes.DATE, allowNull: false },
    endedAt: { type: DataTypes.DATE },
  },
);

export class RehearsalMachine extends Model<
  InferAttributes<RehearsalMachine>,
  InferCreationAttributes<RehearsalMachine>
> {
  declare rehearsalId: string;
  declare machineId: string;
  /** Null until the job has come to this machine. */
  declare outcome: CreationOptional<RehearsedMachine | null>;
  declare newlyOver: CreationOptional<boolean>;
  declare hottestRoomC: CreationOptional<number | null>;
  declare rehearsedAt: CreationOptional<Date | null>;
}

define(
  RehearsalMachine,
  { name: "RehearsalMachine", table: "rehearsal_machines" },
  {
    rehearsalId: { type: DataTypes.UUID, primaryKey: true, allowNull: false },
    machineId: { type: DataTypes.UUID, primaryKey: true, allowNull: false },
    outcome: { type: DataTypes.JSONB },
    newlyOver: { type: DataTypes.BOOLEAN, defaultValue: false, allowNull: false },
    hottestRoomC: { type: DataTypes.DOUBLE },
    rehearsedAt: { type: DataTypes.DATE },
  },
);
