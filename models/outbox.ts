import "server-only";
import type { CreationOptional, InferAttributes, InferCreationAttributes } from "sequelize";
import { DataTypes, Model } from "sequelize";
import { define } from "./define";

export class OutboxMail extends Model<InferAttributes<OutboxMail>, InferCreationAttributes<OutboxMail>> {
  declare id: CreationOptional<string>;
  declare deduplicationKey: string;
  declare changeId: CreationOptional<string | null>;
  declare recipient: string;
  declare subject: string;
  declare bodyText: string;
  declare bodyHtml: string;
  declare messageId: string;
  declare state: CreationOptional<"waiting" | "sending" | "sent" | "given_up">;
  declare unconfirmed: CreationOptional<number>;
  declare attempts: CreationOptional<number>;
  declare nextTryAt: CreationOptional<Date>;
  declare lastError: CreationOptional<string | null>;
  declare createdAt: CreationOptional<Date>;
  declare sentAt: CreationOptional<Date | null>;
}

define(
  OutboxMail,
  { name: "OutboxMail", table: "outbox" },
  {
    id: { type: DataTypes.UUID, primaryKey: true, defaultValue: DataTypes.UUIDV4, allowNull: false },
    deduplicationKey: { type: DataTypes.TEXT, allowNull: false },
    changeId: { type: DataTypes.UUID },
    recipient: { type: DataTypes.TEXT, allowNull: false },
    subject: { type: DataTypes.TEXT, allowNull: false },
    bodyText: { type: DataTypes.TEXT, allowNull: false },
    bodyHtml: { type: DataTypes.TEXT, allowNull: false },
    messageId: { type: DataTypes.TEXT, allowNull: false },
    state: { type: DataTypes.TEXT, defaultValue: "waiting", allowNull: false },
    unconfirmed: { type: DataTypes.INTEGER, defaultValue: 0, allowNull: false },
    attempts: { type: DataTypes.INTEGER, defaultValue: 0, allowNull: false },
    nextTryAt: { type: DataTypes.DATE, defaultValue: DataTypes.NOW, allowNull: false },
    lastError: { type: DataTypes.TEXT },
    createdAt: { type: DataTypes.DATE, defaultValue: DataTypes.NOW, allowNull: false },
    sentAt: { type: DataTypes.DATE },
  },
);
