import {
  DataTypes,
  Model,
  type CreationOptional,
  type InferAttributes,
  type InferCreationAttributes,
  type NonAttribute,
} from "sequelize";
import { sequelize } from "./sequelize";
import type { User } from "./user";

/** Who did what, when, from what to what. `id` is a bigint, so it reads as a string of digits. */
export class AuditEvent extends Model<
  InferAttributes<AuditEvent>,
  InferCreationAttributes<AuditEvent>
> {
  declare id: CreationOptional<string>;
  declare actorId: CreationOptional<string | null>;
  declare action: string;
  declare entity: string;
  declare entityId: string;
  declare before: CreationOptional<object | null>;
  declare after: CreationOptional<object | null>;
  declare requestId: CreationOptional<string | null>;
  declare at: CreationOptional<Date>;

  declare actor?: NonAttribute<User | null>;
}

AuditEvent.init(
  {
    id: { type: DataTypes.BIGINT, primaryKey: true, autoIncrement: true },
    actorId: DataTypes.UUID,
    action: { type: DataTypes.TEXT, allowNull: false },
    entity: { type: DataTypes.TEXT, allowNull: false },
    entityId: { type: DataTypes.TEXT, allowNull: false },
    before: DataTypes.JSONB,
    after: DataTypes.JSONB,
    requestId: DataTypes.TEXT,
    at: { type: DataTypes.DATE, allowNull: false, defaultValue: DataTypes.NOW },
  },
  { sequelize, modelName: "AuditEvent", tableName: "audit_events" },
);
