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
import type { RunKind, RunScope, RunState } from "./vocabulary";

/** What was asked for, by kind of run; an import asks for nothing besides its estimates. */
export interface RunOptions {
  /** of a recalculation */
  scope?: RunScope;
  /** of `untilSettled`: half-width of the 95 % interval of a percentile, as a share of it */
  tolerance?: number;
  /** of `untilSettled` */
  mostTrials?: number;
}

/** Many estimates, or one at length, computed outside a request in the name of the person who asked. */
export class Run extends Model<InferAttributes<Run>, InferCreationAttributes<Run>> {
  declare id: CreationOptional<string>;
  declare kind: RunKind;
  declare state: CreationOptional<RunState>;
  declare title: string;
  declare options: CreationOptional<RunOptions>;
  declare importId: CreationOptional<string | null>;
  declare createdBy: string;
  declare createdAt: CreationOptional<Date>;
  declare updatedAt: CreationOptional<Date>;
  declare startedAt: CreationOptional<Date | null>;
  declare finishedAt: CreationOptional<Date | null>;
  declare version: CreationOptional<number>;

  declare creator?: NonAttribute<User>;
}

Run.init(
  {
    id: { type: DataTypes.UUID, primaryKey: true, defaultValue: DataTypes.UUIDV4 },
    kind: { type: DataTypes.TEXT, allowNull: false },
    state: { type: DataTypes.TEXT, allowNull: false, defaultValue: "waiting" },
    title: { type: DataTypes.TEXT, allowNull: false },
    options: { type: DataTypes.JSONB, allowNull: false, defaultValue: {} },
    importId: DataTypes.UUID,
    createdBy: { type: DataTypes.UUID, allowNull: false },
    createdAt: { type: DataTypes.DATE, allowNull: false, defaultValue: DataTypes.NOW },
    updatedAt: { type: DataTypes.DATE, allowNull: false, defaultValue: DataTypes.NOW },
    startedAt: DataTypes.DATE,
    finishedAt: DataTypes.DATE,
    version: { type: DataTypes.INTEGER, allowNull: false, defaultValue: 1 },
  },
  { sequelize, modelName: "Run", tableName: "runs" },
);
