import type { Transaction } from "sequelize";
import {
  listBasinsForImport,
  listCurrentEstimates,
  listFieldsForImport,
} from "@/models/queries/imports";
import type { Estimate } from "@/models/estimate";
import type { Field } from "@/models/field";
import type { Reservoir } from "@/models/reservoir";
import { nameKey } from "./name-key";
import type { Book, BookEstimate, BookField, BookReservoir } from "./plan";

function toEstimate(estimate: Estimate): BookEstimate {
  const { id, revision, version, state, createdBy, inputs } = estimate;
  return {
    id,
    revision,
    version,
    state,
    createdBy,
    createdByName: estimate.creator?.name ?? "Somebody",
    inputs,
  };
}

function toReservoir(reservoir: Reservoir, estimates: readonly Estimate[]): BookReservoir {
  const { id, slug, name, version, depthFt } = reservoir;
  const own = estimates.filter((estimate) => estimate.reservoirId === id);
  const latest = own.find(({ state }) => state !== "approved") ?? own.at(-1);
  return {
    id,
    slug,
    name,
    version,
    depthFt,
    latest: latest ? toEstimate(latest) : null,
    samples: (reservoir.fluidSamples ?? []).map((sample) => ({
      id: sample.id,
      version: sample.version,
      name: sample.name,
      sampledOn: sample.sampledOn,
      laboratory: sample.laboratory,
      separatorTest: sample.separatorTest,
    })),
  };
}

function toField(field: Field, estimates: readonly Estimate[]): BookField {
  const { id, slug, name, version } = field;
  return {
    id,
    slug,
    name,
    version,
    basinName: field.basin?.name ?? "",
    data: {
      operator: field.operator,
      workingInterest: field.workingInterest,
      netRevenueInterest: field.netRevenueInterest,
      prmsClass: field.prmsClass,
      prmsSubClass: field.prmsSubClass,
      chanceOfCommerciality: field.chanceOfCommerciality,
    },
    reservoirs: new Map(
      (field.reservoirs ?? []).flatMap((reservoir) => {
        const entry = toReservoir(reservoir, estimates);
        return keysOf(reservoir).map((key): [string, BookReservoir] => [key, entry]);
      }),
    ),
  };
}

/** A record is found by its name and by its address: a renamed one keeps the address it was made with. */
const keysOf = (record: { name: string; slug: string }): string[] => [
  record.slug,
  nameKey(record.name),
];

/** What the book holds of the fields that rows name. */
export async function loadBook(
  rows: readonly { field: string }[],
  transaction?: Transaction,
): Promise<Book> {
  const names = [...new Set(rows.map((row) => row.field))];
  const [basins, fields] = [
    await listBasinsForImport({ transaction }),
    await listFieldsForImport(names, [...new Set(names.map(nameKey))], { transaction }),
  ];
  const reservoirIds = fields.flatMap((field) => (field.reservoirs ?? []).map(({ id }) => id));
  const estimates = await listCurrentEstimates(reservoirIds, { transaction });
  return {
    basins: new Map(
      basins.flatMap((basin) =>
        keysOf(basin).map((key): [string, { id: string; name: string }] => [
          key,
          { id: basin.id, name: basin.name },
        ]),
      ),
    ),
    fields: new Map(
      fields.flatMap((field) => {
        const entry = toField(field, estimates);
        return keysOf(field).map((key): [string, BookField] => [key, entry]);
      }),
    ),
  };
}
