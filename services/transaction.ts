import { AsyncLocalStorage } from "node:async_hooks";
import {
  BaseError,
  DatabaseError,
  ForeignKeyConstraintError,
  UniqueConstraintError,
  type Transaction,
} from "sequelize";
import { sequelize } from "@/models/sequelize";
import { ConflictError, InvalidInputError } from "./errors";

/** What to tell a person when the database holds a line that a check in the code could not (two people at once). */
const uniqueMessages: Record<string, string> = {
  users_email_unique: "Somebody with this e-mail address is here already.",
  basins_name_unique: "There is a basin of this name already.",
  basins_slug_unique: "There is a basin of this name already.",
  fields_name_unique: "There is a field of this name already.",
  fields_slug_unique: "There is a field of this name already.",
  reservoirs_name_unique: "This field has a reservoir of this name already.",
  reservoirs_slug_unique: "This field has a reservoir of this name already.",
  fluid_samples_name_unique: "This reservoir has a fluid sample of this name already.",
  estimates_one_open: "This reservoir has an open estimate already.",
  estimates_one_approved: "Another estimate of this reservoir was approved meanwhile.",
  estimates_revision_unique: "Another estimate of this reservoir was begun meanwhile.",
  dependence_sets_name_unique: "There is a dependence set of this name already.",
  price_decks_name_unique: "There is a price deck of this name and version already.",
};

const immutableMessages: Record<string, string> = {
  estimates_immutable: "This estimate has been submitted or decided and cannot be changed.",
  price_decks_immutable: "This price deck is published and cannot be changed.",
  audit_events_append_only: "The audit trail cannot be changed.",
};

/** The violated constraint's name, which the driver adds to its errors. */
function constraintOf(error: BaseError & { original?: Error }): string {
  const original = error.original;
  return original && "constraint" in original ? String(original.constraint) : "";
}

const current = new AsyncLocalStorage<Transaction>();

/**
 * One unit of work: all of it happens, or none. A use case called within another one's unit of work joins it, so that
 * an import of a hundred rows is one unit made of the same use cases as work by hand. Violated constraints come out as
 * the errors that people can act on; anything else comes out as it was.
 */
export async function inTransaction<Result>(
  work: (transaction: Transaction) => Promise<Result>,
): Promise<Result> {
  const joined = current.getStore();
  if (joined) return work(joined);
  try {
    return await sequelize.transaction((transaction) =>
      current.run(transaction, () => work(transaction)),
    );
  } catch (error) {
    if (error instanceof UniqueConstraintError) {
      const message = uniqueMessages[constraintOf(error)] ?? "This exists already.";
      throw new ConflictError(message, "already_exists");
    }
    if (error instanceof ForeignKeyConstraintError) {
      throw new InvalidInputError([
        { pointer: "#", detail: "This refers to something that does not exist." },
      ]);
    }
    if (error instanceof DatabaseError) {
      const immutable = immutableMessages[constraintOf(error)];
      if (immutable) throw new ConflictError(immutable, "immutable");
    }
    throw error;
  }
}
