import "server-only";
import type { CreationOptional, InferAttributes, InferCreationAttributes, NonAttribute } from "sequelize";
import { DataTypes, Model } from "sequelize";
import type { ChangeClass, ChangeState } from "@/lib/domain/change-states";
import type {
  ChangeKind,
  CommentAnchor,
  Decision,
  Effectivity,
  MachineEvaluation,
} from "@/lib/domain/changes";
import { define } from "./define";

export class ChangeRequest extends Model<
  InferAttributes<ChangeRequest>,
  InferCreationAttributes<ChangeRequest>
> {
  declare id: CreationOptional<string>;
  declare number: CreationOptional<number>;
  declare kind: ChangeKind;
  declare title: string;
  declare reason: string;
  declare class: ChangeClass;
  declare state: ChangeState;
  declare modelId: string;
  declare machineId: CreationOptional<string | null>;
  declare effectivity: Effectivity;
  declare deviationUntil: CreationOptional<string | null>;
  declare currentVersion: CreationOptional<number>;
  declare lockVersion: CreationOptional<number>;
  declare authorId: CreationOptional<string | null>;
  declare authorName: string;
  declare lastEditorId: CreationOptional<string | null>;
  declare createdAt: CreationOptional<Date>;
  declare updatedAt: CreationOptional<Date>;
  declare submittedAt: CreationOptional<Date | null>;
  declare decidedAt: CreationOptional<Date | null>;
}

define(
  ChangeRequest,
  { name: "ChangeRequest", table: "change_requests", timestamps: true },
  {
    id: { type: DataTypes.UUID, primaryKey: true, defaultValue: DataTypes.UUIDV4, allowNull: false },
    number: { type: DataTypes.INTEGER, autoIncrement: true, allowNull: false },
    kind: { type: DataTypes.TEXT, allowNull: false },
    title: { type: DataTypes.TEXT, allowNull: false },
    reason: { type: DataTypes.TEXT, allowNull: false },
    class: { type: DataTypes.TEXT, allowNull: false },
    state: { type: DataTypes.TEXT, allowNull: false },
    modelId: { type: DataTypes.UUID, allowNull: false },
    machineId: { type: DataTypes.UUID },
    effectivity: { type: DataTypes.JSONB, allowNull: false },
    deviationUntil: { type: DataTypes.DATEONLY },
    currentVersion: { type: DataTypes.INTEGER, defaultValue: 0, allowNull: false },
    lockVersion: { type: DataTypes.INTEGER, defaultValue: 1, allowNull: false },
    authorId: { type: DataTypes.UUID },
    authorName: { type: DataTypes.TEXT, allowNull: false },
    lastEditorId: { type: DataTypes.UUID },
    createdAt: { type: DataTypes.DATE, allowNull: false },
    updatedAt: { type: DataTypes.DATE, allowNull: false },
    submittedAt: { type: DataTypes.DATE },
    decidedAt: { type: DataTypes.DATE },
  },
);

export class Baseline extends Model<InferAttributes<Baseline>, InferCreationAttributes<Baseline>> {
  declare id: CreationOptional<string>;
  declare modelId: string;
  declare number: number;
  declare revisionId: string;
  declare changeId: CreationOptional<string | null>;
  declare approvedAt: Date;
  declare approvedByName: string;
  declare voidedAt: CreationOptional<Date | null>;
  declare voidReason: CreationOptional<string | null>;
}

define(
  Baseline,
  { name: "Baseline", table: "baselines" },
  {
    id: { type: DataTypes.UUID, primaryKey: true, defaultValue: DataTypes.UUIDV4, allowNull: false },
    modelId: { type: DataTypes.UUID, allowNull: false },
    number: { type: DataTypes.INTEGER, allowNull: false },
    revisionId: { type: DataTypes.UUID, allowNull: false },
    changeId: { type: DataTypes.UUID },
    approvedAt: { type: DataTypes.DATE, allowNull: false },
    approvedByName: { type: DataTypes.TEXT, allowNull: false },
    voidedAt: { type: DataTypes.DATE },
    voidReason: { type: DataTypes.TEXT },
  },
);

export class MachineBaseline extends Model<
  InferAttributes<MachineBaseline>,
  InferCreationAttributes<MachineBaseline>
> {
  declare baseline?: NonAttribute<Baseline>;
  declare id: CreationOptional<string>;
  declare machineId: string;
  declare baselineId: string;
  declare changeId: CreationOptional<string | null>;
  declare fromAt: Date;
  declare untilAt: CreationOptional<Date | null>;
}

define(
  MachineBaseline,
  { name: "MachineBaseline", table: "machine_baselines" },
  {
    id: { type: DataTypes.UUID, primaryKey: true, defaultValue: DataTypes.UUIDV4, allowNull: false },
    machineId: { type: DataTypes.UUID, allowNull: false },
    baselineId: { type: DataTypes.UUID, allowNull: false },
    changeId: { type: DataTypes.UUID },
    fromAt: { type: DataTypes.DATE, allowNull: false },
    untilAt: { type: DataTypes.DATE },
  },
);

export class ProposalVersion extends Model<
  InferAttributes<ProposalVersion>,
  InferCreationAttributes<ProposalVersion>
> {
  declare id: CreationOptional<string>;
  declare changeId: string;
  declare version: number;
  declare revisionId: string;
  declare baseRevisionId: CreationOptional<string | null>;
  declare baseBaselineId: CreationOptional<string | null>;
  declare baseHash: string;
  declare baseEvaluationId: CreationOptional<string | null>;
  declare evaluationId: string;
  declare machinesEvaluated: CreationOptional<MachineEvaluation[]>;
  declare title: string;
  declare reason: string;
  declare class: ChangeClass;
  declare effectivity: Effectivity;
  declare deviationUntil: CreationOptional<string | null>;
  declare editorId: CreationOptional<string | null>;
  declare editorName: string;
  declare note: CreationOptional<string>;
  declare signedContentHash: string;
  declare createdAt: CreationOptional<Date>;
}

define(
  ProposalVersion,
  { name: "ProposalVersion", table: "proposal_versions" },
  {
    id: { type: DataTypes.UUID, primaryKey: true, defaultValue: DataTypes.UUIDV4, allowNull: false },
    changeId: { type: DataTypes.UUID, allowNull: false },
    version: { type: DataTypes.INTEGER, allowNull: false },
    revisionId: { type: DataTypes.UUID, allowNull: false },
    baseRevisionId: { type: DataTypes.UUID },
    baseBaselineId: { type: DataTypes.UUID },
    baseHash: { type: DataTypes.CHAR(64), allowNull: false },
    baseEvaluationId: { type: DataTypes.UUID },
    evaluationId: { type: DataTypes.UUID, allowNull: false },
    machinesEvaluated: { type: DataTypes.JSONB, defaultValue: [], allowNull: false },
    title: { type: DataTypes.TEXT, allowNull: false },
    reason: { type: DataTypes.TEXT, allowNull: false },
    class: { type: DataTypes.TEXT, allowNull: false },
    effectivity: { type: DataTypes.JSONB, allowNull: false },
    deviationUntil: { type: DataTypes.DATEONLY },
    editorId: { type: DataTypes.UUID },
    editorName: { type: DataTypes.TEXT, allowNull: false },
    note: { type: DataTypes.TEXT, defaultValue: "", allowNull: false },
    signedContentHash: { type: DataTypes.CHAR(64), allowNull: false },
    createdAt: { type: DataTypes.DATE, defaultValue: DataTypes.NOW, allowNull: false },
  },
);

export class Comment extends Model<InferAttributes<Comment>, InferCreationAttributes<Comment>> {
  declare id: CreationOptional<string>;
  declare changeId: string;
  declare proposalVersion: number;
  declare anchor: CommentAnchor;
  declare body: string;
  declare authorId: CreationOptional<string | null>;
  declare authorName: string;
  declare createdAt: CreationOptional<Date>;
}

define(
  Comment,
  { name: "Comment", table: "comments" },
  {
    id: { type: DataTypes.UUID, primaryKey: true, defaultValue: DataTypes.UUIDV4, allowNull: false },
    changeId: { type: DataTypes.UUID, allowNull: false },
    proposalVersion: { type: DataTypes.INTEGER, allowNull: false },
    anchor: { type: DataTypes.JSONB, allowNull: false },
    body: { type: DataTypes.TEXT, allowNull: false },
    authorId: { type: DataTypes.UUID },
    authorName: { type: DataTypes.TEXT, allowNull: false },
    createdAt: { type: DataTypes.DATE, defaultValue: DataTypes.NOW, allowNull: false },
  },
);

export class Disposition extends Model<InferAttributes<Disposition>, InferCreationAttributes<Disposition>> {
  declare id: CreationOptional<string>;
  declare changeId: string;
  declare proposalVersion: number;
  declare decision: Decision;
  declare meaning: string;
  declare signedHash: string;
  declare reason: CreationOptional<string>;
  declare justifications: CreationOptional<Record<string, string>>;
  declare actorId: string;
  declare actorName: string;
  declare at: Date;
  declare voidAt: CreationOptional<Date | null>;
  declare voidReason: CreationOptional<string | null>;
}

define(
  Disposition,
  { name: "Disposition", table: "dispositions" },
  {
    id: { type: DataTypes.UUID, primaryKey: true, defaultValue: DataTypes.UUIDV4, allowNull: false },
    changeId: { type: DataTypes.UUID, allowNull: false },
    proposalVersion: { type: DataTypes.INTEGER, allowNull: false },
    decision: { type: DataTypes.TEXT, allowNull: false },
    meaning: { type: DataTypes.TEXT, allowNull: false },
    signedHash: { type: DataTypes.CHAR(64), allowNull: false },
    reason: { type: DataTypes.TEXT, defaultValue: "", allowNull: false },
    justifications: { type: DataTypes.JSONB, defaultValue: {}, allowNull: false },
    actorId: { type: DataTypes.UUID, allowNull: false },
    actorName: { type: DataTypes.TEXT, allowNull: false },
    at: { type: DataTypes.DATE, allowNull: false },
    voidAt: { type: DataTypes.DATE },
    voidReason: { type: DataTypes.TEXT },
  },
);
