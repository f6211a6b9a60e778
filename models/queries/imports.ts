import { Op, fn, col, where, type CreationAttributes, type Transaction } from "sequelize";
import { Basin, Estimate, Field, FluidSample, Import, Reservoir, User } from "../associations";
import { openEstimateStates } from "../vocabulary";

interface Options {
  transaction?: Transaction;
  lock?: boolean;
}

const creator = { model: User, as: "creator", attributes: ["id", "name"] };

export async function createImportRow(
  values: CreationAttributes<Import>,
  options: { transaction: Transaction },
): Promise<Import> {
  return Import.create(values, options);
}

/** The bare row with its report, for changing it. */
export async function findImport(id: string, options: Options = {}): Promise<Import | null> {
  return Import.findByPk(id, options);
}

/** The import with its report and who brought it in. */
export async function findImportWithCreator(id: string): Promise<Import | null> {
  return Import.findByPk(id, { include: [creator] });
}

/** Imports newest first, without their reports, which can be megabytes. */
export async function listImportsPage(page: {
  limit: number;
  offset: number;
}): Promise<{ rows: Import[]; count: number }> {
  return Import.findAndCountAll({
    attributes: { exclude: ["report"] },
    include: [creator],
    order: [
      ["createdAt", "DESC"],
      ["id", "ASC"],
    ],
    distinct: true,
    ...page,
  });
}

/** The last import of the very same bytes that was taken into the book, apart from one. */
export async function findAppliedTwin(sha256: string, exceptId: string): Promise<Import | null> {
  return Import.findOne({
    attributes: { exclude: ["report"] },
    where: { sha256, id: { [Op.ne]: exceptId }, state: { [Op.in]: ["applying", "applied"] } },
    include: [creator],
    order: [["createdAt", "DESC"]],
  });
}

/** One import at a time writes to the book; the lock goes with the transaction. */
export async function lockImports(transaction: Transaction): Promise<void> {
  await Import.sequelize?.query("select pg_advisory_xact_lock(hashtext('dewledger.imports'))", {
    transaction,
  });
}

export async function listBasinsForImport(options: Options = {}): Promise<Basin[]> {
  return Basin.findAll(options);
}

/** The fields that carry one of these names or addresses, with basins, reservoirs and samples. */
export async function listFieldsForImport(
  names: readonly string[],
  slugs: readonly string[],
  options: Options = {},
): Promise<Field[]> {
  return Field.findAll({
    where: {
      [Op.or]: [
        where(fn("lower", col("Field.name")), {
          [Op.in]: names.map((name) => name.toLowerCase()),
        }),
        { slug: { [Op.in]: [...slugs] } },
      ],
    },
    include: [
      { model: Basin, as: "basin" },
      {
        model: Reservoir,
        as: "reservoirs",
        include: [{ model: FluidSample, as: "fluidSamples" }],
      },
    ],
    ...options,
  });
}

/** The approved and the open revision of each of these reservoirs, with inputs and without results. */
export async function listCurrentEstimates(
  reservoirIds: readonly string[],
  options: Options = {},
): Promise<Estimate[]> {
  return Estimate.findAll({
    where: {
      reservoirId: { [Op.in]: [...reservoirIds] },
      state: { [Op.in]: [...openEstimateStates, "approved"] },
    },
    attributes: { exclude: ["summary"] },
    include: [{ model: User, as: "creator", attributes: ["id", "name"] }],
    order: [["revision", "ASC"]],
    ...options,
  });
}

/** Write how far an import is, without touching anything else of it. */
export async function recordImportProgress(
  id: string,
  values: Partial<Pick<Import, "progress" | "state">> & { updatedAt: Date },
  options: { transaction: Transaction },
): Promise<void> {
  await Import.update(values, { where: { id }, ...options });
}
