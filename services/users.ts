import type { Transaction } from "sequelize";
import type { User } from "@/models/user";
import { revokeTokensOfUser } from "@/models/queries/api-tokens";
import {
  countOtherActiveAdministrators,
  countUsers,
  createUserRow,
  findUser,
  listActiveUsers,
  listUsersPage,
  queueForSetup,
} from "@/models/queries/users";
import { changesBetween, recordAudit } from "./audit";
import { now } from "./clock";
import { ConflictError, InvalidInputError, NotFoundError } from "./errors";
import { toPage, type Page, type PageRequest } from "./paging";
import { hashPassword, verifyPassword } from "./passwords";
import { authorise, type Actor, type Role } from "./policy";
import { assertMayTry, clearFailures, countFailure } from "./sign-in-limits";
import { inTransaction } from "./transaction";
import { assertVersion, saveVersioned } from "./versions";

export interface NewUser {
  email: string;
  name: string;
  /** 12 to 200 characters */
  password: string;
  role: Role;
}

/** Whether somebody has to become the first administrator: true exactly while nobody exists. */
export async function needsSetup(): Promise<boolean> {
  return (await countUsers()) === 0;
}

/**
 * The step that opens a new installation: the first person, an administrator, made by whoever comes first.
 *
 * @throws {ConflictError} when anybody exists
 */
export async function createFirstAdministrator(input: Omit<NewUser, "role">): Promise<User> {
  const passwordHash = await hashPassword(input.password);
  return inTransaction(async (transaction) => {
    // Two people at once would both find nobody; the second waits here and then finds the first.
    await queueForSetup(transaction);
    if ((await countUsers({ transaction })) > 0) {
      throw new ConflictError("Dewledger has been set up already. Sign in.", "already_set_up");
    }
    return insertUser(null, { ...input, role: "administrator" }, passwordHash, transaction);
  });
}

/** Everybody, active or not, by name. */
export async function listUsers(actor: Actor, page: PageRequest): Promise<Page<User>> {
  authorise(actor, "user.read");
  return toPage(await listUsersPage(page), page);
}

/** Active people, for choosing one; of one role when given. */
export async function listPeople(actor: Actor, role?: Role): Promise<User[]> {
  authorise(actor, "people.read");
  return listActiveUsers(role);
}

/** @throws {ConflictError} when the e-mail address is taken */
export async function createUser(actor: Actor, input: NewUser): Promise<User> {
  authorise(actor, "user.create");
  const passwordHash = await hashPassword(input.password);
  return inTransaction((transaction) => insertUser(actor, input, passwordHash, transaction));
}

async function insertUser(
  actor: Actor | null,
  input: NewUser,
  passwordHash: string,
  transaction: Transaction,
): Promise<User> {
  const email = input.email.trim().toLowerCase();
  const at = now();
  const values = { email, name: input.name.trim(), role: input.role };
  const user = await createUserRow(
    { ...values, passwordHash, createdAt: at, updatedAt: at },
    { transaction },
  );
  await recordAudit(
    { actor, action: "user.created", entity: "user", entityId: user.id, after: values },
    transaction,
  );
  return user;
}

export interface UserPatch {
  name?: string;
  role?: Role;
  active?: boolean;
  /** a new password; it signs the person out everywhere and revokes their API tokens */
  password?: string;
  /** end every session this person has, and revoke their API tokens */
  signOutEverywhere?: boolean;
}

/**
 * Change a person. A new role counts from their next request; making them inactive, or a new password, ends their
 * sessions and revokes their API tokens.
 *
 * @throws {ConflictError} when it would leave nobody to administer
 */
export async function updateUser(
  actor: Actor,
  id: string,
  patch: UserPatch,
  expectedVersion: number,
): Promise<User> {
  authorise(actor, "user.update");
  const passwordHash = patch.password === undefined ? null : await hashPassword(patch.password);
  return inTransaction(async (transaction) => {
    const user = await findUser(id, { transaction, lock: true });
    if (!user) throw new NotFoundError("person");
    assertVersion(user, expectedVersion);

    const stops = (patch.role ?? user.role) !== "administrator" || !(patch.active ?? user.active);
    if (user.role === "administrator" && user.active && stops) {
      await assertAnotherAdministrator(id, transaction);
    }
    const before = { name: user.name, role: user.role, active: user.active };
    const changes = changesBetween(before, {
      name: patch.name?.trim(),
      role: patch.role,
      active: patch.active,
    });
    user.set(changes.after);
    if (passwordHash !== null) user.passwordHash = passwordHash;
    const endsSessions =
      patch.signOutEverywhere === true || passwordHash !== null || changes.after.active === false;
    const ended = endsSessions ? await endAccess(user, transaction) : {};
    await saveVersioned(user, transaction);
    await recordAudit(
      {
        actor,
        action: "user.updated",
        entity: "user",
        entityId: id,
        before: changes.before,
        after: {
          ...changes.after,
          ...(passwordHash !== null && { password: "replaced" }),
          ...ended,
        },
      },
      transaction,
    );
    return user;
  });
}

async function assertAnotherAdministrator(id: string, transaction: Transaction): Promise<void> {
  if ((await countOtherActiveAdministrators(id, transaction)) === 0) {
    throw new ConflictError(
      "This is the last active administrator. Give somebody else the role first.",
      "last_administrator",
    );
  }
}

/**
 * Shut every way in that was opened before now: sessions, and the API tokens that somebody may have made with them.
 * The caller saves the person.
 *
 * @returns what the audit trail says of it
 */
async function endAccess(
  user: User,
  transaction: Transaction,
): Promise<{ sessions: "ended"; apiTokensRevoked?: number }> {
  user.sessionEpoch += 1;
  const revoked = await revokeTokensOfUser(user.id, now(), { transaction });
  return { sessions: "ended", ...(revoked > 0 && { apiTokensRevoked: revoked }) };
}

/** End every session of one's own, on every device, and revoke one's API tokens. */
export async function signOutEverywhere(actor: Actor): Promise<void> {
  await inTransaction(async (transaction) => {
    const user = await findUser(actor.id, { transaction, lock: true });
    if (!user) throw new NotFoundError("person");
    const ended = await endAccess(user, transaction);
    await user.save({ transaction });
    await recordAudit(
      {
        actor,
        action: "user.signedOutEverywhere",
        entity: "user",
        entityId: user.id,
        after: ended,
      },
      transaction,
    );
  });
}

/**
 * Replace one's own password. It ends every session there is, the present one included, and revokes every API token: the
 * person signs in again with the new one. Wrong guesses at the present password count as failed attempts to sign in.
 *
 * @param networkAddress  where the attempt comes from
 * @throws {InvalidInputError} when the present password is not right, or the new one is the same
 * @throws {TooManyRequestsError} after too many failures
 */
export async function changeOwnPassword(
  actor: Actor,
  input: { currentPassword: string; password: string },
  networkAddress: string,
): Promise<void> {
  authorise(actor, "password.change");
  const attempt = { email: actor.email, networkAddress };
  await assertMayTry(attempt);
  const known = await findUser(actor.id);
  if (!(await verifyPassword(input.currentPassword, known?.passwordHash ?? null))) {
    await countFailure(attempt);
    throw new InvalidInputError([
      { pointer: "#/currentPassword", detail: "is not your present password" },
    ]);
  }
  if (input.password === input.currentPassword) {
    throw new InvalidInputError([
      { pointer: "#/password", detail: "must differ from the present password" },
    ]);
  }
  await clearFailures(attempt);
  const passwordHash = await hashPassword(input.password);
  await inTransaction(async (transaction) => {
    const user = await findUser(actor.id, { transaction, lock: true });
    if (!user) throw new NotFoundError("person");
    user.passwordHash = passwordHash;
    const ended = await endAccess(user, transaction);
    await saveVersioned(user, transaction);
    await recordAudit(
      {
        actor,
        action: "user.passwordChanged",
        entity: "user",
        entityId: user.id,
        after: { password: "replaced", ...ended },
      },
      transaction,
    );
  });
}
