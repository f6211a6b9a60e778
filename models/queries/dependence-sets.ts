import type { CreationAttributes, Transaction } from "sequelize";
import { DependenceSet, User } from "../associations";
import { sequelize } from "../sequelize";

interface Options {
  transaction?: Transaction;
  lock?: boolean;
}

const withPerson = [{ model: User, as: "updater", attributes: ["id", "name"] }];

/** The bare row, for changing it or adding up by it. */
export async function findDependenceSet(
  id: string,
  options: Options = {},
): Promise<DependenceSet | null> {
  return DependenceSet.findByPk(id, options);
}

/** With whoever changed it last. */
export async function findDependenceSetWithPerson(
  id: string,
  options: { transaction?: Transaction } = {},
): Promise<DependenceSet | null> {
  return DependenceSet.findByPk(id, { ...options, include: withPerson });
}

/** What totals stand on when nobody says otherwise. */
export async function findDefaultDependenceSet(
  options: Options = {},
): Promise<DependenceSet | null> {
  return DependenceSet.findOne({ where: { isDefault: true }, ...options });
}

/** All of them, the default first, then by name: their number is bounded. */
export async function listAllDependenceSets(
  options: { transaction?: Transaction } = {},
): Promise<DependenceSet[]> {
  return DependenceSet.findAll({
    ...options,
    include: withPerson,
    order: [
      ["isDefault", "DESC"],
      ["name", "ASC"],
    ],
  });
}

export async function countDependenceSets(
  options: { transaction?: Transaction } = {},
): Promise<number> {
  return DependenceSet.count(options);
}

/** Holds back everybody else who would save a set, or move a field among them, until this transaction ends. */
export async function lockDependenceSets(transaction: Transaction): Promise<void> {
  await sequelize.query("lock table dependence_sets in share row exclusive mode", { transaction });
}

export async function createDependenceSetRow(
  values: CreationAttributes<DependenceSet>,
  options: { transaction: Transaction },
): Promise<DependenceSet> {
  return DependenceSet.create(values, options);
}

export async function deleteDependenceSet(
  set: DependenceSet,
  options: { transaction: Transaction },
): Promise<void> {
  await set.destroy(options);
}
