import type { Metadata } from "next";
import { Suspense } from "react";
import { requireActor } from "@/app/_server/session";
import { PricesOverview } from "./_components/prices-overview";

export const metadata: Metadata = { title: "Prices" };

export default async function PricesPage() {
  await requireActor("priceDeck.read");
  return (
    <Suspense>
      <PricesOverview />
    </Suspense>
  );
}
