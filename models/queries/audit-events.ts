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

export async function listAuditEventsPage(
  filter: AuditFilter,
  page: { limit: number; offset: number },
): Promise<{ rows: AuditEvent[]; count: number }> {
  const where: WhereOptions<AuditEvent> = {
    ...(filter.entity && { entity: filter.entity }),
    ...(filter.entityId && { entityId: filter.entityId }),
    ...(filter.actorId && { actorId: filter.actorId }),
    ...((filter.from ?? filter.to) && {
      at: {
        ...(filter.from && { [Op.gte]: filter.from }),
        ...(filter.to && { [Op.lt]: filter.to }),
      },
    }),
  };
  return AuditEvent.findAndCountAll({
    where,
    include: [{ model: User, as: "actor", attributes: ["id", "name"] }],
    order: [["id", "DESC"]],
    ...page,
  });
}
