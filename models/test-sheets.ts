import "server-only";
import type { CreationOptional, InferAttributes, InferCreationAttributes } from "sequelize";
import { DataTypes, Model } from "sequelize";
import type { Test, TestPlan, Trial } from "@/lib/domain/test-sheets";
import { define } from "./define";

// Sequelize writes the column's name into each of these, so no two columns share one.
const id = () => ({ type: DataTypes.UUID, primaryKey: true, allowNull: false });
const object = () => ({ type: DataTypes.UUID, allowNull: false });
const text = () => ({ type: DataTypes.TEXT, allowNull: false });
const date = () => ({ type: DataTypes.DATE, allowNull: false });
const data = () => ({ type: DataTypes.JSONB, allowNull: false });

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
    id: { ...id(), defaultValue: DataTypes.UUIDV4 },
    number: { type: DataTypes.INTEGER, autoIncrement: true, allowNull: false },
    machineId: object(),
    axis: text(),
    test: text(),
    changeId: { type: DataTypes.UUID },
    plan: data(),
    actorId: object(),
    actorName: text(),
    createdAt: date(),
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
    id: id(),
    sheetId: object(),
    data: data(),
    doneAt: date(),
    receivedAt: date(),
    actorId: object(),
    actorName: text(),
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
  { trialId: id(), sheetId: object(), reason: text(), at: date(), actorId: object(), actorName: text() },
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
  {
    sheetId: id(),
    outcome: text(),
    result: data(),
    note: text(),
    at: date(),
    actorId: object(),
    actorName: text(),
  },
);
