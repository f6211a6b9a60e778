import {
  DataTypes,
  Model,
  type CreationOptional,
  type InferAttributes,
  type InferCreationAttributes,
} from "sequelize";
import { sequelize } from "./sequelize";

/** The one row of choices that hold for the whole book. */
export class Settings extends Model<InferAttributes<Settings>, InferCreationAttributes<Settings>> {
  declare id: CreationOptional<number>;
  declare organisationName: string;
  declare standardPressurePsia: number;
  declare standardTemperatureDegF: number;
  declare version: CreationOptional<number>;
  declare updatedAt: CreationOptional<Date>;
}

Settings.init(
  {
    id: { type: DataTypes.INTEGER, primaryKey: true, defaultValue: 1 },
    organisationName: { type: DataTypes.TEXT, allowNull: false },
    standardPressurePsia: { type: DataTypes.DOUBLE, allowNull: false },
    standardTemperatureDegF: { type: DataTypes.DOUBLE, allowNull: false },
    version: { type: DataTypes.INTEGER, allowNull: false, defaultValue: 1 },
    updatedAt: { type: DataTypes.DATE, allowNull: false, defaultValue: DataTypes.NOW },
  },
  { sequelize, modelName: "Settings", tableName: "settings" },
);
