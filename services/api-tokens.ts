import { randomBytes } from "node:crypto";
import type { ApiToken } from "@/models/api-token";
import { createTokenRow, findTokenOfUser, listTokensOfUser } from "@/models/queries/api-tokens";
import { recordAudit } from "./audit";
import { now } from "./clock";
import { NotFoundError } from "./errors";
import { authorise, type Actor } from "./policy";
import { hashToken } from "./sessions";
import { inTransaction } from "./transaction";

/** The person's own tokens, newest first, without the secrets: those were shown once. */
export async function listApiTokens(actor: Actor): Promise<ApiToken[]> {
  authorise(actor, "apiToken.manage");
  return listTokensOfUser(actor.id);
}

/** A new token that acts as its owner. @returns the row and the secret, which is shown this once */
export async function createApiToken(
  actor: Actor,
  input: { name: string },
): Promise<{ row: ApiToken; token: string }> {
  authorise(actor, "apiToken.manage");
  const token = `dwl_${randomBytes(32).toString("base64url")}`;
  return inTransaction(async (transaction) => {
    const row = await createTokenRow(
      { userId: actor.id, name: input.name, tokenHash: hashToken(token), createdAt: now() },
      { transaction },
    );
    await recordAudit(
      {
        actor,
        action: "apiToken.created",
        entity: "apiToken",
        entityId: row.id,
        after: { name: row.name },
      },
      transaction,
    );
    return { row, token };
  });
}

/** Revoke one of the person's own tokens; revoking it again changes nothing. */
export async function revokeApiToken(actor: Actor, id: string): Promise<ApiToken> {
  authorise(actor, "apiToken.manage");
  return inTransaction(async (transaction) => {
    const row = await findTokenOfUser(id, actor.id, { transaction, lock: true });
    if (!row) throw new NotFoundError("API token");
    if (row.revokedAt) return row;
    row.revokedAt = now();
    await row.save({ transaction });
    await recordAudit(
      {
        actor,
        action: "apiToken.revoked",
        entity: "apiToken",
        entityId: row.id,
        before: { name: row.name },
      },
      transaction,
    );
    return row;
  });
}
