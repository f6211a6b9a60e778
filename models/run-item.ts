import {
  DataTypes,
  Model,
  type CreationOptional,
  type InferAttributes,
  type InferCreationAttributes,
  type NonAttribute,
} from "sequelize";
import type { Range } from "@/analytics/volumetrics/results-schema";
import type { Reservoir } from "./reservoir";
import { sequelize } from "./sequelize";
import type { RunItemState } from "./vocabulary";

/** One doubling of the trials of a run until settled. Condensate in STB. */
export interface RunStep {
  trials: number;
  /** largest half-width of a 95 % interval over its percentile */
  worst: number;
  condensateRecoverableStb: Range;
  standardErrors: Range;
}

/** What came of an item, in recoverable condensate, STB. */
export interface RunOutcome {
  trials: number;
  engineVersion: string;
  before: Range | null;
  after: Range;
  standardErrors: Range;
  /** largest change of P90, P50 or P10, over the larger standard error of the two; null without a before */
  movedStandardErrors: number | null;
  settled: boolean | null;
}

/**
 * One estimate of a run. While it is computed it belongs to the worker named in it until `leasedUntil`; `claimId`, new
 * with every claim and gone with its end, is the token by which that worker may store its result.
 */
export class RunItem extends Model<InferAttributes<RunItem>, InferCreationAttributes<RunItem>> {
  declare runId: string;
  declare position: number;
  declare estimateId: string;
  declare estimateVersion: number;
  declare revision: number;
  declare reservoirId: string;
  declare state: CreationOptional<RunItemState>;
  declare attempts: CreationOptional<number>;
  declare worker: CreationOptional<string | null>;
  declare claimId: CreationOptional<string | null>;
  declare leasedUntil: CreationOptional<Date | null>;
  declare progress: CreationOptional<RunStep[] | null>;
  declare outcome: CreationOptional<RunOutcome | null>;
  declare reason: CreationOptional<string | null>;
  declare finishedAt: CreationOptional<Date | null>;

  declare reservoir?: NonAttribute<Reservoir>;
}

RunItem.init(
  {
    runId: { type: DataTypes.UUID, primaryKey: true },
    position: { type: DataTypes.INTEGER, primaryKey: true },
    estimateId: { type: DataTypes.UUID, allowNull: false },
    estimateVersion: { type: DataTypes.INTEGER, allowNull: false },
    revision: { type: DataTypes.INTEGER, allowNull: false },
    reservoirId: { type: DataTypes.UUID, allowNull: false },
    state: { type: DataTypes.TEXT, allowNull: false, defaultValue: "waiting" },
    attempts: { type: DataTypes.INTEGER, allowNull: false, defaultValue: 0 },
    worker: DataTypes.TEXT,
    claimId: DataTypes.UUID,
    leasedUntil: DataTypes.DATE,
    progress: DataTypes.JSONB,
    outcome: DataTypes.JSONB,
    reason: DataTypes.TEXT,
    finishedAt: DataTypes.DATE,
  },
  { sequelize, modelName: "RunItem", tableName: "run_items" },
);
