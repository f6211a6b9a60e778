import {
  DataTypes,
  Model,
  type CreationOptional,
  type InferAttributes,
  type InferCreationAttributes,
  type NonAttribute,
} from "sequelize";
import { noStudy, type SampleStudy } from "@/analytics/fluid/sample-study-schema";
import type { SeparatorTest } from "@/analytics/fluid/separator-test-schema";
import { sequelize } from "./sequelize";
import type { Reservoir } from "./reservoir";

export class FluidSample extends Model<
  InferAttributes<FluidSample>,
  InferCreationAttributes<FluidSample>
> {
  declare id: CreationOptional<string>;
  declare reservoirId: string;
  declare name: string;
  declare sampledOn: string;
  declare laboratory: CreationOptional<string>;
  declare separatorTest: SeparatorTest;
  declare condensateApi: number;
  declare gasOilRatioScfPerStb: number;
  declare condensateYieldStbPerMmscf: number;
  declare wellstreamGravity: number;
  declare hydrogenSulphide: number;
  declare dewPointPsia: CreationOptional<number | null>;
  declare study: CreationOptional<SampleStudy>;
  declare version: CreationOptional<number>;
  declare createdAt: CreationOptional<Date>;
  declare updatedAt: CreationOptional<Date>;

  declare reservoir?: NonAttribute<Reservoir>;
}

FluidSample.init(
  {
    id: { type: DataTypes.UUID, primaryKey: true, defaultValue: DataTypes.UUIDV4 },
    reservoirId: { type: DataTypes.UUID, allowNull: false },
    name: { type: DataTypes.TEXT, allowNull: false },
    sampledOn: { type: DataTypes.DATEONLY, allowNull: false },
    laboratory: { type: DataTypes.TEXT, allowNull: false, defaultValue: "" },
    separatorTest: { type: DataTypes.JSONB, allowNull: false },
    condensateApi: { type: DataTypes.DOUBLE, allowNull: false },
    gasOilRatioScfPerStb: { type: DataTypes.DOUBLE, allowNull: false },
    condensateYieldStbPerMmscf: { type: DataTypes.DOUBLE, allowNull: false },
    wellstreamGravity: { type: DataTypes.DOUBLE, allowNull: false },
    hydrogenSulphide: { type: DataTypes.DOUBLE, allowNull: false },
    dewPointPsia: DataTypes.DOUBLE,
    study: { type: DataTypes.JSONB, allowNull: false, defaultValue: noStudy },
    version: { type: DataTypes.INTEGER, allowNull: false, defaultValue: 1 },
    createdAt: { type: DataTypes.DATE, allowNull: false, defaultValue: DataTypes.NOW },
    updatedAt: { type: DataTypes.DATE, allowNull: false, defaultValue: DataTypes.NOW },
  },
  { sequelize, modelName: "FluidSample", tableName: "fluid_samples" },
);
