import { type CreationAttributes, type Transaction } from "sequelize";
import { Basin, Field, Reservoir, User } from "../associations";

interface Options {
  transaction?: Transaction;
  lock?: boolean;
}

/** The parents that every screen shows with a field. */
const parents = [
  { model: Basin, as: "basin" },
  { model: User, as: "responsibleEngineer", attributes: ["id", "name"] },
];

/** The bare row, for changing it. */
export async function findField(id: string, options: Options = {}): Promise<Field | null> {
  return Field.findByPk(id, options);
}

export async function findFieldWithParents(
  id: string,
  options: Options = {},
): Promise<Field | null> {
  return Field.findByPk(id, { ...options, include: parents });
}

/** The field with its basin, engineer and reservoirs (by name). */
export async function findFieldBySlug(slug: string, options: Options = {}): Promise<Field | null> {
  return Field.findOne({
    where: { slug },
    include: [...parents, { model: Reservoir, as: "reservoirs" }],
    order: [[{ model: Reservoir, as: "reservoirs" }, "name", "ASC"]],
    ...options,
  });
}

export async function createFieldRow(
  values: CreationAttributes<Field>,
  options: { transaction: Transaction },
): Promise<Field> {
  return Field.create(values, options);
}
