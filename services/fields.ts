import type { Transaction } from "sequelize";
import type { Field } from "@/models/field";
import { createFieldRow, findField, findFieldWithParents } from "@/models/queries/fields";
import { findUser } from "@/models/queries/users";
import { prmsSubClasses, type PrmsClass, type PrmsSubClass } from "@/models/vocabulary";
import { changesBetween, recordAudit } from "./audit";
import { now } from "./clock";
import { assertFieldFitsSets } from "./dependence-sets";
import { InvalidInputError, NotFoundError } from "./errors";
import { authorise, type Actor } from "./policy";
import { slugOf } from "./slugs";
import { inTransaction } from "./transaction";
import { assertVersion, saveVersioned } from "./versions";

export interface NewField {
  name: string;
  basinId: string;
  operator: string;
  /** decimal degrees, WGS 84; both or neither */
  latitude?: number | null;
  longitude?: number | null;
  /** null on land */
  waterDepthFt?: number | null;
  /** share of the costs, 0 to 1 */
  workingInterest: number;
  /** share of the revenue after royalty, 0 to 1 */
  netRevenueInterest: number;
  prmsClass: PrmsClass;
  prmsSubClass: PrmsSubClass;
  /** 0 to 1 */
  chanceOfCommerciality: number;
  responsibleEngineerId?: string | null;
  notes?: string;
}

export type FieldPatch = Partial<NewField>;

/** Attributes that turn volumes into the company's money; changing them is the planners' work. */
const commercial = ["workingInterest", "netRevenueInterest", "chanceOfCommerciality"] as const;

/** The field with its basin and responsible engineer. */
export async function getField(actor: Actor, id: string): Promise<Field> {
  authorise(actor, "field.read");
  const field = await findFieldWithParents(id);
  if (!field) throw new NotFoundError("field");
  return field;
}

export async function createField(actor: Actor, input: NewField): Promise<Field> {
  authorise(actor, "field.create");
  const values = { ...input, name: input.name.trim(), slug: slugOf(input.name) };
  return inTransaction(async (transaction) => {
    await assertCoherent(values, transaction);
    const at = now();
    const field = await createFieldRow(
      { ...values, createdAt: at, updatedAt: at },
      { transaction },
    );
    await recordAudit(
      { actor, action: "field.created", entity: "field", entityId: field.id, after: values },
      transaction,
    );
    return (await findFieldWithParents(field.id, { transaction })) ?? field;
  });
}

/** Change a field. The address (slug) stays, so that links keep working. */
export async function updateField(
  actor: Actor,
  id: string,
  patch: FieldPatch,
  expectedVersion: number,
): Promise<Field> {
  authorise(actor, "field.update");
  return inTransaction(async (transaction) => {
    const field = await findField(id, { transaction, lock: true });
    if (!field) throw new NotFoundError("field");
    if (field.version !== expectedVersion) {
      assertVersion((await findFieldWithParents(id, { transaction })) ?? field, expectedVersion);
    }
    const before: NewField = field.get({ plain: true });
    const changes = changesBetween(before, { ...patch, name: patch.name?.trim() });
    if (commercial.some((name) => name in changes.after))
      authorise(actor, "field.updateCommercial");
    await assertCoherent({ ...before, ...changes.after }, transaction, changes.after);
    if (changes.after.basinId !== undefined) {
      await assertFieldFitsSets({ id, basinId: changes.after.basinId }, transaction);
    }
    field.set(changes.after);
    await saveVersioned(field, transaction);
    await recordAudit(
      { actor, action: "field.updated", entity: "field", entityId: id, ...changes },
      transaction,
    );
    return (await findFieldWithParents(id, { transaction })) ?? field;
  });
}

/**
 * What the columns cannot say one by one.
 *
 * @param changed  what is being set; a person who left the role since may stay where they are
 */
async function assertCoherent(
  field: NewField,
  transaction: Transaction,
  changed: FieldPatch = field,
): Promise<void> {
  const allowed: readonly string[] = prmsSubClasses[field.prmsClass];
  if (!allowed.includes(field.prmsSubClass)) {
    throw new InvalidInputError([
      {
        pointer: "#/prmsSubClass",
        detail: `is not a sub-class of ${field.prmsClass}; it has ${allowed.join(", ")}`,
      },
    ]);
  }
  if (((field.latitude ?? null) === null) !== ((field.longitude ?? null) === null)) {
    throw new InvalidInputError([
      { pointer: "#/longitude", detail: "Give both latitude and longitude, or neither." },
    ]);
  }
  if (changed.responsibleEngineerId) {
    const engineer = await findUser(changed.responsibleEngineerId, { transaction });
    if (!engineer?.active || engineer.role !== "engineer") {
      throw new InvalidInputError([
        { pointer: "#/responsibleEngineerId", detail: "must be an active engineer" },
      ]);
    }
  }
}
