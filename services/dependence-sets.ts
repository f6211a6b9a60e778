import type { Transaction } from "sequelize";
import { checkDependence } from "@/analytics/portfolio/factor-model";
import type { Dependence } from "@/analytics/portfolio/dependence-schema";
import type { DependenceSet } from "@/models/dependence-set";
import { listAllBasins } from "@/models/queries/basins";
import {
  countDependenceSets,
  createDependenceSetRow,
  deleteDependenceSet,
  findDefaultDependenceSet,
  findDependenceSet,
  findDependenceSetWithPerson,
  listAllDependenceSets,
  lockDependenceSets,
} from "@/models/queries/dependence-sets";
import { listPlacedFields } from "@/models/queries/portfolio";
import { changesBetween, recordAudit } from "./audit";
import { now } from "./clock";
import { ConflictError, InvalidInputError, NotFoundError, toPointer } from "./errors";
import { authorise, type Actor } from "./policy";
import { inTransaction } from "./transaction";
import { assertVersion, saveVersioned } from "./versions";

/** Named answers are read side by side; more than these nobody tells apart. */
export const MAXIMUM_DEPENDENCE_SETS = 50;

export interface NewDependenceSet {
  name: string;
  note?: string;
  dependence: Dependence;
}

/** `isDefault` can only be given: totals stand on some set at any time. */
export type DependenceSetPatch = Partial<NewDependenceSet> & { isDefault?: true };

export async function listDependenceSets(actor: Actor): Promise<DependenceSet[]> {
  authorise(actor, "dependenceSet.read");
  return listAllDependenceSets();
}

export async function getDependenceSet(actor: Actor, id: string): Promise<DependenceSet> {
  authorise(actor, "dependenceSet.read");
  return reload(id);
}

async function reload(id: string, transaction?: Transaction): Promise<DependenceSet> {
  const set = await findDependenceSetWithPerson(id, { transaction });
  if (!set) throw new NotFoundError("dependence set");
  return set;
}

/** @throws {ConflictError} when there are as many sets as a book can have */
export async function createDependenceSet(
  actor: Actor,
  input: NewDependenceSet,
): Promise<DependenceSet> {
  authorise(actor, "dependenceSet.create");
  const values = { ...input, name: input.name.trim(), note: input.note?.trim() ?? "" };
  return inTransaction(async (transaction) => {
    await lockDependenceSets(transaction);
    await assertPossible(values.dependence, transaction);
    if ((await countDependenceSets({ transaction })) >= MAXIMUM_DEPENDENCE_SETS) {
      throw new ConflictError(
        `A book has at most ${MAXIMUM_DEPENDENCE_SETS} dependence sets. Delete one that nobody uses first.`,
        "too_many",
      );
    }
    const at = now();
    const set = await createDependenceSetRow(
      { ...values, updatedBy: actor.id, createdAt: at, updatedAt: at },
      { transaction },
    );
    await recordAudit(
      {
        actor,
        action: "dependenceSet.created",
        entity: "dependenceSet",
        entityId: set.id,
        after: values,
      },
      transaction,
    );
    return reload(set.id, transaction);
  });
}

/** Change a set, or make it the default: the one that was steps back in the same moment. */
export async function updateDependenceSet(
  actor: Actor,
  id: string,
  patch: DependenceSetPatch,
  expectedVersion: number,
): Promise<DependenceSet> {
  authorise(actor, "dependenceSet.update");
  return inTransaction(async (transaction) => {
    await lockDependenceSets(transaction);
    const set = await lockVersion(id, expectedVersion, transaction);
    const { name, note, isDefault, dependence } = set;
    const changes = changesBetween(
      { name, note, isDefault, dependence },
      { ...patch, name: patch.name?.trim(), note: patch.note?.trim() },
    );
    if (changes.after.dependence) await assertPossible(changes.after.dependence, transaction);
    if (changes.after.isDefault) await stepBack(transaction);
    set.set({ ...changes.after, updatedBy: actor.id });
    await saveVersioned(set, transaction);
    await recordAudit(
      {
        actor,
        action: "dependenceSet.updated",
        entity: "dependenceSet",
        entityId: id,
        ...changes,
      },
      transaction,
    );
    return reload(id, transaction);
  });
}

/** @throws {ConflictError} for the default, which totals stand on */
export async function removeDependenceSet(
  actor: Actor,
  id: string,
  expectedVersion: number,
): Promise<void> {
  authorise(actor, "dependenceSet.update");
  await inTransaction(async (transaction) => {
    await lockDependenceSets(transaction);
    const set = await lockVersion(id, expectedVersion, transaction);
    if (set.isDefault) {
      throw new ConflictError(
        "Totals stand on this set. Make another one the default first.",
        "default_set",
      );
    }
    const { name, note, dependence } = set;
    await deleteDependenceSet(set, { transaction });
    await recordAudit(
      {
        actor,
        action: "dependenceSet.deleted",
        entity: "dependenceSet",
        entityId: id,
        before: { name, note, dependence },
      },
      transaction,
    );
  });
}

async function lockVersion(
  id: string,
  expectedVersion: number,
  transaction: Transaction,
): Promise<DependenceSet> {
  const set = await findDependenceSet(id, { transaction, lock: true });
  if (!set) throw new NotFoundError("dependence set");
  if (set.version !== expectedVersion) {
    assertVersion(await reload(id, transaction), expectedVersion);
  }
  return set;
}

/** Takes the mark from the present default. */
async function stepBack(transaction: Transaction): Promise<void> {
  const present = await findDefaultDependenceSet({ transaction, lock: true });
  if (!present) return;
  present.set({ isDefault: false });
  await saveVersioned(present, transaction);
}

/** @throws {InvalidInputError} naming what does not exist, and fields that would share more than there is to share */
async function assertPossible(dependence: Dependence, transaction: Transaction): Promise<void> {
  const [basins, fields] = await Promise.all([
    listAllBasins({ transaction }),
    listPlacedFields({ transaction }),
  ]);
  const basinIds = new Set(basins.map(({ id }) => id));
  const fieldIds = new Set(fields.map(({ id }) => id));
  const unknownBasins = Object.keys(dependence.basinRanks)
    .filter((id) => !basinIds.has(id))
    .map((id) => ({ input: `basinRanks.${id}`, message: "There is no such basin." }));
  const unknownFields = dependence.sharedFactors.flatMap((factor, index) =>
    factor.fieldIds.flatMap((id, place) =>
      fieldIds.has(id)
        ? []
        : [
            {
              input: `sharedFactors.${index}.fieldIds.${place}`,
              message: "There is no such field.",
            },
          ],
    ),
  );
  const problems = [...unknownBasins, ...unknownFields, ...checkDependence(dependence, fields)];
  if (problems.length === 0) return;
  throw new InvalidInputError(
    problems.map(({ input, message }) => ({
      pointer: toPointer(input, "dependence"),
      detail: message,
    })),
  );
}

/**
 * Refuse to move a field into a basin where a set would ask for more than the field can share. Nobody saves a set until
 * the transaction ends: a set that was checked against the old basin could not be had in the new one.
 *
 * @throws {InvalidInputError} naming the sets
 */
export async function assertFieldFitsSets(
  field: { id: string; basinId: string },
  transaction: Transaction,
): Promise<void> {
  await lockDependenceSets(transaction);
  const [sets, fields] = await Promise.all([
    listAllDependenceSets({ transaction }),
    listPlacedFields({ transaction }),
  ]);
  const basins = new Map(fields.map(({ basinId, basinName }) => [basinId, basinName]));
  const moved = fields
    .filter(({ id }) => id === field.id)
    .map((placed) => ({
      ...placed,
      basinId: field.basinId,
      basinName: basins.get(field.basinId) ?? "the new basin",
    }));
  const problems = sets.flatMap(({ name, dependence }) =>
    checkDependence(dependence, moved)
      .filter(({ input }) => input.endsWith(".fieldIds"))
      .map(({ message }) => ({
        pointer: "#/basinId",
        detail: `Dependence set ${name}: ${message}`,
      })),
  );
  if (problems.length > 0) throw new InvalidInputError(problems);
}
