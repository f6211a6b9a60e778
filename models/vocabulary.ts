/**
 * The words that columns may hold, as the check constraints of the migrations have them. Plain constants, so that the
 * zod schemas of the API and the forms behind them can use the same lists without loading a model.
 */
export const roles = ["engineer", "reviewer", "planner", "executive", "administrator"] as const;
export type Role = (typeof roles)[number];

export const estimateStates = ["draft", "submitted", "approved", "returned", "superseded"] as const;
export type EstimateState = (typeof estimateStates)[number];

/** States in which a revision is still being worked on or decided; a reservoir has at most one of these. */
export const openEstimateStates = ["draft", "submitted", "returned"] as const;

/** Classes and sub-classes of the Petroleum Resources Management System (2018), table 1. */
export const prmsSubClasses = {
  reserves: ["on_production", "approved_for_development", "justified_for_development"],
  contingent: [
    "development_pending",
    "development_on_hold",
    "development_unclarified",
    "development_not_viable",
  ],
  prospective: ["prospect", "lead", "play"],
} as const;
export type PrmsClass = keyof typeof prmsSubClasses;
export type PrmsSubClass = (typeof prmsSubClasses)[PrmsClass][number];
export const prmsClasses = ["reserves", "contingent", "prospective"] as const;

export const priceDeckStates = ["draft", "published"] as const;
export type PriceDeckState = (typeof priceDeckStates)[number];

export const products = ["condensate", "gas", "plant_liquids"] as const;
export type Product = (typeof products)[number];

export const priceCases = ["low", "mid", "high"] as const;
export type PriceCase = (typeof priceCases)[number];

/** Prices are per stock-tank barrel, per thousand standard cubic feet and per barrel. */
export const priceUnits = {
  condensate: "per_stb",
  gas: "per_mscf",
  plant_liquids: "per_bbl",
} as const satisfies Record<Product, string>;
export type PriceUnit = (typeof priceUnits)[Product];

export const importStates = ["checking", "checked", "applying", "applied", "failed"] as const;
export type ImportState = (typeof importStates)[number];

/** Why many estimates, or one at length, are computed outside a request. */
export const runKinds = ["recalculation", "untilSettled", "import"] as const;
export type RunKind = (typeof runKinds)[number];

/** Which estimates a recalculation takes: what the book stands on, what is being worked on, or both. */
export const runScopes = ["approved", "open", "both"] as const;
export type RunScope = (typeof runScopes)[number];

export const runStates = ["waiting", "running", "finished", "cancelled"] as const;
export type RunState = (typeof runStates)[number];

export const runItemStates = ["waiting", "running", "done", "failed", "passedOver"] as const;
export type RunItemState = (typeof runItemStates)[number];
