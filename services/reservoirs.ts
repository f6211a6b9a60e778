import type { Transaction } from "sequelize";
import type { Estimate } from "@/models/estimate";
import type { FluidSample } from "@/models/fluid-sample";
import type { Reservoir } from "@/models/reservoir";
import {
  findApprovedEstimate,
  findOpenEstimate,
  listEstimatesOfReservoir,
} from "@/models/queries/estimates";
import { findField, findFieldBySlug } from "@/models/queries/fields";
import { listFluidSamplesOfReservoir } from "@/models/queries/fluid-samples";
import {
  createReservoirRow,
  findReservoir,
  findReservoirBySlug,
  findReservoirWithField,
} from "@/models/queries/reservoirs";
import { changesBetween, recordAudit } from "./audit";
import { now } from "./clock";
import { InvalidInputError, NotFoundError } from "./errors";
import { authorise, type Actor } from "./policy";
import { slugOf } from "./slugs";
import { inTransaction } from "./transaction";
import { assertVersion, saveVersioned } from "./versions";

export interface NewReservoir {
  fieldId: string;
  name: string;
  /** ft subsea or below mudline */
  depthFt?: number | null;
}

/** A reservoir with all that its screen shows. */
export interface ReservoirFile {
  reservoir: Reservoir;
  approved: Estimate | null;
  open: Estimate | null;
  /** every revision, newest first, without inputs and summary */
  history: Estimate[];
  fluidSamples: FluidSample[];
}

export async function getReservoirFile(actor: Actor, id: string): Promise<ReservoirFile> {
  authorise(actor, "reservoir.read");
  const [reservoir, approved, open, history, fluidSamples] = await Promise.all([
    findReservoirWithField(id),
    findApprovedEstimate(id),
    findOpenEstimate(id),
    listEstimatesOfReservoir(id),
    listFluidSamplesOfReservoir(id),
  ]);
  if (!reservoir) throw new NotFoundError("reservoir");
  return { reservoir, approved, open, history, fluidSamples };
}

/** The same by the words of its address: `/fields/<fieldSlug>/<reservoirSlug>`. */
export async function getReservoirFileBySlugs(
  actor: Actor,
  fieldSlug: string,
  reservoirSlug: string,
): Promise<ReservoirFile> {
  authorise(actor, "reservoir.read");
  const field = await findFieldBySlug(fieldSlug);
  const reservoir = field && (await findReservoirBySlug(field.id, reservoirSlug));
  if (!reservoir) throw new NotFoundError("reservoir");
  return getReservoirFile(actor, reservoir.id);
}

export async function createReservoir(actor: Actor, input: NewReservoir): Promise<Reservoir> {
  authorise(actor, "reservoir.create");
  const values = {
    fieldId: input.fieldId,
    name: input.name.trim(),
    slug: slugOf(input.name),
    depthFt: input.depthFt ?? null,
  };
  return inTransaction(async (transaction) => {
    if (!(await findField(input.fieldId, { transaction }))) {
      throw new InvalidInputError([{ pointer: "#/fieldId", detail: "There is no such field." }]);
    }
    const at = now();
    const reservoir = await createReservoirRow(
      { ...values, createdAt: at, updatedAt: at },
      { transaction },
    );
    await recordAudit(
      {
        actor,
        action: "reservoir.created",
        entity: "reservoir",
        entityId: reservoir.id,
        after: values,
      },
      transaction,
    );
    return reload(reservoir.id, transaction);
  });
}

async function reload(id: string, transaction: Transaction): Promise<Reservoir> {
  const reservoir = await findReservoirWithField(id, { transaction });
  if (!reservoir) throw new NotFoundError("reservoir");
  return reservoir;
}

/** Change a reservoir. The address (slug) stays, so that links keep working. */
export async function updateReservoir(
  actor: Actor,
  id: string,
  patch: Partial<Omit<NewReservoir, "fieldId">>,
  expectedVersion: number,
): Promise<Reservoir> {
  authorise(actor, "reservoir.update");
  return inTransaction(async (transaction) => {
    const reservoir = await findReservoir(id, { transaction, lock: true });
    if (!reservoir) throw new NotFoundError("reservoir");
    if (reservoir.version !== expectedVersion) {
      assertVersion(await reload(id, transaction), expectedVersion);
    }
    const changes = changesBetween(
      { name: reservoir.name, depthFt: reservoir.depthFt },
      { ...patch, name: patch.name?.trim() },
    );
    reservoir.set(changes.after);
    await saveVersioned(reservoir, transaction);
    await recordAudit(
      { actor, action: "reservoir.updated", entity: "reservoir", entityId: id, ...changes },
      transaction,
    );
    return reload(id, transaction);
  });
}
