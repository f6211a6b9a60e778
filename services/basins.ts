import type { Basin } from "@/models/basin";
import { createBasinRow, findBasin, listAllBasins } from "@/models/queries/basins";
import { changesBetween, recordAudit } from "./audit";
import { now } from "./clock";
import { NotFoundError } from "./errors";
import { authorise, type Actor } from "./policy";
import { slugOf } from "./slugs";
import { inTransaction } from "./transaction";
import { assertVersion, saveVersioned } from "./versions";

export interface NewBasin {
  name: string;
}

export async function listBasins(actor: Actor): Promise<Basin[]> {
  authorise(actor, "basin.read");
  return listAllBasins();
}

export async function createBasin(actor: Actor, input: NewBasin): Promise<Basin> {
  authorise(actor, "basin.create");
  const values = { name: input.name.trim(), slug: slugOf(input.name) };
  return inTransaction(async (transaction) => {
    const at = now();
    const basin = await createBasinRow(
      { ...values, createdAt: at, updatedAt: at },
      { transaction },
    );
    await recordAudit(
      { actor, action: "basin.created", entity: "basin", entityId: basin.id, after: values },
      transaction,
    );
    return basin;
  });
}

/** Change the name. The address (slug) stays, so that links keep working. */
export async function updateBasin(
  actor: Actor,
  id: string,
  patch: Partial<NewBasin>,
  expectedVersion: number,
): Promise<Basin> {
  authorise(actor, "basin.update");
  return inTransaction(async (transaction) => {
    const basin = await findBasin(id, { transaction, lock: true });
    if (!basin) throw new NotFoundError("basin");
    assertVersion(basin, expectedVersion);
    const changes = changesBetween({ name: basin.name }, { name: patch.name?.trim() });
    basin.set(changes.after);
    await saveVersioned(basin, transaction);
    await recordAudit(
      { actor, action: "basin.updated", entity: "basin", entityId: id, ...changes },
      transaction,
    );
    return basin;
  });
}
