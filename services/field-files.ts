import type { RankedField } from "@/analytics/portfolio/ranking";
import type { Field } from "@/models/field";
import type { Reservoir } from "@/models/reservoir";
import { findField, findFieldBySlug } from "@/models/queries/fields";
import { listReservoirsOfField } from "@/models/queries/reservoirs";
import { listRevisionRanges, type RevisionRangeRow } from "@/models/queries/revision-ranges";
import { NotFoundError } from "./errors";
import { authorise, type Actor } from "./policy";
import type { ChosenPrices, PortfolioBasis } from "./portfolio/basis";
import { describeDependence } from "./portfolio/dependence";
import { loadRanking } from "./portfolio/ranking";
import { getReservoirFileBySlugs, type ReservoirFile } from "./reservoirs";

/** A field with its reservoirs, every revision of each, and what the field comes to on a basis. */
export interface FieldFile {
  field: Field;
  reservoirs: { reservoir: Reservoir; revisions: RevisionRangeRow[] }[];
  /** its row of the ranking; figures are null when no revision fits the basis */
  ranked: RankedField;
  fieldsInAll: number;
  prices: ChosenPrices | null;
  dependence: { id: string; name: string; isDefault: boolean };
}

/**
 * A field with all that its page shows, by its id or by the word of its address.
 *
 * @throws {NotFoundError}
 */
export async function getFieldFile(
  actor: Actor,
  idOrSlug: string,
  basis: PortfolioBasis,
): Promise<FieldFile> {
  authorise(actor, "field.read");
  const slug = isUuid(idOrSlug) ? (await findField(idOrSlug))?.slug : idOrSlug;
  const field = slug === undefined ? null : await findFieldBySlug(slug);
  if (!field) throw new NotFoundError("field");
  const reservoirs = await listReservoirsOfField(field.id);
  const [revisions, book] = await Promise.all([
    listRevisionRanges(reservoirs.map(({ id }) => id)),
    loadRanking(basis),
  ]);
  const ranked = book.fields.find(({ id }) => id === field.id);
  if (!ranked) throw new NotFoundError("field");
  return {
    field,
    ranked,
    fieldsInAll: book.fields.length,
    prices: book.prices,
    dependence: describeDependence(book.book.dependence),
    reservoirs: reservoirs.map((reservoir) => ({
      reservoir,
      revisions: revisions.filter((row) => row.reservoirId === reservoir.id),
    })),
  };
}

/** A reservoir with all that its page shows, ranges of its revisions included, by the words of its address. */
export async function getReservoirPage(
  actor: Actor,
  fieldSlug: string,
  reservoirSlug: string,
): Promise<{ file: ReservoirFile; revisions: RevisionRangeRow[] }> {
  const file = await getReservoirFileBySlugs(actor, fieldSlug, reservoirSlug);
  return { file, revisions: await listRevisionRanges([file.reservoir.id]) };
}

const isUuid = (text: string) =>
  /^[0-9a-f]{8}-[0-9a-f]{4}-[0-9a-f]{4}-[0-9a-f]{4}-[0-9a-f]{12}$/i.test(text);
