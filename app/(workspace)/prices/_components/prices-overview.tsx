"use client";

import { useState } from "react";

import { ReadError } from "@/app/_client/read-error";
import { useCan } from "@/app/_client/use-session";
import type { PriceDeckView } from "@/app/api/v1/price-decks/schema";
import { useBasis } from "@/components/basis/use-basis";
import { Button, LinkButton } from "@/components/ui/button";
import { formatDate } from "@/components/ui/format";
import { Page, PageHead, Section, Stack } from "@/components/ui/section";
import { EmptyState, Skeleton } from "@/components/ui/status";
import { usePriceDecks } from "../_queries/price-decks";
import {
  condensateMove,
  deckName,
  formatPrice,
  previousVersion,
  priceOf,
  priceUnit,
} from "./deck-words";
import { DecksTable } from "./decks-table";
import { NewDeckDialog } from "./new-deck-dialog";
import { PriceTable } from "./price-table";

/** The deck that the basis uses, with its prices, and every version there is. */
export function PricesOverview() {
  const { basis, withBasis } = useBasis();
  const may = useCan();
  const { data: decks, error, refetch } = usePriceDecks();
  const [isNaming, setIsNaming] = useState(false);

  if (!decks) {
    return (
      <Page>
        <PageHead title="Prices" />
        {error ? (
          <ReadError error={error} onRetry={refetch}>
            The decks are kept; only this list could not be read.
          </ReadError>
        ) : (
          <Skeleton lines={10} label="Loading the price decks" />
        )}
      </Page>
    );
  }

  const published = decks.filter(({ state }) => state === "published");
  const used =
    basis.deck === "latest" ? published[0] : published.find(({ id }) => id === basis.deck);
  const begin = may("priceDeck.create") && (
    <Button kind="primary" icon="plus" onClick={() => setIsNaming(true)}>
      {decks.length > 0 ? "New version" : "Make the first deck"}
    </Button>
  );
  return (
    <Page>
      <PageHead
        title={titleOf(used, basis.case)}
        lead="Prices are flat and real: the same every year, in money of the as-of date. Values on every page are volumes at these prices, undiscounted."
        actions={decks.length > 0 && begin}
      />
      {decks.length === 0 ? (
        <EmptyState title="There is no price deck yet" action={begin}>
          Volumes need none. Values do: a planner makes a deck, fills in the prices and publishes
          it.
        </EmptyState>
      ) : (
        <Stack>
          {used && (
            <DeckInUse
              deck={used}
              before={previousVersion(used, published)}
              priceCase={basis.case}
              href={withBasis(`/prices/${used.id}`)}
            />
          )}
          <Section
            title={countsOf(decks)}
            note="A published deck never changes. A new version takes its place."
          >
            <DecksTable decks={decks} usedId={used?.id} />
          </Section>
        </Stack>
      )}
      {isNaming && <NewDeckDialog decks={decks} onClose={() => setIsNaming(false)} />}
    </Page>
  );
}

function DeckInUse({
  deck,
  before,
  priceCase,
  href,
}: {
  deck: PriceDeckView;
  before: PriceDeckView | null;
  priceCase: "low" | "mid" | "high";
  href: string;
}) {
  const move = condensateMove(deck, before);
  return (
    <Section
      title={move ? `The mid condensate price ${move}` : deckName(deck)}
      note={`${deckName(deck)}, as of ${formatDate(deck.asOfOn)}. ${deck.note}`}
      tools={
        <LinkButton kind="quiet" size="small" href={href}>
          Open
        </LinkButton>
      }
    >
      <PriceTable deck={deck} before={before} caseInUse={priceCase} />
    </Section>
  );
}

function titleOf(deck: PriceDeckView | undefined, priceCase: "low" | "mid" | "high"): string {
  const price = priceOf(deck, "condensate", priceCase);
  if (!deck || !price) return "Prices";
  return `Condensate fetches ${formatPrice(price.realised)} ${priceUnit(deck.currency, "condensate")} in the ${priceCase} case`;
}

function countsOf(decks: readonly PriceDeckView[]): string {
  const published = decks.filter(({ state }) => state === "published").length;
  const drafts = decks.length - published;
  const words = [
    published > 0 && `${published} published`,
    drafts > 0 && `${drafts} ${drafts === 1 ? "draft" : "drafts"}`,
  ].filter(Boolean);
  return `Every version: ${words.join(", ")}`;
}
