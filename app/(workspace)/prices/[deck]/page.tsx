import type { Metadata } from "next";
import { notFound } from "next/navigation";
import { Suspense } from "react";
import { requireActor } from "@/app/_server/session";
import { idParams } from "@/app/api/v1/common-schema";
import { DeckPage } from "../_components/deck-page";

export const metadata: Metadata = { title: "Price deck" };

interface DeckRouteProps {
  params: Promise<{ deck: string }>;
}

export default async function PriceDeckPage({ params }: DeckRouteProps) {
  await requireActor("priceDeck.read");
  const { deck } = await params;
  const parsed = idParams.safeParse({ id: deck });
  if (!parsed.success) notFound();
  return (
    <Suspense>
      <DeckPage id={parsed.data.id} />
    </Suspense>
  );
}
