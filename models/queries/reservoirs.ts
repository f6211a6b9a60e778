import type { CreationAttributes, Transaction } from "sequelize";
import { Basin, Field, Reservoir, User } from "../associations";

interface Options {
  transaction?: Transaction;
  lock?: boolean;
}

const fieldParents = [
  { model: Basin, as: "basin" },
  { model: User, as: "responsibleEngineer", attributes: ["id", "name"] },
];

/** The bare row, for changing it. */
export async function findReservoir(id: string, options: Options = {}): Promise<Reservoir | null> {
  return Reservoir.findByPk(id, options);
}

/** The reservoir with its field, and that one's basin and responsible engineer. */
export async function findReservoirWithField(
  id: string,
  options: Options = {},
): Promise<Reservoir | null> {
  return Reservoir.findByPk(id, {
    ...options,
    include: [{ model: Field, as: "field", include: fieldParents }],
  });
}

export async function findReservoirBySlug(
  fieldId: string,
  slug: string,
  options: Options = {},
): Promise<Reservoir | null> {
  return Reservoir.findOne({ where: { fieldId, slug }, ...options });
}

/** The reservoirs of one field, by name. */
export async function listReservoirsOfField(fieldId: string): Promise<Reservoir[]> {
  return Reservoir.findAll({ where: { fieldId }, order: [["name", "ASC"]], limit: 500 });
}

export async function createReservoirRow(
  values: CreationAttributes<Reservoir>,
  options: { transaction: Transaction },
): Promise<Reservoir> {
  return Reservoir.create(values, options);
}
