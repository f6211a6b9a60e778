"use client";

import { useRouter } from "next/navigation";
import { useState } from "react";
import { errorWords } from "@/app/_client/request";
import { useCan } from "@/app/_client/use-session";
import type { PriceDeckView } from "@/app/api/v1/price-decks/schema";
import { useBasis } from "@/components/basis/use-basis";
import { Button } from "@/components/ui/button";
import { formatDate, MISSING } from "@/components/ui/format";
import { Page, PageHead, Section, Stack } from "@/components/ui/section";
import { Notice, Skeleton } from "@/components/ui/status";
import { usePriceDeck, usePriceDecks } from "../_queries/price-decks";
import { DeckEditor } from "./deck-editor";
import { condensateMove, deckName, previousVersion } from "./deck-words";
import { NewDeckDialog } from "./new-deck-dialog";
import { PriceTable } from "./price-table";

/** One version of a deck: a draft that a planner fills in, or a published one that stands. */
export function DeckPage({ id }: { id: string }) {
  const { withBasis } = useBasis();
  const may = useCan();
  const { data: deck, error } = usePriceDeck(id);
  const { data: decks = [] } = usePriceDecks();
  const crumbs = [{ label: "Prices", href: withBasis("/prices") }];

  if (!deck) {
    return (
      <Page>
        <PageHead title="Price deck" crumbs={crumbs} />
        {error ? (
          <Notice tone="error" title={errorWords(error)} />
        ) : (
          <Skeleton lines={10} label="Loading the price deck" />
        )}
      </Page>
    );
  }
  const before = previousVersion(deck, decks);
  if (deck.state === "draft" && may("priceDeck.update")) {
    return (
      <Page>
        {/* Another version of the row is another form: what was typed stays while the row does. */}
        <DeckEditor key={deck.id} deck={deck} before={before} crumbs={crumbs} />
      </Page>
    );
  }
  return (
    <Page>
      <StandingDeck deck={deck} before={before} decks={decks} crumbs={crumbs} />
    </Page>
  );
}

interface StandingDeckProps {
  deck: PriceDeckView;
  before: PriceDeckView | null;
  decks: readonly PriceDeckView[];
  crumbs: { label: string; href: string }[];
}

function StandingDeck({ deck, before, decks, crumbs }: StandingDeckProps) {
  const may = useCan();
  const router = useRouter();
  const { basis, setBasis } = useBasis();
  const [isNaming, setIsNaming] = useState(false);
  const published = decks.filter(({ state }) => state === "published");
  const used = basis.deck === "latest" ? published[0]?.id : basis.deck;
  const move = condensateMove(deck, before);

  function handleUse() {
    setBasis({ deck: deck.id === published[0]?.id ? "latest" : deck.id });
    router.refresh();
  }

  return (
    <>
      <PageHead
        title={deckName(deck)}
        crumbs={[...crumbs, { label: deckName(deck) }]}
        lead={deck.note}
        meta={
          <>
            <span>{deck.state === "published" ? "Published, for good" : "Draft"}</span>
            <span>As of {formatDate(deck.asOfOn)}</span>
            {deck.publishedAt && (
              <span>
                {formatDate(deck.publishedAt)} by {deck.publisher?.name ?? MISSING}
              </span>
            )}
            {deck.id === used && <span>The basis uses it now</span>}
          </>
        }
        actions={
          <>
            {deck.state === "published" && deck.id !== used && (
              <Button onClick={handleUse}>Use it as the basis</Button>
            )}
            {may("priceDeck.create") && deck.state === "published" && (
              <Button kind="primary" icon="plus" onClick={() => setIsNaming(true)}>
                New version
              </Button>
            )}
          </>
        }
      />
      <Stack>
        <Section
          title={move ? `The mid condensate price ${move}` : "Prices"}
          note="Realised is benchmark plus differential: what the company is paid."
        >
          <PriceTable
            deck={deck}
            before={before}
            caseInUse={deck.id === used ? basis.case : undefined}
          />
        </Section>
      </Stack>
      {isNaming && <NewDeckDialog decks={decks} onClose={() => setIsNaming(false)} />}
    </>
  );
}
