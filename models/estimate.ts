import {
  DataTypes,
  Model,
  type CreationOptional,
  type InferAttributes,
  type InferCreationAttributes,
  type NonAttribute,
} from "sequelize";
import type { SamplingMethod } from "@/analytics/uncertainty/sampling-schema";
import type { EstimateInputs } from "@/analytics/volumetrics/inputs-schema";
import type { SimulationSummary } from "@/analytics/volumetrics/results-schema";
import { sequelize } from "./sequelize";
import type { EstimateState } from "./vocabulary";
import type { FluidSample } from "./fluid-sample";
import type { Reservoir } from "./reservoir";
import type { User } from "./user";

/** One numbered revision of a reservoir's inputs, with what was computed from them. */
export class Estimate extends Model<InferAttributes<Estimate>, InferCreationAttributes<Estimate>> {
  declare id: CreationOptional<string>;
  declare reservoirId: string;
  declare revision: number;
  declare state: EstimateState;
  declare inputs: EstimateInputs;
  declare schemaVersion: number;
  declare fluidSampleId: CreationOptional<string | null>;
  declare seed: number;
  declare trials: number;
  declare sampling: SamplingMethod;
  declare engineVersion: CreationOptional<string | null>;
  declare summary: CreationOptional<SimulationSummary | null>;
  declare computedAt: CreationOptional<Date | null>;
  declare note: CreationOptional<string>;
  declare createdBy: string;
  declare submittedBy: CreationOptional<string | null>;
  declare submittedAt: CreationOptional<Date | null>;
  declare decidedBy: CreationOptional<string | null>;
  declare decidedAt: CreationOptional<Date | null>;
  declare decisionNote: CreationOptional<string>;
  declare effectiveOn: CreationOptional<string | null>;
  declare version: CreationOptional<number>;
  declare createdAt: CreationOptional<Date>;
  declare updatedAt: CreationOptional<Date>;

  declare reservoir?: NonAttribute<Reservoir>;
  declare fluidSample?: NonAttribute<FluidSample | null>;
  declare creator?: NonAttribute<User>;
  declare submitter?: NonAttribute<User | null>;
  declare decider?: NonAttribute<User | null>;
}

Estimate.init(
  {
    id: { type: DataTypes.UUID, primaryKey: true, defaultValue: DataTypes.UUIDV4 },
    reservoirId: { type: DataTypes.UUID, allowNull: false },
    revision: { type: DataTypes.INTEGER, allowNull: false },
    state: { type: DataTypes.TEXT, allowNull: false },
    inputs: {
      type: DataTypes.JSONB,
      allowNull: false,
      /** Inputs that were stored before recovery plans have none, and read as such. */
      get(this: Estimate) {
        const inputs = this.getDataValue("inputs") as EstimateInputs | undefined;
        return inputs && { ...inputs, recoveryPlan: inputs.recoveryPlan ?? null };
      },
    },
    schemaVersion: { type: DataTypes.INTEGER, allowNull: false },
    fluidSampleId: DataTypes.UUID,
    seed: { type: DataTypes.INTEGER, allowNull: false },
    trials: { type: DataTypes.INTEGER, allowNull: false },
    sampling: { type: DataTypes.TEXT, allowNull: false },
    engineVersion: DataTypes.TEXT,
    summary: {
      type: DataTypes.JSONB,
      get(this: Estimate) {
        const summary = this.getDataValue("summary");
        return summary && { ...summary, recovery: summary.recovery ?? null };
      },
    },
    computedAt: DataTypes.DATE,
    note: { type: DataTypes.TEXT, allowNull: false, defaultValue: "" },
    createdBy: { type: DataTypes.UUID, allowNull: false },
    submittedBy: DataTypes.UUID,
    submittedAt: DataTypes.DATE,
    decidedBy: DataTypes.UUID,
    decidedAt: DataTypes.DATE,
    decisionNote: { type: DataTypes.TEXT, allowNull: false, defaultValue: "" },
    effectiveOn: DataTypes.DATEONLY,
    version: { type: DataTypes.INTEGER, allowNull: false, defaultValue: 1 },
    createdAt: { type: DataTypes.DATE, allowNull: false, defaultValue: DataTypes.NOW },
    updatedAt: { type: DataTypes.DATE, allowNull: false, defaultValue: DataTypes.NOW },
  },
  { sequelize, modelName: "Estimate", tableName: "estimates" },
);
