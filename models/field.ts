import {
  DataTypes,
  Model,
  type CreationOptional,
  type InferAttributes,
  type InferCreationAttributes,
  type NonAttribute,
} from "sequelize";
import { sequelize } from "./sequelize";
import type { PrmsClass, PrmsSubClass } from "./vocabulary";
import type { Basin } from "./basin";
import type { Reservoir } from "./reservoir";
import type { User } from "./user";

export class Field extends Model<InferAttributes<Field>, InferCreationAttributes<Field>> {
  declare id: CreationOptional<string>;
  declare slug: string;
  declare name: string;
  declare basinId: string;
  declare operator: string;
  declare latitude: CreationOptional<number | null>;
  declare longitude: CreationOptional<number | null>;
  declare waterDepthFt: CreationOptional<number | null>;
  declare workingInterest: number;
  declare netRevenueInterest: number;
  declare prmsClass: PrmsClass;
  declare prmsSubClass: PrmsSubClass;
  declare chanceOfCommerciality: number;
  declare responsibleEngineerId: CreationOptional<string | null>;
  declare notes: CreationOptional<string>;
  declare version: CreationOptional<number>;
  declare createdAt: CreationOptional<Date>;
  declare updatedAt: CreationOptional<Date>;

  declare basin?: NonAttribute<Basin>;
  declare responsibleEngineer?: NonAttribute<User | null>;
  declare reservoirs?: NonAttribute<Reservoir[]>;
}

Field.init(
  {
    id: { type: DataTypes.UUID, primaryKey: true, defaultValue: DataTypes.UUIDV4 },
    slug: { type: DataTypes.TEXT, allowNull: false },
    name: { type: DataTypes.TEXT, allowNull: false },
    basinId: { type: DataTypes.UUID, allowNull: false },
    operator: { type: DataTypes.TEXT, allowNull: false },
    latitude: DataTypes.DOUBLE,
    longitude: DataTypes.DOUBLE,
    waterDepthFt: DataTypes.DOUBLE,
    workingInterest: { type: DataTypes.DOUBLE, allowNull: false },
    netRevenueInterest: { type: DataTypes.DOUBLE, allowNull: false },
    prmsClass: { type: DataTypes.TEXT, allowNull: false },
    prmsSubClass: { type: DataTypes.TEXT, allowNull: false },
    chanceOfCommerciality: { type: DataTypes.DOUBLE, allowNull: false },
    responsibleEngineerId: DataTypes.UUID,
    notes: { type: DataTypes.TEXT, allowNull: false, defaultValue: "" },
    version: { type: DataTypes.INTEGER, allowNull: false, defaultValue: 1 },
    createdAt: { type: DataTypes.DATE, allowNull: false, defaultValue: DataTypes.NOW },
    updatedAt: { type: DataTypes.DATE, allowNull: false, defaultValue: DataTypes.NOW },
  },
  { sequelize, modelName: "Field", tableName: "fields" },
);
