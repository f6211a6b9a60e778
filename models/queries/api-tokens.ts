import type { CreationAttributes, Transaction } from "sequelize";
import { ApiToken, User } from "../associations";

interface Options {
  transaction?: Transaction;
  lock?: boolean;
}

/** The token with its owner, if it was never revoked. */
export async function findLiveTokenByHash(tokenHash: string): Promise<ApiToken | null> {
  return ApiToken.findOne({
    where: { tokenHash, revokedAt: null },
    include: [{ model: User, as: "user", required: true }],
  });
}

export async function findTokenOfUser(
  id: string,
  userId: string,
  options: Options,
): Promise<ApiToken | null> {
  return ApiToken.findOne({ where: { id, userId }, ...options });
}

export async function listTokensOfUser(userId: string): Promise<ApiToken[]> {
  return ApiToken.findAll({ where: { userId }, order: [["createdAt", "DESC"]], limit: 200 });
}

export async function createTokenRow(
  values: CreationAttributes<ApiToken>,
  options: { transaction: Transaction },
): Promise<ApiToken> {
  return ApiToken.create(values, options);
}

/** @returns how many there were to revoke */
export async function revokeTokensOfUser(
  userId: string,
  at: Date,
  options: { transaction: Transaction },
): Promise<number> {
  const [count] = await ApiToken.update(
    { revokedAt: at },
    { where: { userId, revokedAt: null }, ...options },
  );
  return count;
}

export async function recordTokenUse(id: string, at: Date): Promise<void> {
  await ApiToken.update({ lastUsedAt: at }, { where: { id } });
}
