/** The demo's answers to how its fields move together; the empty installation's "Independent" stays beside them. */
export interface DemoDependenceSet {
  name: string;
  note: string;
  portfolioRank: number;
  /** by the basin's name */
  basinRanks: Record<string, number>;
  sharedFactors: { name: string; note: string; rank: number; fields: string[] }[];
  isDefault?: true;
}

/** Rank correlation between fields of one basin: shared source rock, charge and mapping velocity. */
const basinRanks = { Saltmarrow: 0.28, Corrith: 0.32, Veldrane: 0.22, Ilmarsh: 0.25 };

export const demoDependenceSets: DemoDependenceSet[] = [
  {
    name: "By basin",
    note: "Fields of a basin share source rock, charge and mapping velocity; basins have nothing in common.",
    portfolioRank: 0,
    basinRanks,
    sharedFactors: [],
    isDefault: true,
  },
  {
    name: "Shared survey and plant",
    note: "As by basin, with what crosses basins: one survey's velocities under five fields, one plant's uptime behind three.",
    portfolioRank: 0.05,
    basinRanks,
    sharedFactors: [
      {
        name: "Outer shelf survey",
        note: "One depth conversion lies under all five structures.",
        rank: 0.35,
        fields: ["Hollin Deep", "Thornlode", "Gantry Fell", "Larkhaven", "Tidewick"],
      },
      {
        name: "Pellow plant",
        note: "Sales of all three go through its stabiliser.",
        rank: 0.2,
        fields: ["Pellow North", "Pellow South", "Otterhythe"],
      },
    ],
  },
  {
    name: "One play",
    note: "A sceptic's view: the whole shelf is one play, and its fields disappoint or surprise together.",
    portfolioRank: 0.3,
    basinRanks: { Saltmarrow: 0.45, Corrith: 0.5, Veldrane: 0.4, Ilmarsh: 0.45 },
    sharedFactors: [],
  },
];
