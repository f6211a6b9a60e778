import { Op, type CreationAttributes, type Transaction, type WhereOptions } from "sequelize";
import {
  Basin,
  Estimate,
  EstimateTrials,
  Field,
  FluidSample,
  Reservoir,
  User,
} from "../associations";
import { openEstimateStates, type EstimateState } from "../vocabulary";

interface Options {
  transaction?: Transaction;
  lock?: boolean;
}

/** Names for people, never their addresses or hashes. */
const people = [
  { model: User, as: "creator", attributes: ["id", "name"] },
  { model: User, as: "submitter", attributes: ["id", "name"] },
  { model: User, as: "decider", attributes: ["id", "name"] },
];

const place = {
  model: Reservoir,
  as: "reservoir",
  include: [{ model: Field, as: "field", include: [{ model: Basin, as: "basin" }] }],
};

/** Inputs and summary are several kilobytes each; lists do without. */
const heavy = ["inputs", "summary"];

/** The bare row, for changing it. */
export async function findEstimate(id: string, options: Options = {}): Promise<Estimate | null> {
  return Estimate.findByPk(id, options);
}

/** The estimate with its people, its sample, and the reservoir, field and basin it belongs to. */
export async function findEstimateWithPeople(
  id: string,
  options: Options = {},
): Promise<Estimate | null> {
  return Estimate.findByPk(id, {
    ...options,
    include: [...people, place, { model: FluidSample, as: "fluidSample" }],
  });
}

export async function findApprovedEstimate(
  reservoirId: string,
  options: Options = {},
): Promise<Estimate | null> {
  return Estimate.findOne({
    where: { reservoirId, state: "approved" },
    include: people,
    ...options,
  });
}

/** The approved row alone, locked, to be superseded. */
export async function findApprovedEstimateToSupersede(
  reservoirId: string,
  transaction: Transaction,
): Promise<Estimate | null> {
  return Estimate.findOne({ where: { reservoirId, state: "approved" }, transaction, lock: true });
}

export async function findOpenEstimate(
  reservoirId: string,
  options: Options = {},
): Promise<Estimate | null> {
  return Estimate.findOne({
    where: { reservoirId, state: { [Op.in]: [...openEstimateStates] } },
    include: people,
    ...options,
  });
}

export async function findLatestRevision(
  reservoirId: string,
  transaction: Transaction,
): Promise<number> {
  return (
    (await Estimate.max<number, Estimate>("revision", { where: { reservoirId }, transaction })) ?? 0
  );
}

/** All revisions of a reservoir, newest first, without inputs and summary. */
export async function listEstimatesOfReservoir(reservoirId: string): Promise<Estimate[]> {
  return Estimate.findAll({
    where: { reservoirId },
    attributes: { exclude: heavy },
    include: people,
    order: [["revision", "DESC"]],
    limit: 500,
  });
}

export interface EstimateFilter {
  state?: EstimateState;
  reservoirId?: string;
}

/** Estimates with their places and people, longest-waiting first, without inputs and summary. */
export async function listEstimatesPage(
  filter: EstimateFilter,
  page: { limit: number; offset: number },
): Promise<{ rows: Estimate[]; count: number }> {
  const where: WhereOptions<Estimate> = {
    ...(filter.state && { state: filter.state }),
    ...(filter.reservoirId && { reservoirId: filter.reservoirId }),
  };
  return Estimate.findAndCountAll({
    where,
    attributes: { exclude: heavy },
    include: [...people, place],
    order: [
      ["submittedAt", "ASC NULLS LAST"],
      ["createdAt", "ASC"],
    ],
    distinct: true,
    ...page,
  });
}

export async function createEstimateRow(
  values: CreationAttributes<Estimate>,
  options: { transaction: Transaction },
): Promise<Estimate> {
  return Estimate.create(values, options);
}

export async function replaceTrials(
  values: CreationAttributes<EstimateTrials>,
  options: { transaction: Transaction },
): Promise<void> {
  await EstimateTrials.destroy({ where: { estimateId: values.estimateId }, ...options });
  await EstimateTrials.create(values, options);
}

export async function deleteTrials(
  estimateId: string,
  options: { transaction: Transaction },
): Promise<void> {
  await EstimateTrials.destroy({ where: { estimateId }, ...options });
}
