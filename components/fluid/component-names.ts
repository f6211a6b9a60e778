import { lightComponents, type LightComponent } from "@/analytics/composition/composition-schema";

/** Names as a laboratory's sheet writes them out. */
export const lightNames: Record<LightComponent, string> = {
  H2S: "Hydrogen sulphide",
  CO2: "Carbon dioxide",
  N2: "Nitrogen",
  C1: "Methane",
  C2: "Ethane",
  C3: "Propane",
  iC4: "Iso-butane",
  nC4: "Normal butane",
  iC5: "Iso-pentane",
  nC5: "Normal pentane",
  C6: "Hexanes",
};

const fractionNames: Record<number, string> = {
  7: "Heptanes",
  8: "Octanes",
  9: "Nonanes",
  10: "Decanes",
};

/** "Heptanes plus" for "C7+", "Heptanes" for "C7"; empty where a name says no more than the symbol. */
export function componentName(symbol: string): string {
  const light = lightComponents.find((name) => name === symbol);
  if (light) return lightNames[light];
  const [, number, plus] = /^C(\d+)(\+?)$/.exec(symbol) ?? [];
  const name = fractionNames[Number(number)];
  if (plus) return name ? `${name} plus` : "Plus fraction";
  return name ?? "";
}

/** What a bar of it is drawn in: gas, condensate or no place of its own. */
export function toneOfComponent(symbol: string): "gas" | "condensate" | "inert" {
  if (["H2S", "CO2", "N2"].includes(symbol)) return "inert";
  const number = Number(/(\d+)/.exec(symbol)?.[1]);
  return number >= 7 ? "condensate" : "gas";
}
