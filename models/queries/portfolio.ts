import { QueryTypes, type Transaction } from "sequelize";
import type { RecoveryRoute } from "@/analytics/recovery/recovery-curve-schema";
import type { ProducingConcept } from "@/analytics/recovery/recovery-plan-schema";
import type { VectorName } from "@/analytics/volumetrics/results-schema";
import { EstimateTrials } from "../associations";
import { sequelize } from "../sequelize";
import type { EstimateState, PrmsClass, PrmsSubClass } from "../vocabulary";

/** A field with what a ranking shows of it. */
export interface PortfolioFieldRow {
  id: string;
  slug: string;
  name: string;
  basinId: string;
  basinSlug: string;
  basinName: string;
  operator: string;
  workingInterest: number;
  netRevenueInterest: number;
  prmsClass: PrmsClass;
  prmsSubClass: PrmsSubClass;
  chanceOfCommerciality: number;
  engineerId: string | null;
  engineerName: string | null;
}

/** A reservoir with the revision a basis chooses, and the revision that is being worked on. */
export interface PortfolioReservoirRow {
  id: string;
  fieldId: string;
  slug: string;
  name: string;
  /** null when no revision of this reservoir fits the basis */
  estimateId: string | null;
  revision: number | null;
  state: EstimateState | null;
  seed: number | null;
  trials: number | null;
  engineVersion: string | null;
  /** business date of an approval (YYYY-MM-DD), null while open */
  effectiveOn: string | null;
  computedAt: Date | null;
  hydrogenSulphide: number | null;
  /** of the chosen revision; null when its recoveries were entered */
  recoveryRoute: RecoveryRoute | null;
  producingConcept: ProducingConcept | null;
  /** codes of warnings with severity `caution`, of the chosen revision */
  cautionCodes: string[];
  /** mean recoverable condensate of the chosen and of the open revision, STB, gross */
  condensateMeanStb: number | null;
  openCondensateMeanStb: number | null;
  openRevision: number | null;
  openState: EstimateState | null;
  openSubmittedAt: Date | null;
  openDecidedAt: Date | null;
  openUpdatedAt: Date | null;
  sampleCount: number;
}

/** Every field, by name. */
export async function listPortfolioFields(): Promise<PortfolioFieldRow[]> {
  return sequelize.query<PortfolioFieldRow>(
    `select f.id, f.slug, f.name, b.id as "basinId", b.slug as "basinSlug", b.name as "basinName",
            f.operator,
            f.working_interest as "workingInterest", f.net_revenue_interest as "netRevenueInterest",
            f.prms_class as "prmsClass", f.prms_sub_class as "prmsSubClass",
            f.chance_of_commerciality as "chanceOfCommerciality",
            u.id as "engineerId", u.name as "engineerName"
       from fields f
       join basins b on b.id = f.basin_id
       left join users u on u.id = f.responsible_engineer_id
      order by lower(f.name)`,
    { type: QueryTypes.SELECT },
  );
}

/** Where every field lies, in no order. */
export async function listPlacedFields(
  options: { transaction?: Transaction } = {},
): Promise<Pick<PortfolioFieldRow, "id" | "name" | "basinId" | "basinName">[]> {
  return sequelize.query(
    `select f.id, f.name, b.id as "basinId", b.name as "basinName"
       from fields f join basins b on b.id = f.basin_id`,
    { type: QueryTypes.SELECT, ...options },
  );
}

/** Which revision stands for a reservoir: the approved one, or the newest that has results, drafts included. */
export type EstimateChoice = "approved" | "latest";

const choices: Record<EstimateChoice, string> = {
  approved: `e.state = 'approved'`,
  latest: `e.summary is not null and e.state <> 'superseded'`,
};

/**
 * Every reservoir with its chosen and its open revision, in one statement.
 *
 * @param choice  `approved`, or `latest`: the newest revision that was computed and is not superseded
 */
export async function listPortfolioReservoirs(
  choice: EstimateChoice,
): Promise<PortfolioReservoirRow[]> {
  return sequelize.query<PortfolioReservoirRow>(
    `select r.id, r.field_id as "fieldId", r.slug, r.name,
            chosen.id as "estimateId", chosen.revision, chosen.state, chosen.seed, chosen.trials,
            chosen.engine_version as "engineVersion", chosen.effective_on::text as "effectiveOn",
            chosen.computed_at as "computedAt",
            (chosen.inputs #>> '{fluid,hydrogenSulphide}')::double precision as "hydrogenSulphide",
            chosen.inputs #>> '{recoveryPlan,curve,route}' as "recoveryRoute",
            chosen.inputs #>> '{recoveryPlan,concept}' as "producingConcept",
            coalesce(array(select distinct jsonb_path_query(
              chosen.summary, '$.warnings[*] ? (@.severity == "caution").code') #>> '{}'),
              '{}') as "cautionCodes",
            (chosen.summary #>> '{results,condensateRecoverableStb,mean}')::double precision
              as "condensateMeanStb",
            (open.summary #>> '{results,condensateRecoverableStb,mean}')::double precision
              as "openCondensateMeanStb",
            open.revision as "openRevision", open.state as "openState",
            open.submitted_at as "openSubmittedAt", open.decided_at as "openDecidedAt",
            open.updated_at as "openUpdatedAt",
            (select count(*)::int from fluid_samples s where s.reservoir_id = r.id) as "sampleCount"
       from reservoirs r
       left join lateral (
         select e.* from estimates e
          where e.reservoir_id = r.id and ${choices[choice]}
          order by e.revision desc limit 1) chosen on true
       left join lateral (
         select e.revision, e.state, e.summary, e.submitted_at, e.decided_at, e.updated_at
           from estimates e
          where e.reservoir_id = r.id and e.state in ('draft', 'submitted', 'returned')
          order by e.revision desc limit 1) open on true
      order by r.field_id, lower(r.name)`,
    { type: QueryTypes.SELECT },
  );
}

/** What was approved for a reservoir on a day: its means, gross, in STB and scf. */
export interface PastEstimateRow {
  reservoirId: string;
  revision: number;
  condensateMeanStb: number;
  salesGasMeanScf: number;
}

/**
 * The revision that was in force for each reservoir on a date, of those that had one.
 *
 * @param date  YYYY-MM-DD
 */
export async function listEstimatesInForceOn(date: string): Promise<PastEstimateRow[]> {
  return sequelize.query<PastEstimateRow>(
    `select distinct on (reservoir_id) reservoir_id as "reservoirId", revision,
            (summary #>> '{results,condensateRecoverableStb,mean}')::double precision
              as "condensateMeanStb",
            (summary #>> '{results,salesGasScf,mean}')::double precision as "salesGasMeanScf"
       from estimates
      where effective_on <= :date
      order by reservoir_id, revision desc`,
    { type: QueryTypes.SELECT, replacements: { date } },
  );
}

/** Stored trials of some revisions, only the quantities asked for; little-endian float32. */
export async function listTrialVectors<Name extends VectorName>(
  estimateIds: readonly string[],
  quantities: readonly Name[],
): Promise<({ estimateId: string; trials: number } & Record<Name, Buffer>)[]> {
  const rows = await EstimateTrials.findAll({
    where: { estimateId: [...estimateIds] },
    attributes: ["estimateId", "trials", ...quantities],
    raw: true,
  });
  return rows as unknown as ({ estimateId: string; trials: number } & Record<Name, Buffer>)[];
}
