import type { LightComponent } from "@/analytics/composition/composition-schema";

/** What a name in a table of components stands for. */
export type NamedComponent =
  | { kind: "light"; name: LightComponent }
  | { kind: "carbonNumber"; carbonNumber: number }
  | { kind: "plus"; carbonNumber: number }
  /** the last line of many tables; it is compared with what was read, not read */
  | { kind: "total" }
  /** a component that has no place here, with what to do about it */
  | { kind: "unknown"; reason: string };

const light: Readonly<Record<LightComponent, readonly string[]>> = {
  H2S: ["h2s", "hydrogensulphide", "hydrogensulfide"],
  CO2: ["co2", "carbondioxide"],
  N2: ["n2", "nitrogen"],
  C1: ["c1", "methane", "ch4"],
  C2: ["c2", "ethane", "c2h6"],
  C3: ["c3", "propane", "c3h8"],
  iC4: ["ic4", "c4i", "isobutane", "ibutane", "2methylpropane", "methylpropane"],
  nC4: ["nc4", "c4n", "nbutane", "normalbutane"],
  iC5: ["ic5", "c5i", "isopentane", "ipentane", "2methylbutane", "methylbutane"],
  nC5: ["nc5", "c5n", "npentane", "normalpentane"],
  C6: ["c6", "hexane", "hexanes", "nc6", "nhexane"],
};

/** From seven carbon atoms on, in order. */
const heavyNames = [
  ...["heptane", "octane", "nonane", "decane", "undecane", "dodecane", "tridecane"],
  ...["tetradecane", "pentadecane", "hexadecane", "heptadecane", "octadecane", "nonadecane"],
  ...["eicosane", "heneicosane", "docosane", "tricosane", "tetracosane", "pentacosane"],
  ...["hexacosane", "heptacosane", "octacosane", "nonacosane", "triacontane"],
];
const FIRST_HEAVY = 7;
const LAST_SINGLE = 35;
const LAST_PLUS = 36;

const strangers: Readonly<Record<string, string>> = {
  c4: "Say which butane: i-C4 or n-C4.",
  butane: "Say which butane: i-butane or n-butane.",
  butanes: "Say which butane: i-butane or n-butane.",
  c5: "Say which pentane: i-C5 or n-C5.",
  pentane: "Say which pentane: i-pentane or n-pentane.",
  pentanes: "Say which pentane: i-pentane or n-pentane.",
  neoc5: "Neopentane has no place of its own; add it to i-C5.",
  neopentane: "Neopentane has no place of its own; add it to i-C5.",
  h2: "Hydrogen has no place in these calculations.",
  hydrogen: "Hydrogen has no place in these calculations.",
  he: "Helium has no place in these calculations; laboratories add it to nitrogen.",
  helium: "Helium has no place in these calculations; laboratories add it to nitrogen.",
  o2: "Oxygen in a reservoir gas is air in the sample; take it out with its nitrogen.",
  oxygen: "Oxygen in a reservoir gas is air in the sample; take it out with its nitrogen.",
  h2o: "Compositions here are dry; take the water out.",
  water: "Compositions here are dry; take the water out.",
  benzene: "Aromatics have no place of their own; add benzene to C7, where it boils.",
  toluene: "Aromatics have no place of their own; add toluene to C8, where it boils.",
};

const spellings = new Map<string, NamedComponent>([
  ...Object.entries(light).flatMap(([name, names]) =>
    names.map((spelling): [string, NamedComponent] => [
      spelling,
      { kind: "light", name: name as LightComponent },
    ]),
  ),
  ...heavyNames.flatMap((name, index): [string, NamedComponent][] => {
    const carbonNumber = FIRST_HEAVY + index;
    return [
      [name, { kind: "carbonNumber", carbonNumber }],
      [`${name}s`, { kind: "carbonNumber", carbonNumber }],
      [`n${name}`, { kind: "carbonNumber", carbonNumber }],
      [`${name}+`, { kind: "plus", carbonNumber }],
      [`${name}s+`, { kind: "plus", carbonNumber }],
    ];
  }),
  ...Object.entries(strangers).map(([name, reason]): [string, NamedComponent] => [
    name,
    { kind: "unknown", reason },
  ]),
  ...["total", "sum", "totals"].map((name): [string, NamedComponent] => [name, { kind: "total" }]),
]);

/**
 * The component that a name of a laboratory's sheet stands for, or null when it is the name of none. Hyphens, dots,
 * spaces, brackets and capitals do not matter: `i-C4`, `iC4`, `iso-Butane` and `I BUTANE` are one.
 *
 * @example componentOf("Heptanes plus") // => { kind: "plus", carbonNumber: 7 }
 * @example componentOf("C12") // => { kind: "carbonNumber", carbonNumber: 12 }
 */
export function componentOf(text: string): NamedComponent | null {
  const name = text
    .toLowerCase()
    .replace(/\bplus\b/g, "+")
    .replace(/[\s\-_.,()[\]'’]/g, "");
  const known = spellings.get(name);
  if (known) return known;
  const [, number, plus] = /^c(\d{1,2})(\+?)$/.exec(name) ?? [];
  if (number === undefined) return null;
  const carbonNumber = Number(number);
  const last = plus === "" ? LAST_SINGLE : LAST_PLUS;
  if (carbonNumber >= FIRST_HEAVY && carbonNumber <= last) {
    return { kind: plus === "" ? "carbonNumber" : "plus", carbonNumber };
  }
  return {
    kind: "unknown",
    reason:
      plus === ""
        ? `Fractions run from C${FIRST_HEAVY} to C${LAST_SINGLE}.`
        : `A plus fraction can begin at C${FIRST_HEAVY} to C${LAST_PLUS}.`,
  };
}
