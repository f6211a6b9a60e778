import { createHash } from "node:crypto";
import type { User } from "@/models/user";
import { findLiveTokenByHash, recordTokenUse } from "@/models/queries/api-tokens";
import { findUser, findUserByEmail, recordSignIn } from "@/models/queries/users";
import { now } from "./clock";
import type { Actor } from "./policy";
import { verifyPassword } from "./passwords";
import { assertMayTry, clearFailures, countFailure } from "./sign-in-limits";

/** What a cookie says about its bearer; everything else is read from the database each time. */
export interface SessionClaim {
  userId: string;
  sessionEpoch: number;
}

function toActor(user: User): Actor {
  return { id: user.id, name: user.name, email: user.email, role: user.role };
}

/**
 * The person behind a cookie as they are now: a changed role counts at once, and a person who was made inactive or
 * signed out everywhere is nobody.
 */
export async function findActor(claim: SessionClaim): Promise<Actor | null> {
  const user = await findUser(claim.userId);
  return user?.active && user.sessionEpoch === claim.sessionEpoch ? toActor(user) : null;
}

/** How a token is stored: nobody can take it from the database and use it. It is random, so one round suffices. */
export function hashToken(token: string): string {
  return createHash("sha256").update(token).digest("hex");
}

/** The active owner of a live API token, as they are now, or null. */
export async function findActorByToken(token: string): Promise<Actor | null> {
  const found = await findLiveTokenByHash(hashToken(token));
  if (!found?.user?.active) return null;
  const at = now();
  // A note of use to the minute is enough to spot a forgotten token, and spares a write for each request.
  if (!found.lastUsedAt || at.getTime() - found.lastUsedAt.getTime() > 60_000) {
    await recordTokenUse(found.id, at);
  }
  return toActor(found.user);
}

/**
 * Check an e-mail address and password.
 *
 * @param networkAddress  where the attempt comes from, to count failures by
 * @returns what to put in the cookie, or null; null never says which of the two was wrong
 * @throws {TooManyRequestsError} after too many failures
 */
export async function signIn(
  email: string,
  password: string,
  networkAddress: string,
): Promise<(SessionClaim & { name: string; email: string }) | null> {
  const attempt = { email: email.trim().toLowerCase(), networkAddress };
  await assertMayTry(attempt);
  const user = await findUserByEmail(email);
  const matches = await verifyPassword(password, user?.passwordHash ?? null);
  if (!user || !matches || !user.active) {
    await countFailure(attempt);
    return null;
  }
  await clearFailures(attempt);
  await recordSignIn(user.id, now());
  return { userId: user.id, sessionEpoch: user.sessionEpoch, name: user.name, email: user.email };
}
