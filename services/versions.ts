import type { Model, Transaction } from "sequelize";
import { now } from "./clock";
import { StaleVersionError } from "./errors";

type Versioned = Model & { version: number; updatedAt: Date };

/** @throws {StaleVersionError} carrying `row` when it is no longer the version the person was looking at */
export function assertVersion(row: { version: number }, expectedVersion: number): void {
  if (row.version !== expectedVersion) throw new StaleVersionError(expectedVersion, row);
}

/** Write changes to a row that was locked in this transaction, under its next version number. */
export async function saveVersioned(row: Versioned, transaction: Transaction): Promise<void> {
  row.version += 1;
  row.updatedAt = now();
  await row.save({ transaction });
}
