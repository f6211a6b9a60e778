import type { CreationAttributes, Transaction, WhereOptions } from "sequelize";
import { PriceDeck, PriceDeckPrice, User } from "../associations";
import type { PriceDeckState } from "../vocabulary";

interface Options {
  transaction?: Transaction;
  lock?: boolean;
}

const withPrices = [
  { model: PriceDeckPrice, as: "prices", separate: true },
  { model: User, as: "creator", attributes: ["id", "name"] },
  { model: User, as: "publisher", attributes: ["id", "name"] },
];

/** The bare row, for changing it. */
export async function findPriceDeck(id: string, options: Options = {}): Promise<PriceDeck | null> {
  return PriceDeck.findByPk(id, options);
}

export async function findPriceDeckWithPrices(
  id: string,
  options: { transaction?: Transaction } = {},
): Promise<PriceDeck | null> {
  return PriceDeck.findByPk(id, { ...options, include: withPrices });
}

/** The published deck with the latest as-of date: what screens use when nobody chose one. */
export async function findCurrentPriceDeck(): Promise<PriceDeck | null> {
  return PriceDeck.findOne({
    where: { state: "published" },
    include: withPrices,
    order: [
      ["asOfOn", "DESC"],
      ["publishedAt", "DESC"],
    ],
  });
}

export async function findLatestDeckVersion(
  name: string,
  transaction: Transaction,
): Promise<number> {
  return (
    (await PriceDeck.max<number, PriceDeck>("versionNumber", { where: { name }, transaction })) ?? 0
  );
}

export async function listPriceDecksPage(
  filter: { state?: PriceDeckState },
  page: { limit: number; offset: number },
): Promise<{ rows: PriceDeck[]; count: number }> {
  const where: WhereOptions<PriceDeck> = { ...(filter.state && { state: filter.state }) };
  return PriceDeck.findAndCountAll({
    where,
    include: withPrices,
    order: [
      ["asOfOn", "DESC"],
      ["name", "ASC"],
      ["versionNumber", "DESC"],
    ],
    distinct: true,
    ...page,
  });
}

export async function createPriceDeckRow(
  values: CreationAttributes<PriceDeck>,
  options: { transaction: Transaction },
): Promise<PriceDeck> {
  return PriceDeck.create(values, options);
}

export async function listPricesOfDeck(
  priceDeckId: string,
  transaction: Transaction,
): Promise<PriceDeckPrice[]> {
  return PriceDeckPrice.findAll({ where: { priceDeckId }, transaction });
}

/** Put these prices in place of the ones the deck has. */
export async function replacePrices(
  priceDeckId: string,
  prices: Omit<CreationAttributes<PriceDeckPrice>, "priceDeckId">[],
  options: { transaction: Transaction },
): Promise<void> {
  await PriceDeckPrice.destroy({ where: { priceDeckId }, ...options });
  await PriceDeckPrice.bulkCreate(
    prices.map((price) => ({ ...price, priceDeckId })),
    options,
  );
}

/** Throw a draft away, prices and all. */
export async function deletePriceDeck(
  deck: PriceDeck,
  options: { transaction: Transaction },
): Promise<void> {
  await PriceDeckPrice.destroy({ where: { priceDeckId: deck.id }, ...options });
  await deck.destroy(options);
}
