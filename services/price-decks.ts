import type { Transaction } from "sequelize";
import type { PriceDeck } from "@/models/price-deck";
import {
  createPriceDeckRow,
  deletePriceDeck,
  findLatestDeckVersion,
  findPriceDeck,
  findPriceDeckWithPrices,
  listPriceDecksPage,
  listPricesOfDeck,
  replacePrices,
} from "@/models/queries/price-decks";
import {
  priceCases,
  priceUnits,
  type PriceCase,
  type PriceDeckState,
  type Product,
} from "@/models/vocabulary";
import { changesBetween, recordAudit } from "./audit";
import { now } from "./clock";
import { ConflictError, InvalidInputError, NotFoundError, type InputProblem } from "./errors";
import { toPage, type Page, type PageRequest } from "./paging";
import { authorise, type Actor } from "./policy";
import { inTransaction } from "./transaction";
import { assertVersion, saveVersioned } from "./versions";

/** A flat real price: condensate per STB, gas per Mscf, plant liquids per barrel, in the deck's currency. */
export interface DeckPrice {
  product: Product;
  priceCase: PriceCase;
  /** at the market */
  benchmark: number;
  /** added to the benchmark for quality and place; usually negative for condensate */
  differential: number;
}

export interface NewPriceDeck {
  /** a second deck of the same name becomes its next version */
  name: string;
  /** ISO 4217 */
  currency: string;
  /** the date whose view of prices this is, `YYYY-MM-DD` */
  asOfOn: string;
  note?: string;
  prices?: DeckPrice[];
}

export type PriceDeckPatch = Partial<Omit<NewPriceDeck, "name">>;

export async function listPriceDecks(
  actor: Actor,
  filter: { state?: PriceDeckState },
  page: PageRequest,
): Promise<Page<PriceDeck>> {
  authorise(actor, "priceDeck.read");
  return toPage(await listPriceDecksPage(filter, page), page);
}

export async function getPriceDeck(actor: Actor, id: string): Promise<PriceDeck> {
  authorise(actor, "priceDeck.read");
  return reload(id);
}

async function reload(id: string, transaction?: Transaction): Promise<PriceDeck> {
  const deck = await findPriceDeckWithPrices(id, { transaction });
  if (!deck) throw new NotFoundError("price deck");
  return deck;
}

async function lockDraft(
  id: string,
  expectedVersion: number,
  transaction: Transaction,
): Promise<PriceDeck> {
  const deck = await findPriceDeck(id, { transaction, lock: true });
  if (!deck) throw new NotFoundError("price deck");
  if (deck.version !== expectedVersion) {
    assertVersion(await reload(id, transaction), expectedVersion);
  }
  if (deck.state === "published") {
    throw new ConflictError(
      "This price deck is published and cannot be changed. Make a new version.",
      "immutable",
    );
  }
  return deck;
}

function withUnits(prices: DeckPrice[]) {
  assertOneOfEach(prices);
  return prices.map(({ product, priceCase, benchmark, differential }) => ({
    product,
    priceCase,
    benchmark,
    differential,
    unit: priceUnits[product],
  }));
}

function assertOneOfEach(prices: DeckPrice[]): void {
  const seen = new Set<string>();
  prices.forEach(({ product, priceCase }, index) => {
    const key = `${product} ${priceCase}`;
    if (seen.has(key)) {
      throw new InvalidInputError([
        { pointer: `#/prices/${index}`, detail: `there are two ${priceCase} prices of ${product}` },
      ]);
    }
    seen.add(key);
  });
}

/** Begin a deck, or the next version of one. */
export async function createPriceDeck(actor: Actor, input: NewPriceDeck): Promise<PriceDeck> {
  authorise(actor, "priceDeck.create");
  const { prices = [], ...plain } = input;
  const rows = withUnits(prices);
  return inTransaction(async (transaction) => {
    const name = plain.name.trim();
    const at = now();
    const values = {
      ...plain,
      name,
      versionNumber: (await findLatestDeckVersion(name, transaction)) + 1,
      state: "draft" as const,
      createdBy: actor.id,
    };
    const deck = await createPriceDeckRow(
      { ...values, createdAt: at, updatedAt: at },
      { transaction },
    );
    await replacePrices(deck.id, rows, { transaction });
    await recordAudit(
      {
        actor,
        action: "priceDeck.created",
        entity: "priceDeck",
        entityId: deck.id,
        after: { ...values, prices },
      },
      transaction,
    );
    return reload(deck.id, transaction);
  });
}

/** Change a draft; `prices` replaces all of them. */
export async function updatePriceDeck(
  actor: Actor,
  id: string,
  patch: PriceDeckPatch,
  expectedVersion: number,
): Promise<PriceDeck> {
  authorise(actor, "priceDeck.update");
  const { prices, ...plain } = patch;
  const rows = prices && withUnits(prices);
  return inTransaction(async (transaction) => {
    const deck = await lockDraft(id, expectedVersion, transaction);
    const { currency, asOfOn, note } = deck;
    const changes = changesBetween({ currency, asOfOn, note }, plain);
    const before = rows ? (await listPricesOfDeck(id, transaction)).map(toDeckPrice) : undefined;
    deck.set(changes.after);
    await saveVersioned(deck, transaction);
    if (rows) await replacePrices(id, rows, { transaction });
    await recordAudit(
      {
        actor,
        action: "priceDeck.updated",
        entity: "priceDeck",
        entityId: id,
        before: { ...changes.before, ...(before && { prices: before }) },
        after: { ...changes.after, ...(prices && { prices }) },
      },
      transaction,
    );
    return reload(id, transaction);
  });
}

/** Throw a draft away that was never published; the audit trail keeps what it held. */
export async function discardPriceDeck(
  actor: Actor,
  id: string,
  expectedVersion: number,
): Promise<void> {
  authorise(actor, "priceDeck.update");
  await inTransaction(async (transaction) => {
    const deck = await lockDraft(id, expectedVersion, transaction);
    const { name, versionNumber, currency, asOfOn, note } = deck;
    const prices = (await listPricesOfDeck(id, transaction)).map(toDeckPrice);
    await deletePriceDeck(deck, { transaction });
    await recordAudit(
      {
        actor,
        action: "priceDeck.discarded",
        entity: "priceDeck",
        entityId: id,
        before: { name, versionNumber, currency, asOfOn, note, prices },
      },
      transaction,
    );
  });
}

/**
 * Publish a deck, for good. It needs condensate and gas in all three cases; plant liquids may be left out whole.
 *
 * @throws {InvalidInputError} when a price is missing, or a case is out of order
 */
export async function publishPriceDeck(
  actor: Actor,
  id: string,
  expectedVersion: number,
): Promise<PriceDeck> {
  authorise(actor, "priceDeck.publish");
  return inTransaction(async (transaction) => {
    const deck = await lockDraft(id, expectedVersion, transaction);
    const problems = publicationProblems(await listPricesOfDeck(id, transaction));
    if (problems.length > 0) throw new InvalidInputError(problems);
    deck.set({ state: "published", publishedBy: actor.id, publishedAt: now() });
    await saveVersioned(deck, transaction);
    await recordAudit(
      {
        actor,
        action: "priceDeck.published",
        entity: "priceDeck",
        entityId: id,
        before: { state: "draft" },
        after: { state: "published" },
      },
      transaction,
    );
    return reload(id, transaction);
  });
}

/** Why a deck with these prices cannot be published; empty when it can. */
export function publicationProblems(prices: DeckPrice[]): InputProblem[] {
  const realised = (product: Product, priceCase: PriceCase) => {
    const found = prices.find(
      (price) => price.product === product && price.priceCase === priceCase,
    );
    return found && found.benchmark + found.differential;
  };
  const wanted: Product[] = ["condensate", "gas"];
  if (prices.some(({ product }) => product === "plant_liquids")) wanted.push("plant_liquids");

  return wanted.flatMap((product) => {
    const values = priceCases.map((priceCase) => realised(product, priceCase));
    const missing = priceCases.filter((_, index) => values[index] === undefined);
    const name = product.replace("_", " ");
    if (missing.length > 0) {
      return [{ pointer: "#/prices", detail: `${name} has no ${missing.join(" and no ")} price` }];
    }
    const [low = 0, mid = 0, high = 0] = values;
    if (low < 0) {
      return [
        { pointer: "#/prices", detail: `${name}: benchmark plus differential is below zero` },
      ];
    }
    return low <= mid && mid <= high
      ? []
      : [{ pointer: "#/prices", detail: `${name}: low, mid and high are not in ascending order` }];
  });
}

function toDeckPrice({ product, priceCase, benchmark, differential }: DeckPrice): DeckPrice {
  return { product, priceCase, benchmark, differential };
}
