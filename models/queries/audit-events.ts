import { Op, type CreationAttributes, type Transaction, type WhereOptions } from "sequelize";
import { AuditEvent, User } from "../associations";

export interface AuditFilter {
  entity?: string;
  entityId?: string;
  actorId?: string;
  /** events at or after this moment */
  from?: Date;
  /** events before this moment */
  to?: Date;
}

export async function createAuditEvent(
  values: CreationAttributes<AuditEvent>,
  options: { transaction: Transaction },
): Promise<void> {
  await AuditEvent.create(values, options);
}

/** By the moment first: work that is told afterwards (a history that is loaded) stands where it belongs. */
const newestFirst: [string, string][] = [
  ["at", "DESC"],
  ["id", "DESC"],
];

const withActor = [{ model: User, as: "actor", attributes: ["id", "name"] }];

function conditionsOf({ entity, entityId, actorId, from, to }: AuditFilter) {
  const where: WhereOptions<AuditEvent> = {
    ...(entity && { entity }),
    ...(entityId && { entityId }),
    ...(actorId && { actorId }),
    ...((from ?? to) && { at: { ...(from && { [Op.gte]: from }), ...(to && { [Op.lt]: to }) } }),
  };
  return where;
}

export async function listAuditEventsPage(
  filter: AuditFilter,
  page: { limit: number; offset: number },
): Promise<{ rows: AuditEvent[]; count: number }> {
  return AuditEvent.findAndCountAll({
    where: conditionsOf(filter),
    include: withActor,
    order: newestFirst,
    ...page,
  });
}

/**
 * Every event of a filter, newest first, a batch at a time. Each batch begins below the last event of the one before, so
 * what is written meanwhile neither repeats nor hides an event.
 */
export async function* walkAuditEvents(
  filter: AuditFilter,
  batchSize: number,
): AsyncGenerator<AuditEvent> {
  let below: WhereOptions<AuditEvent> = {};
  for (;;) {
    const batch: AuditEvent[] = await AuditEvent.findAll({
      where: { [Op.and]: [conditionsOf(filter), below] },
      include: withActor,
      order: newestFirst,
      limit: batchSize,
    });
    yield* batch;
    if (batch.length < batchSize) return;
    const { at, id }: AuditEvent = batch[batch.length - 1];
    below = { [Op.or]: [{ at: { [Op.lt]: at } }, { at, id: { [Op.lt]: id } }] };
  }
}
