import "server-only";
import type { CreationOptional, InferAttributes, InferCreationAttributes, NonAttribute } from "sequelize";
import { DataTypes, Model } from "sequelize";
import type { Assembly } from "@/lib/domain/assembly";
import type { Level } from "@/lib/domain/levels";
import type { ParameterName } from "@/lib/domain/parameters";
import type { Layer, ReadingKind } from "@/lib/domain/readings";
import type { RevisionKind } from "@/lib/domain/revisions";
import type { Actor } from "@/lib/domain/roles";
import type { Basis } from "@/lib/domain/values";
import { define } from "./define";

export class FileContent extends Model<InferAttributes<FileContent>, InferCreationAttributes<FileContent>> {
  declare sha256: string;
  declare size: number;
  declare bytes: Buffer;
  declare createdAt: CreationOptional<Date>;
}

define(
  FileContent,
  { name: "FileContent", table: "file_contents" },
  {
    sha256: { type: DataTypes.CHAR(64), primaryKey: true, allowNull: false },
    size: { type: DataTypes.INTEGER, allowNull: false },
    bytes: { type: DataTypes.BLOB, allowNull: false },
    createdAt: { type: DataTypes.DATE, defaultValue: DataTypes.NOW, allowNull: false },
  },
);

export class Revision extends Model<InferAttributes<Revision>, InferCreationAttributes<Revision>> {
  declare files?: NonAttribute<RevisionFile[]>;
  declare id: CreationOptional<string>;
  declare kind: RevisionKind;
  declare modelId: string;
  declare machineId: CreationOptional<string | null>;
  declare contentHash: string;
  declare createdByName: string;
  declare createdAt: CreationOptional<Date>;
}

define(
  Revision,
  { name: "Revision", table: "revisions" },
  {
    id: { type: DataTypes.UUID, primaryKey: true, defaultValue: DataTypes.UUIDV4, allowNull: false },
    kind: { type: DataTypes.TEXT, allowNull: false },
    modelId: { type: DataTypes.UUID, allowNull: false },
    machineId: { type: DataTypes.UUID },
    contentHash: { type: DataTypes.CHAR(64), allowNull: false },
    createdByName: { type: DataTypes.TEXT, allowNull: false },
    createdAt: { type: DataTypes.DATE, defaultValue: DataTypes.NOW, allowNull: false },
  },
);

export class RevisionFile extends Model<
  InferAttributes<RevisionFile>,
  InferCreationAttributes<RevisionFile>
> {
  declare content?: NonAttribute<FileContent>;
  declare revisionId: string;
  declare position: number;
  declare path: string;
  declare sha256: string;
  declare format: string;
  declare encoding: "utf-8" | "latin-1";
  declare bom: CreationOptional<boolean>;
}

define(
  RevisionFile,
  { name: "RevisionFile", table: "revision_files" },
  {
    revisionId: { type: DataTypes.UUID, primaryKey: true, allowNull: false },
    position: { type: DataTypes.INTEGER, primaryKey: true, allowNull: false },
    path: { type: DataTypes.TEXT, allowNull: false },
    sha256: { type: DataTypes.CHAR(64), allowNull: false },
    format: { type: DataTypes.TEXT, allowNull: false },
    encoding: { type: DataTypes.TEXT, allowNull: false },
    bom: { type: DataTypes.BOOLEAN, defaultValue: false, allowNull: false },
  },
);

export class RevisionParameter extends Model<
  InferAttributes<RevisionParameter>,
  InferCreationAttributes<RevisionParameter>
> {
  declare id: CreationOptional<string>;
  declare revisionId: string;
  declare machineId: CreationOptional<string | null>;
  declare axis: CreationOptional<string | null>;
  declare parameter: ParameterName;
  declare value: number;
  declare unit: string;
  declare basis: CreationOptional<Basis | null>;
  declare path: string;
  declare line: number;
  declare raw: string;
}

define(
  RevisionParameter,
  { name: "RevisionParameter", table: "revision_parameters" },
  {
    id: { type: DataTypes.BIGINT, primaryKey: true, autoIncrement: true, allowNull: false },
    revisionId: { type: DataTypes.UUID, allowNull: false },
    machineId: { type: DataTypes.UUID },
    axis: { type: DataTypes.TEXT },
    parameter: { type: DataTypes.TEXT, allowNull: false },
    value: { type: DataTypes.DOUBLE, allowNull: false },
    unit: { type: DataTypes.TEXT, allowNull: false },
    basis: { type: DataTypes.TEXT },
    path: { type: DataTypes.TEXT, allowNull: false },
    line: { type: DataTypes.INTEGER, allowNull: false },
    raw: { type: DataTypes.TEXT, allowNull: false },
  },
);

export class Reading extends Model<InferAttributes<Reading>, InferCreationAttributes<Reading>> {
  declare revision?: NonAttribute<Revision>;
  declare id: CreationOptional<string>;
  declare machineId: string;
  declare revisionId: string;
  declare kind: ReadingKind;
  declare layer: Layer;
  declare readAt: Date;
  declare receivedAt: CreationOptional<Date>;
  declare firmwareVersion: CreationOptional<string | null>;
  declare serial: CreationOptional<string | null>;
  declare note: CreationOptional<string>;
  declare actorKind: Actor["kind"];
  declare actorId: CreationOptional<string | null>;
  declare actorName: string;
}

define(
  Reading,
  { name: "Reading", table: "readings" },
  {
    id: { type: DataTypes.UUID, primaryKey: true, defaultValue: DataTypes.UUIDV4, allowNull: false },
    machineId: { type: DataTypes.UUID, allowNull: false },
    revisionId: { type: DataTypes.UUID, allowNull: false },
    kind: { type: DataTypes.TEXT, allowNull: false },
    layer: { type: DataTypes.TEXT, allowNull: false },
    readAt: { type: DataTypes.DATE, allowNull: false },
    receivedAt: { type: DataTypes.DATE, defaultValue: DataTypes.NOW, allowNull: false },
    firmwareVersion: { type: DataTypes.TEXT },
    serial: { type: DataTypes.TEXT },
    note: { type: DataTypes.TEXT, defaultValue: "", allowNull: false },
    actorKind: { type: DataTypes.TEXT, allowNull: false },
    actorId: { type: DataTypes.UUID },
    actorName: { type: DataTypes.TEXT, allowNull: false },
  },
);

export class Evaluation extends Model<InferAttributes<Evaluation>, InferCreationAttributes<Evaluation>> {
  declare id: CreationOptional<string>;
  declare revisionId: string;
  declare machineId: CreationOptional<string | null>;
  declare rulesVersion: string;
  declare policyVersion: number;
  declare keyTableId: CreationOptional<string | null>;
  declare assembly: Assembly;
  declare assemblyHash: string;
  declare report: unknown;
  declare level: Level;
  declare createdAt: CreationOptional<Date>;
}

define(
  Evaluation,
  { name: "Evaluation", table: "evaluations" },
  {
    id: { type: DataTypes.UUID, primaryKey: true, defaultValue: DataTypes.UUIDV4, allowNull: false },
    revisionId: { type: DataTypes.UUID, allowNull: false },
    machineId: { type: DataTypes.UUID },
    rulesVersion: { type: DataTypes.TEXT, allowNull: false },
    policyVersion: { type: DataTypes.INTEGER, allowNull: false },
    keyTableId: { type: DataTypes.UUID },
    assembly: { type: DataTypes.JSONB, allowNull: false },
    assemblyHash: { type: DataTypes.CHAR(64), allowNull: false },
    report: { type: DataTypes.JSONB, allowNull: false },
    level: { type: DataTypes.TEXT, allowNull: false },
    createdAt: { type: DataTypes.DATE, defaultValue: DataTypes.NOW, allowNull: false },
  },
);

export class FindingRow extends Model<InferAttributes<FindingRow>, InferCreationAttributes<FindingRow>> {
  declare id: CreationOptional<string>;
  declare evaluationId: string;
  declare ruleId: string;
  declare level: Level;
  declare axis: CreationOptional<string | null>;
  declare value: CreationOptional<number | null>;
  declare limitValue: CreationOptional<number | null>;
  declare unit: string;
  declare sentence: string;
}

define(
  FindingRow,
  { name: "FindingRow", table: "findings" },
  {
    id: { type: DataTypes.UUID, primaryKey: true, defaultValue: DataTypes.UUIDV4, allowNull: false },
    evaluationId: { type: DataTypes.UUID, allowNull: false },
    ruleId: { type: DataTypes.TEXT, allowNull: false },
    level: { type: DataTypes.TEXT, allowNull: false },
    axis: { type: DataTypes.TEXT },
    value: { type: DataTypes.DOUBLE },
    limitValue: { type: DataTypes.DOUBLE },
    unit: { type: DataTypes.TEXT, allowNull: false },
    sentence: { type: DataTypes.TEXT, allowNull: false },
  },
);
