import type { PrmsSubClass } from "@/models/vocabulary";

/** The demo scenario's basins and fields: Quillmere Gas and its places are invented. */
export interface DemoField {
  name: string;
  basin: string;
  operator: string;
  latitudeDeg: number;
  longitudeDeg: number;
  workingInterest: number;
  netRevenueInterest: number;
  prmsClass: "reserves" | "contingent" | "prospective";
  prmsSubClass: PrmsSubClass;
  chanceOfCommerciality: number;
}

export const demoBasins = ["Saltmarrow", "Corrith", "Veldrane", "Ilmarsh"];

const PARTNER = "Harbrook Energy";
const OWN = "Quillmere Gas";

function field(
  name: string,
  basin: string,
  [latitudeDeg, longitudeDeg]: [number, number],
  [workingInterest, netRevenueInterest]: [number, number],
  prmsClass: DemoField["prmsClass"],
  prmsSubClass: PrmsSubClass,
  chanceOfCommerciality: number,
  operator = OWN,
): DemoField {
  return {
    name,
    basin,
    operator,
    latitudeDeg,
    longitudeDeg,
    workingInterest,
    netRevenueInterest,
    prmsClass,
    prmsSubClass,
    chanceOfCommerciality,
  };
}

export const demoFields: DemoField[] = [
  field("Pellow North", "Saltmarrow", [-39.62, 9.31], [0.8, 0.704], "reserves", "on_production", 1),
  field(
    "Pellow South",
    "Saltmarrow",
    [-39.71, 9.36],
    [0.8, 0.704],
    "reserves",
    "approved_for_development",
    0.97,
  ),
  field("Ravelsand", "Saltmarrow", [-39.55, 9.58], [0.65, 0.569], "reserves", "on_production", 1),
  field("Otterhythe", "Saltmarrow", [-39.68, 9.12], [1, 0.875], "reserves", "on_production", 1),
  field(
    "Sallowfleet",
    "Saltmarrow",
    [-39.83, 9.02],
    [0.5, 0.4375],
    "contingent",
    "development_pending",
    0.72,
  ),
  field(
    "Merrin Spit",
    "Saltmarrow",
    [-39.86, 9.44],
    [0.5, 0.4375],
    "contingent",
    "development_pending",
    0.68,
  ),
  field(
    "Hollin Deep",
    "Corrith",
    [-38.71, 11.42],
    [0.6, 0.51],
    "contingent",
    "development_pending",
    0.65,
  ),
  field(
    "Umberlow",
    "Corrith",
    [-38.62, 11.21],
    [0.75, 0.6525],
    "reserves",
    "justified_for_development",
    0.94,
  ),
  field(
    "Thornlode",
    "Corrith",
    [-38.83, 11.66],
    [0.45, 0.387],
    "contingent",
    "development_on_hold",
    0.45,
    PARTNER,
  ),
  field(
    "Gantry Fell",
    "Corrith",
    [-38.55, 11.71],
    [0.7, 0.602],
    "contingent",
    "development_unclarified",
    0.5,
  ),
  field(
    "Wyrecombe",
    "Corrith",
    [-38.9, 11.12],
    [0.4, 0.348],
    "contingent",
    "development_unclarified",
    0.4,
    PARTNER,
  ),
  field("Askerdale", "Corrith", [-38.47, 11.93], [0.55, 0.4675], "prospective", "prospect", 0.28),
  field(
    "Tallowgate",
    "Veldrane",
    [-38.66, 8.42],
    [0.7, 0.6125],
    "reserves",
    "approved_for_development",
    0.97,
  ),
  field("Brindlemoor", "Veldrane", [-38.52, 8.63], [0.85, 0.748], "reserves", "on_production", 1),
  field("Quernside", "Veldrane", [-38.61, 8.88], [0.6, 0.525], "reserves", "on_production", 1),
  field("Dunmarrow", "Veldrane", [-38.78, 8.29], [1, 0.875], "reserves", "on_production", 1),
  field(
    "Fenwhistle",
    "Veldrane",
    [-38.74, 8.74],
    [0.5, 0.4375],
    "reserves",
    "justified_for_development",
    0.9,
    PARTNER,
  ),
  field("Kittlebeck", "Veldrane", [-38.87, 8.55], [0.9, 0.7875], "reserves", "on_production", 1),
  field(
    "Larkhaven",
    "Ilmarsh",
    [-39.52, 11.48],
    [0.65, 0.559],
    "contingent",
    "development_pending",
    0.7,
  ),
  field(
    "Tidewick",
    "Ilmarsh",
    [-39.61, 11.82],
    [0.6, 0.516],
    "contingent",
    "development_pending",
    0.62,
  ),
  field(
    "Candlewyke",
    "Ilmarsh",
    [-39.72, 11.33],
    [0.5, 0.43],
    "contingent",
    "development_unclarified",
    0.5,
  ),
  field(
    "Sorrelbank",
    "Ilmarsh",
    [-39.8, 11.63],
    [0.7, 0.602],
    "contingent",
    "development_unclarified",
    0.45,
  ),
  field(
    "Brackenmouth",
    "Ilmarsh",
    [-39.45, 12.01],
    [0.35, 0.301],
    "contingent",
    "development_on_hold",
    0.35,
    PARTNER,
  ),
  field("Hesper Reach", "Ilmarsh", [-39.9, 11.95], [0.6, 0.516], "prospective", "prospect", 0.22),
];
