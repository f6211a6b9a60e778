"use client";

import { useRouter } from "next/navigation";
import { useState } from "react";
import { useLeaveWarning } from "@/app/_client/use-leave-warning";
import { currentRow, errorWords, ProblemError } from "@/app/_client/request";
import { priceDeckSchema, type PriceDeckView } from "@/app/api/v1/price-decks/schema";
import { useBasis } from "@/components/basis/use-basis";
import { Button } from "@/components/ui/button";
import { Dialog } from "@/components/ui/dialog";
import { TextArea, TextField } from "@/components/ui/field";
import { formatDate } from "@/components/ui/format";
import { PageHead, Section, Stack } from "@/components/ui/section";
import { Notice } from "@/components/ui/status";
import { StateMark } from "@/components/ui/text";
import { useToast } from "@/components/ui/toast";
import { useDiscardDeck, usePublishDeck, useSaveDeck } from "../_queries/price-decks";
import { deckTextOf, readDeckText, type DeckText } from "./deck-text";
import { deckName } from "./deck-words";
import { PriceGrid } from "./price-grid";

export interface DeckEditorProps {
  deck: PriceDeckView;
  before: PriceDeckView | null;
  crumbs: { label: string; href: string }[];
}

type Question = "publish" | "discard" | null;

/** A draft deck in the planner's hands. Saved under the version it was read at, so nobody's work is lost. */
export function DeckEditor({ deck, before, crumbs }: DeckEditorProps) {
  const router = useRouter();
  const toast = useToast();
  const { withBasis } = useBasis();
  const [base, setBase] = useState(deck);
  const [text, setText] = useState<DeckText>(() => deckTextOf(deck));
  const [question, setQuestion] = useState<Question>(null);
  const [problem, setProblem] = useState<unknown>(null);
  const save = useSaveDeck(deck.id);
  const publish = usePublishDeck(deck.id);
  const discard = useDiscardDeck(deck.id);

  const { body, faults } = readDeckText(text);
  const isFaulty = Object.keys(faults).length > 0;
  const isDirty = JSON.stringify(text) !== JSON.stringify(deckTextOf(base));
  const theirs = currentRow(problem, priceDeckSchema);
  useLeaveWarning(isDirty);

  const change = (part: Partial<DeckText>) => setText((now) => ({ ...now, ...part }));

  async function handleSave(version: number) {
    setProblem(null);
    try {
      const saved = await save.mutateAsync({ version, body });
      setBase(saved);
      setText(deckTextOf(saved));
      toast({ title: "Saved.", detail: `${deckName(saved)} is still a draft.` });
    } catch (error) {
      setProblem(error);
    }
  }

  function handleTakeTheirs(current: PriceDeckView) {
    setBase(current);
    setText(deckTextOf(current));
    setProblem(null);
  }

  async function handlePublish() {
    setQuestion(null);
    setProblem(null);
    try {
      const published = await publish.mutateAsync(base.version);
      toast({ title: `${deckName(published)} is published.` });
    } catch (error) {
      setProblem(error);
    }
  }

  async function handleDiscard() {
    setQuestion(null);
    try {
      await discard.mutateAsync(base.version);
      toast({ title: `The draft of ${deckName(base)} is gone.` });
      router.push(withBasis("/prices"));
    } catch (error) {
      setProblem(error);
    }
  }

  return (
    <>
      <PageHead
        title={deckName(deck)}
        crumbs={[...crumbs, { label: deckName(deck) }]}
        lead="No page uses a draft. Once it is published it cannot change. The latest deck is the published one with the latest as-of date."
        meta={
          <>
            <StateMark state="draft" />
            <span>Begun by {deck.creator?.name ?? "somebody who has left"}</span>
            <span>{isDirty ? "Not saved yet" : "Saved"}</span>
          </>
        }
        actions={
          <>
            <Button kind="quiet" onClick={() => setQuestion("discard")}>
              Discard draft
            </Button>
            <Button
              disabled={!isDirty || isFaulty}
              busy={save.isPending}
              busyLabel="Saving…"
              onClick={() => void handleSave(base.version)}
            >
              Save
            </Button>
            <Button
              kind="primary"
              disabled={isDirty || isFaulty}
              title={isDirty ? "Save first" : undefined}
              busy={publish.isPending}
              busyLabel="Publishing…"
              onClick={() => setQuestion("publish")}
            >
              Publish
            </Button>
          </>
        }
      />
      <Stack close>
        {problem !== null && !theirs && (
          <Notice tone="error" title={problemWords(problem)}>
            What you typed is still here.
          </Notice>
        )}
        {theirs && (
          <Notice
            tone="error"
            title="Somebody else saved this draft after you opened it."
            actions={
              <>
                <Button size="small" onClick={() => handleTakeTheirs(theirs)}>
                  Take theirs
                </Button>
                <Button size="small" onClick={() => void handleSave(theirs.version)}>
                  Save mine over it
                </Button>
              </>
            }
          >
            What you typed is still here; theirs is kept too, until you choose.
          </Notice>
        )}
        <Section title="What this deck is">
          <div className="form-grid max-w-[640px]">
            <div className="form-pair">
              <TextField
                label="As of"
                type="date"
                value={text.asOfOn}
                onChange={(event) => change({ asOfOn: event.target.value })}
              />
              <TextField
                label="Currency"
                maxLength={3}
                value={text.currency}
                error={
                  /^[A-Z]{3}$/.test(text.currency)
                    ? undefined
                    : "Three capital letters, such as USD."
                }
                onChange={(event) => change({ currency: event.target.value })}
              />
            </div>
            <TextArea
              label="Why"
              rows={2}
              hint="What changed since the last one; shown beside the deck."
              value={text.note}
              onChange={(event) => change({ note: event.target.value })}
            />
          </div>
        </Section>
        <Section
          title="Prices"
          note="Realised is benchmark plus differential, and is what pages multiply volumes by. Condensate and gas need all three cases, in ascending order."
        >
          <PriceGrid
            text={text}
            faults={faults}
            before={before}
            onChange={(product, priceCase, part, value) =>
              setText((now) => withPrice(now, product, priceCase, part, value))
            }
          />
        </Section>
      </Stack>
      <Dialog
        open={question === "publish"}
        onClose={() => setQuestion(null)}
        title={`Publish ${deckName(deck)}?`}
        description={`Its prices are as of ${formatDate(base.asOfOn)}. If no published deck has a later date, every page that uses the latest deck follows it. A published deck cannot be changed or taken back; a later version can replace it.`}
        actions={
          <>
            <Button onClick={() => setQuestion(null)}>Cancel</Button>
            <Button kind="primary" onClick={() => void handlePublish()}>
              Publish for good
            </Button>
          </>
        }
      />
      <Dialog
        open={question === "discard"}
        onClose={() => setQuestion(null)}
        title={`Discard the draft of ${deckName(deck)}?`}
        description="Its prices leave this list. The audit trail keeps what it held."
        actions={
          <>
            <Button onClick={() => setQuestion(null)}>Keep it</Button>
            <Button kind="primary" onClick={() => void handleDiscard()}>
              Discard
            </Button>
          </>
        }
      />
    </>
  );
}

function withPrice(
  text: DeckText,
  product: keyof DeckText["prices"],
  priceCase: "low" | "mid" | "high",
  part: "benchmark" | "differential",
  value: string,
): DeckText {
  const prices = text.prices[product];
  const price = { ...prices[priceCase], [part]: value };
  return { ...text, prices: { ...text.prices, [product]: { ...prices, [priceCase]: price } } };
}

/** Every reason why it cannot be saved or published, not only how many there are. */
function problemWords(error: unknown): string {
  if (!(error instanceof ProblemError) || error.errors.length < 2) return errorWords(error);
  return `${error.errors.map(({ detail }) => detail).join("; ")}.`;
}
