import "server-only";
import type { CreationOptional, InferAttributes, InferCreationAttributes } from "sequelize";
import { DataTypes, Model } from "sequelize";
import type { Test, TestPlan, Trial } from "@/lib/domain/test-sheets";
import { define } from "./define";

const ID = { type: DataTypes.UUID, primaryKey: true, allowNull: false } as const;
const OBJECT = { type: DataTypes.UUID, allowNull: false } as const;
const TEXT = { type: DataTypes.TEXT, allowNull: false } as const;
const DATE = { type: DataTypes.DATE, allowNull: false } as const;
const JSON_DATA = { type: DataTypes.JSONB, allowNull: false } as const;

export class TestSheet extends Model<InferAttributes<TestSheet>, InferCreationAttributes<TestSheet>> {
  declare id: CreationOptional<string>;
  declare number: CreationOptional<number>;
  declare machineId: string;
  declare axis: string;
  declare test: Test;
  declare changeId: string | null;
  declare plan: TestPlan;
  declare actorId: string;
  declare actorName: string;
  declare createdAt: Date;
}

define(
  TestSheet,
  { name: "TestSheet", table: "test_sheets" },
  {
    id: { ...ID, defaultValue: DataTypes.UUIDV4 },
    number: { type: DataTypes.INTEGER, autoIncrement: true, allowNull: false },
    machineId: OBJECT,
    axis: TEXT,
    test: TEXT,
    changeId: { type: DataTypes.UUID },
    plan: JSON_DATA,
    actorId: OBJECT,
    actorName: TEXT,
    createdAt: DATE,
  },
);

/** The id is made on the device of whoever entered it, so that the same entry is stored once however often it comes. */
export class TestTrial extends Model<InferAttributes<TestTrial>, InferCreationAttributes<TestTrial>> {
  declare id: string;
  declare sheetId: string;
  declare data: Omit<Trial, "id" | "doneAt">;
  declare doneAt: Date;
  declare receivedAt: Date;
  declare actorId: string;
  declare actorName: string;
}

define(
  TestTrial,
  { name: "TestTrial", table: "test_trials" },
  {
    id: ID,
    sheetId: OBJECT,
    data: JSON_DATA,
    doneAt: DATE,
    receivedAt: DATE,
    actorId: OBJECT,
    actorName: TEXT,
  },
);

export class TestStrike extends Model<InferAttributes<TestStrike>, InferCreationAttributes<TestStrike>> {
  declare trialId: string;
  declare sheetId: string;
  declare reason: string;
  declare at: Date;
  declare actorId: string;
  declare actorName: string;
}

define(
  TestStrike,
  { name: "TestStrike", table: "test_strikes" },
  { trialId: ID, sheetId: OBJECT, reason: TEXT, at: DATE, actorId: OBJECT, actorName: TEXT },
);

export class TestClosing extends Model<InferAttributes<TestClosing>, InferCreationAttributes<TestClosing>> {
  declare sheetId: string;
  declare outcome: "finished" | "broken_off";
  /** The result's sentences, as they stood when the sheet was closed. */
  declare result: string[];
  declare note: string;
  declare at: Date;
  declare actorId: string;
  declare actorName: string;
}

define(
  TestClosing,
  { name: "TestClosing", table: "test_closings" },
  { sheetId: ID, outcome: TEXT, result: JSON_DATA, note: TEXT, at: DATE, actorId: OBJECT, actorName: TEXT },
);
