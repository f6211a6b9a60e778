import type { CreationAttributes, Transaction } from "sequelize";
import { Basin } from "../associations";

interface Options {
  transaction?: Transaction;
  lock?: boolean;
}

export async function findBasin(id: string, options: Options = {}): Promise<Basin | null> {
  return Basin.findByPk(id, options);
}

/** All of them, by name: a company has a handful. */
export async function listAllBasins(options: { transaction?: Transaction } = {}): Promise<Basin[]> {
  return Basin.findAll({ ...options, order: [["name", "ASC"]] });
}

export async function createBasinRow(
  values: CreationAttributes<Basin>,
  options: { transaction: Transaction },
): Promise<Basin> {
  return Basin.create(values, options);
}
