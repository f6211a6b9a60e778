import type { PrmsClass, PrmsSubClass } from "@/models/vocabulary";

/** Names of the classes and sub-classes of the Petroleum Resources Management System (2018), table 1. */
export const prmsClassNames: Record<PrmsClass, string> = {
  reserves: "Reserves",
  contingent: "Contingent resources",
  prospective: "Prospective resources",
};

export const prmsSubClassNames: Record<PrmsSubClass, string> = {
  on_production: "On production",
  approved_for_development: "Approved for development",
  justified_for_development: "Justified for development",
  development_pending: "Development pending",
  development_on_hold: "Development on hold",
  development_unclarified: "Development unclarified",
  development_not_viable: "Development not viable",
  prospect: "Prospect",
  lead: "Lead",
  play: "Play",
};

export const prmsFill = { reserves: "full", contingent: "half", prospective: "empty" } as const;
