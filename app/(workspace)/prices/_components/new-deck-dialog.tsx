"use client";

import { useRouter } from "next/navigation";
import { DateTime } from "luxon";
import { useId, useState } from "react";
import { useForm } from "react-hook-form";
import { placeProblems } from "@/app/_client/form-problems";
import type { NewPriceDeckRequest, PriceDeckView } from "@/app/api/v1/price-decks/schema";
import { useBasis } from "@/components/basis/use-basis";
import { Button } from "@/components/ui/button";
import { Dialog } from "@/components/ui/dialog";
import { TextArea, TextField } from "@/components/ui/field";
import { Notice } from "@/components/ui/status";
import { useCreateDeck } from "../_queries/price-decks";
import { deckName } from "./deck-words";

interface NewDeck {
  name: string;
  currency: string;
  asOfOn: string;
  note: string;
}

export interface NewDeckDialogProps {
  decks: readonly PriceDeckView[];
  onClose: () => void;
}

/** Begins the next version with the prices of the latest one; without any deck, the first one, empty. */
export function NewDeckDialog({ decks, onClose }: NewDeckDialogProps) {
  const router = useRouter();
  const { withBasis } = useBasis();
  const formId = useId();
  const create = useCreateDeck();
  const [problem, setProblem] = useState<string | null>(null);
  const start = startingDeck(decks);
  const { register, handleSubmit, setError, formState } = useForm<NewDeck>({
    defaultValues: {
      name: start?.name ?? "Planning deck",
      currency: start?.currency ?? "USD",
      asOfOn: DateTime.utc().toISODate(),
      note: "",
    },
  });
  const { errors } = formState;

  async function handleDeck(deck: NewDeck) {
    setProblem(null);
    const body: NewPriceDeckRequest = {
      ...deck,
      prices: start?.prices.map(({ product, priceCase, benchmark, differential }) => ({
        product,
        priceCase,
        benchmark,
        differential,
      })),
    };
    try {
      const made = await create.mutateAsync(body);
      router.push(withBasis(`/prices/${made.id}`));
      onClose();
    } catch (error) {
      setProblem(placeProblems(error, setError, ["name", "currency", "asOfOn", "note"]));
    }
  }

  return (
    <Dialog
      open
      onClose={onClose}
      title={start ? "New version" : "The first price deck"}
      description={
        start
          ? `It begins as a draft with the prices of ${deckName(start)}. Pages go on using published decks until you publish it.`
          : "It begins as an empty draft. Fill in the prices, then publish it."
      }
      actions={
        <>
          <Button onClick={onClose}>Cancel</Button>
          <Button kind="primary" type="submit" form={formId} busy={create.isPending}>
            Make the draft
          </Button>
        </>
      }
    >
      <form id={formId} noValidate className="form-grid" onSubmit={handleSubmit(handleDeck)}>
        {problem && <Notice tone="error" title={problem} />}
        <TextField
          label="Name"
          hint="The same name makes it that deck’s next version."
          error={errors.name?.message}
          {...register("name", { required: "Name the deck." })}
        />
        <div className="form-pair">
          <TextField
            label="As of"
            type="date"
            error={errors.asOfOn?.message}
            {...register("asOfOn", { required: "Say of which date the prices are." })}
          />
          <TextField
            label="Currency"
            maxLength={3}
            error={errors.currency?.message}
            {...register("currency", {
              pattern: { value: /^[A-Z]{3}$/, message: "Three capital letters, such as USD." },
              required: "Three capital letters, such as USD.",
            })}
          />
        </div>
        <TextArea
          label="Why"
          hint="What changed since the last one; shown beside the deck."
          error={errors.note?.message}
          {...register("note")}
        />
      </form>
    </Dialog>
  );
}

/** The latest published deck, or the latest draft while none is. */
const startingDeck = (decks: readonly PriceDeckView[]) =>
  decks.find(({ state }) => state === "published") ?? decks[0] ?? null;
