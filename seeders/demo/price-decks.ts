import type { DeckPrice } from "@/services/price-decks";

/** An invented view of prices: flat, real, in US dollars of the as-of date. */
export interface DemoDeck {
  asOfOn: string;
  note: string;
  prices: DeckPrice[];
}

type Benchmarks = [low: number, mid: number, high: number];

function prices(
  condensate: Benchmarks,
  gas: Benchmarks,
  plantLiquids: Benchmarks,
  differential: { condensate: number; gas: number; plantLiquids: number },
): DeckPrice[] {
  return (["low", "mid", "high"] as const).flatMap((priceCase, index) => [
    {
      product: "condensate",
      priceCase,
      benchmark: condensate[index],
      differential: differential.condensate,
    },
    { product: "gas", priceCase, benchmark: gas[index], differential: differential.gas },
    {
      product: "plant_liquids",
      priceCase,
      benchmark: plantLiquids[index],
      differential: differential.plantLiquids,
    },
  ]);
}

export const demoDeckName = "Planning deck";

export const demoDecks: DemoDeck[] = [
  {
    asOfOn: "2024-10-01",
    note: "First common deck for the 2025 budget.",
    prices: prices([58, 71, 86], [3.1, 4.2, 5.6], [24, 31, 39], {
      condensate: -5.1,
      gas: -0.4,
      plantLiquids: -1.5,
    }),
  },
  {
    asOfOn: "2025-10-06",
    note: "Softer market; differential after the new blending contract.",
    prices: prices([54, 66, 81], [3.3, 4.5, 6], [23, 30, 38], {
      condensate: -4.6,
      gas: -0.4,
      plantLiquids: -1.5,
    }),
  },
  {
    asOfOn: "2026-11-02",
    note: "For the 2027 budget. The condensate differential holds while the Saltmarrow contract runs.",
    prices: prices([56, 69, 84], [3.6, 4.9, 6.5], [25, 32, 41], {
      condensate: -4.2,
      gas: -0.35,
      plantLiquids: -1.4,
    }),
  },
];
