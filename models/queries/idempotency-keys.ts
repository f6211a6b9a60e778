import { QueryTypes } from "sequelize";
import { sequelize } from "../sequelize";

/** What is known of a key; `status` is null while its first request is still at work. */
export interface RememberedAnswer {
  requestHash: string;
  status: number | null;
  response: unknown;
  etag: string | null;
  createdAt: Date;
}

/** Take the key if nobody has it. @returns whether it was free */
export async function claimIdempotencyKey(
  userId: string,
  key: string,
  requestHash: string,
): Promise<boolean> {
  const taken = await sequelize.query(
    `insert into idempotency_keys (user_id, key, request_hash) values (:userId, :key, :requestHash)
      on conflict do nothing returning key`,
    { replacements: { userId, key, requestHash }, type: QueryTypes.SELECT },
  );
  return taken.length === 1;
}

export async function findIdempotencyKey(
  userId: string,
  key: string,
): Promise<RememberedAnswer | null> {
  const [found] = await sequelize.query<RememberedAnswer>(
    `select request_hash as "requestHash", status, response, etag, created_at as "createdAt"
      from idempotency_keys where user_id = :userId and key = :key`,
    { replacements: { userId, key }, type: QueryTypes.SELECT },
  );
  return found ?? null;
}

export async function rememberAnswer(
  userId: string,
  key: string,
  answer: { status: number; response: unknown; etag: string | null },
): Promise<void> {
  await sequelize.query(
    `update idempotency_keys set status = :status, response = cast(:response as jsonb), etag = :etag
      where user_id = :userId and key = :key`,
    { replacements: { ...answer, userId, key, response: JSON.stringify(answer.response ?? null) } },
  );
}

export async function releaseIdempotencyKey(userId: string, key: string): Promise<void> {
  await sequelize.query(`delete from idempotency_keys where user_id = :userId and key = :key`, {
    replacements: { userId, key },
  });
}

/** Forget answers given before `before`. */
export async function forgetAnswers(before: Date): Promise<void> {
  await sequelize.query(`delete from idempotency_keys where created_at < :before`, {
    replacements: { before },
  });
}
