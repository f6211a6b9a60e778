import { DataTypes, Model, type InferAttributes, type InferCreationAttributes } from "sequelize";
import { sequelize } from "./sequelize";

/** The trials of a revision: each quantity is `trials` little-endian float32 values, row = trial. */
export class EstimateTrials extends Model<
  InferAttributes<EstimateTrials>,
  InferCreationAttributes<EstimateTrials>
> {
  declare estimateId: string;
  declare trials: number;
  declare wetGasInPlaceScf: Buffer;
  declare dryGasInPlaceScf: Buffer;
  declare condensateInPlaceStb: Buffer;
  declare salesGasScf: Buffer;
  declare condensateRecoverableStb: Buffer;
}

EstimateTrials.init(
  {
    estimateId: { type: DataTypes.UUID, primaryKey: true },
    trials: { type: DataTypes.INTEGER, allowNull: false },
    wetGasInPlaceScf: { type: DataTypes.BLOB, allowNull: false },
    dryGasInPlaceScf: { type: DataTypes.BLOB, allowNull: false },
    condensateInPlaceStb: { type: DataTypes.BLOB, allowNull: false },
    salesGasScf: { type: DataTypes.BLOB, allowNull: false },
    condensateRecoverableStb: { type: DataTypes.BLOB, allowNull: false },
  },
  { sequelize, modelName: "EstimateTrials", tableName: "estimate_trials" },
);
