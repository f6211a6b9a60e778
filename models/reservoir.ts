import {
  DataTypes,
  Model,
  type CreationOptional,
  type InferAttributes,
  type InferCreationAttributes,
  type NonAttribute,
} from "sequelize";
import { sequelize } from "./sequelize";
import type { Estimate } from "./estimate";
import type { Field } from "./field";
import type { FluidSample } from "./fluid-sample";

export class Reservoir extends Model<
  InferAttributes<Reservoir>,
  InferCreationAttributes<Reservoir>
> {
  declare id: CreationOptional<string>;
  declare fieldId: string;
  declare slug: string;
  declare name: string;
  declare depthFt: CreationOptional<number | null>;
  declare version: CreationOptional<number>;
  declare createdAt: CreationOptional<Date>;
  declare updatedAt: CreationOptional<Date>;

  declare field?: NonAttribute<Field>;
  declare fluidSamples?: NonAttribute<FluidSample[]>;
  declare estimates?: NonAttribute<Estimate[]>;
}

Reservoir.init(
  {
    id: { type: DataTypes.UUID, primaryKey: true, defaultValue: DataTypes.UUIDV4 },
    fieldId: { type: DataTypes.UUID, allowNull: false },
    slug: { type: DataTypes.TEXT, allowNull: false },
    name: { type: DataTypes.TEXT, allowNull: false },
    depthFt: DataTypes.DOUBLE,
    version: { type: DataTypes.INTEGER, allowNull: false, defaultValue: 1 },
    createdAt: { type: DataTypes.DATE, allowNull: false, defaultValue: DataTypes.NOW },
    updatedAt: { type: DataTypes.DATE, allowNull: false, defaultValue: DataTypes.NOW },
  },
  { sequelize, modelName: "Reservoir", tableName: "reservoirs" },
);
