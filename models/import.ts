import {
  DataTypes,
  Model,
  type CreationOptional,
  type InferAttributes,
  type InferCreationAttributes,
  type NonAttribute,
} from "sequelize";
import { sequelize } from "./sequelize";
import type { ImportState } from "./vocabulary";
import type { User } from "./user";

/** A file brought in, and what became of each of its rows. */
export class Import extends Model<InferAttributes<Import>, InferCreationAttributes<Import>> {
  declare id: CreationOptional<string>;
  declare fileName: string;
  declare sha256: string;
  declare storageKey: string;
  declare state: ImportState;
  declare rowsTotal: CreationOptional<number>;
  declare rowsGood: CreationOptional<number>;
  declare rowsBad: CreationOptional<number>;
  declare rowsApplied: CreationOptional<number>;
  declare rowsUnchanged: CreationOptional<number>;
  declare progress: CreationOptional<number>;
  declare report: CreationOptional<Record<string, unknown> | null>;
  declare createdBy: string;
  declare createdAt: CreationOptional<Date>;
  declare updatedAt: CreationOptional<Date>;

  declare creator?: NonAttribute<User>;
}

Import.init(
  {
    id: { type: DataTypes.UUID, primaryKey: true, defaultValue: DataTypes.UUIDV4 },
    fileName: { type: DataTypes.TEXT, allowNull: false },
    sha256: { type: DataTypes.TEXT, allowNull: false },
    storageKey: { type: DataTypes.TEXT, allowNull: false },
    state: { type: DataTypes.TEXT, allowNull: false },
    rowsTotal: { type: DataTypes.INTEGER, allowNull: false, defaultValue: 0 },
    rowsGood: { type: DataTypes.INTEGER, allowNull: false, defaultValue: 0 },
    rowsBad: { type: DataTypes.INTEGER, allowNull: false, defaultValue: 0 },
    rowsApplied: { type: DataTypes.INTEGER, allowNull: false, defaultValue: 0 },
    rowsUnchanged: { type: DataTypes.INTEGER, allowNull: false, defaultValue: 0 },
    progress: { type: DataTypes.DOUBLE, allowNull: false, defaultValue: 0 },
    report: DataTypes.JSONB,
    createdBy: { type: DataTypes.UUID, allowNull: false },
    createdAt: { type: DataTypes.DATE, allowNull: false, defaultValue: DataTypes.NOW },
    updatedAt: { type: DataTypes.DATE, allowNull: false, defaultValue: DataTypes.NOW },
  },
  { sequelize, modelName: "Import", tableName: "imports" },
);
