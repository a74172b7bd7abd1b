import "server-only";
import type { CreationOptional, InferAttributes, InferCreationAttributes } from "sequelize";
import { DataTypes, Model } from "sequelize";
import type { Role, Scope } from "@/lib/domain/roles";
import { define } from "./define";

export class User extends Model<InferAttributes<User>, InferCreationAttributes<User>> {
  declare id: CreationOptional<string>;
  declare email: string;
  declare name: string;
  declare role: Role;
  declare passwordHash: string;
  declare active: CreationOptional<boolean>;
  /** Where a technician works; null: at every site. */
  declare siteId: CreationOptional<string | null>;
  declare createdAt: CreationOptional<Date>;
  declare updatedAt: CreationOptional<Date>;
}

define(
  User,
  { name: "User", table: "users", timestamps: true },
  {
    id: { type: DataTypes.UUID, primaryKey: true, defaultValue: DataTypes.UUIDV4, allowNull: false },
    email: { type: DataTypes.TEXT, allowNull: false },
    name: { type: DataTypes.TEXT, allowNull: false },
    role: { type: DataTypes.TEXT, allowNull: false },
    passwordHash: { type: DataTypes.TEXT, allowNull: false },
    active: { type: DataTypes.BOOLEAN, defaultValue: true, allowNull: false },
    siteId: { type: DataTypes.UUID },
    createdAt: { type: DataTypes.DATE, allowNull: false },
    updatedAt: { type: DataTypes.DATE, allowNull: false },
  },
);

export class Session extends Model<InferAttributes<Session>, InferCreationAttributes<Session>> {
  declare id: CreationOptional<string>;
  declare userId: string;
  declare createdAt: CreationOptional<Date>;
  declare expiresAt: Date;
  declare endedAt: CreationOptional<Date | null>;
  declare endReason: CreationOptional<string | null>;
}

define(
  Session,
  { name: "Session", table: "sessions" },
  {
    id: { type: DataTypes.UUID, primaryKey: true, defaultValue: DataTypes.UUIDV4, allowNull: false },
    userId: { type: DataTypes.UUID, allowNull: false },
    createdAt: { type: DataTypes.DATE, defaultValue: DataTypes.NOW, allowNull: false },
    expiresAt: { type: DataTypes.DATE, allowNull: false },
    endedAt: { type: DataTypes.DATE },
    endReason: { type: DataTypes.TEXT },
  },
);

export class SignInFailure extends Model<
  InferAttributes<SignInFailure>,
  InferCreationAttributes<SignInFailure>
> {
  declare id: CreationOptional<string>;
  declare email: string;
  declare at: CreationOptional<Date>;
}

define(
  SignInFailure,
  { name: "SignInFailure", table: "sign_in_failures" },
  {
    id: { type: DataTypes.BIGINT, primaryKey: true, autoIncrement: true, allowNull: false },
    email: { type: DataTypes.TEXT, allowNull: false },
    at: { type: DataTypes.DATE, defaultValue: DataTypes.NOW, allowNull: false },
  },
);

export class Token extends Model<InferAttributes<Token>, InferCreationAttributes<Token>> {
  declare id: CreationOptional<string>;
  declare name: string;
  declare role: Role;
  declare scopes: Scope[];
  declare tokenHash: string;
  declare hint: string;
  declare ownerId: string;
  declare createdAt: CreationOptional<Date>;
  declare expiresAt: Date;
  declare revokedAt: CreationOptional<Date | null>;
  declare lastUsedAt: CreationOptional<Date | null>;
}

define(
  Token,
  { name: "Token", table: "tokens" },
  {
    id: { type: DataTypes.UUID, primaryKey: true, defaultValue: DataTypes.UUIDV4, allowNull: false },
    name: { type: DataTypes.TEXT, allowNull: false },
    role: { type: DataTypes.TEXT, allowNull: false },
    scopes: { type: DataTypes.ARRAY(DataTypes.TEXT), allowNull: false },
    tokenHash: { type: DataTypes.CHAR(64), allowNull: false },
    hint: { type: DataTypes.TEXT, allowNull: false },
    ownerId: { type: DataTypes.UUID, allowNull: false },
    createdAt: { type: DataTypes.DATE, defaultValue: DataTypes.NOW, allowNull: false },
    expiresAt: { type: DataTypes.DATE, allowNull: false },
    revokedAt: { type: DataTypes.DATE },
    lastUsedAt: { type: DataTypes.DATE },
  },
);

export class IdempotencyKey extends Model<
  InferAttributes<IdempotencyKey>,
  InferCreationAttributes<IdempotencyKey>
> {
  declare actorId: string;
  declare key: string;
  declare requestHash: string;
  declare status: number;
  declare answer: unknown;
  declare createdAt: CreationOptional<Date>;
}

define(
  IdempotencyKey,
  { name: "IdempotencyKey", table: "idempotency_keys" },
  {
    actorId: { type: DataTypes.UUID, primaryKey: true, allowNull: false },
    key: { type: DataTypes.TEXT, primaryKey: true, allowNull: false },
    requestHash: { type: DataTypes.CHAR(64), allowNull: false },
    status: { type: DataTypes.INTEGER, allowNull: false },
    answer: { type: DataTypes.JSONB, allowNull: false },
    createdAt: { type: DataTypes.DATE, defaultValue: DataTypes.NOW, allowNull: false },
  },
);
