import {
  Op,
  QueryTypes,
  fn,
  col,
  where,
  type CreationAttributes,
  type Transaction,
} from "sequelize";
import { sequelize } from "../sequelize";
import type { Role } from "../vocabulary";
import { User } from "../associations";

interface Options {
  transaction?: Transaction;
  /** hold the row until the transaction ends */
  lock?: boolean;
}

export async function findUser(id: string, options: Options = {}): Promise<User | null> {
  return User.findByPk(id, options);
}

/** Capital letters in an e-mail address make no difference here. */
export async function findUserByEmail(email: string, options: Options = {}): Promise<User | null> {
  return User.findOne({
    where: where(fn("lower", col("email")), email.trim().toLowerCase()),
    ...options,
  });
}

/** Let the transactions that open a new installation pass one at a time. */
export async function queueForSetup(transaction: Transaction): Promise<void> {
  await sequelize.query("select pg_advisory_xact_lock(hashtext('first administrator'))", {
    type: QueryTypes.SELECT,
    transaction,
  });
}

export async function countUsers(options: Options = {}): Promise<number> {
  return User.count({ transaction: options.transaction });
}

export async function countOtherActiveAdministrators(
  id: string,
  transaction: Transaction,
): Promise<number> {
  const others = await User.findAll({
    attributes: ["id"],
    where: { role: "administrator", active: true, id: { [Op.ne]: id } },
    lock: true,
    transaction,
  });
  return others.length;
}

export async function listUsersPage(page: {
  limit: number;
  offset: number;
}): Promise<{ rows: User[]; count: number }> {
  return User.findAndCountAll({
    order: [
      ["name", "ASC"],
      ["id", "ASC"],
    ],
    ...page,
  });
}

/** Active people, by name; of one role when given. */
export async function listActiveUsers(role?: Role): Promise<User[]> {
  return User.findAll({
    where: { active: true, ...(role && { role }) },
    order: [
      ["name", "ASC"],
      ["id", "ASC"],
    ],
  });
}

export async function createUserRow(
  values: CreationAttributes<User>,
  options: { transaction: Transaction },
): Promise<User> {
  return User.create(values, options);
}

export async function recordSignIn(id: string, at: Date): Promise<void> {
  await User.update({ lastSignInAt: at }, { where: { id } });
}
