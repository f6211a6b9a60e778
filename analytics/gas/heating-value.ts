/** Heating value, relative density and Wobbe index of a gas from its composition, by ISO 6976:2016. */
import type { StreamComponent } from "../composition/stream";
import { DomainError } from "../errors";
import { CUBIC_METRES_PER_CUBIC_FOOT } from "../units/conversions";
import type { Warning } from "../warnings";
import {
  AIR_COMPRESSION_FACTOR,
  AIR_MOLAR_MASS,
  calorificComponents,
  heavyAlkanes,
  ISO_GAS_CONSTANT,
  REFERENCE_STATE,
  WATER_VAPORISATION,
  type CalorificComponent,
  type CalorificCondition,
} from "./calorific-data";

/** What a component of a gas has to say; those of a `Stream` do. */
export type GasComponent = Pick<
  StreamComponent,
  "light" | "moleFraction" | "molecularWeight" | "specificGravity"
>;

/** British thermal unit (international table) */
const MEGAJOULES_PER_BTU = 1055.05585262e-6;
const ATMOSPHERE_KILOPASCAL = 101.325;
/** share of the heating value in heptanes plus from which its treatment matters */
const NOTICEABLE_HEAVY_SHARE = 0.03;

export interface CalorificProperties {
  /** kg/kmol */
  readonly molarMass: number;
  readonly compressionFactor: number;
  /** real gas, air = 1 */
  readonly relativeDensity: number;
  /** kJ/mol, ideal gas */
  readonly grossMolar: number;
  readonly netMolar: number;
  /** MJ/kg */
  readonly grossMass: number;
  /** MJ/m3 at the reference state */
  readonly grossIdeal: number;
  readonly grossReal: number;
  readonly netReal: number;
  /** real gas, gross, MJ/m3 */
  readonly wobbe: number;
}

/** Value of a quantity of the n-alkanes at any molar mass: linear between neighbours and beyond the last. */
function ofAlkane(molarMass: number, value: (alkane: CalorificComponent) => number): number {
  const above = heavyAlkanes.findIndex((alkane) => alkane.molarMass >= molarMass);
  const upper = above < 0 ? heavyAlkanes.length - 1 : Math.max(1, above);
  const [a, b] = [heavyAlkanes[upper - 1], heavyAlkanes[upper]];
  const share = (molarMass - a.molarMass) / (b.molarMass - a.molarMass);
  return value(a) + share * (value(b) - value(a));
}

const valueOf = (component: GasComponent, value: (entry: CalorificComponent) => number) =>
  component.light
    ? value(calorificComponents[component.light])
    : ofAlkane(component.molecularWeight, value);

/**
 * Calorific properties by ISO 6976:2016, combustion and metering at one temperature.
 *
 *     H = sum x H_i        Z = 1 - (p/101.325) (sum x s_i)2        V = Z R T / p        G = (M/28.96546) (Z_air/Z)
 *     net = gross - (n_H/2) L(water)        Wobbe = (H/V) / G^0.5
 *
 * Heptanes plus is no component of the standard: each heavy fraction counts as the n-alkane of its molecular weight,
 * interpolated between n-hexane and n-decane and extended linearly beyond. Naphthenes and aromatics of the same weight
 * give 1 to 5 % less heat (common practice, no source).
 *
 * @param components  mole fractions that add up to one
 * @throws {DomainError} when they do not, or when the gas is outside the standard's compression factors (0.9 and above)
 * @example calorificProperties([methane], "15 degC").grossReal // => 37.7730 MJ/m3
 * @see ISO 6976:2016
 */
export function calorificProperties(
  components: readonly GasComponent[],
  condition: CalorificCondition,
): CalorificProperties {
  const sum = (value: (component: GasComponent) => number) =>
    components.reduce((total, component) => total + component.moleFraction * value(component), 0);
  const moles = sum(() => 1);
  if (!(Math.abs(moles - 1) < 1e-6)) {
    throw new DomainError(`Mole fractions add up to one, not ${moles}`, {
      input: "components",
      value: moles,
    });
  }
  const { temperatureK, pressureKilopascal } = REFERENCE_STATE[condition];
  const molarMass = sum((component) =>
    component.light ? calorificComponents[component.light].molarMass : component.molecularWeight,
  );
  const summation = sum((component) => valueOf(component, (entry) => entry.summation[condition]));
  const compressionFactor = 1 - (pressureKilopascal / ATMOSPHERE_KILOPASCAL) * summation ** 2;
  if (!(compressionFactor > 0.9)) {
    throw new DomainError(
      "This gas is too heavy to be a gas at standard conditions: its compression factor there falls below 0.9, where " +
        "ISO 6976 ends",
      { input: "components", value: compressionFactor },
    );
  }
  const grossMolar = sum((component) => valueOf(component, (entry) => entry.gross[condition]));
  const hydrogen = sum((component) => valueOf(component, (entry) => entry.hydrogenAtoms));
  const netMolar = grossMolar - (hydrogen / 2) * WATER_VAPORISATION[condition];
  // m3/kmol, so that kJ/mol over it is MJ/m3
  const idealVolume = (ISO_GAS_CONSTANT * temperatureK) / pressureKilopascal;
  const realVolume = compressionFactor * idealVolume;
  const relativeDensity =
    (molarMass / AIR_MOLAR_MASS) * (AIR_COMPRESSION_FACTOR[condition] / compressionFactor);
  return {
    molarMass,
    compressionFactor,
    relativeDensity,
    grossMolar,
    netMolar,
    grossMass: grossMolar / molarMass,
    grossIdeal: grossMolar / idealVolume,
    grossReal: grossMolar / realVolume,
    netReal: netMolar / realVolume,
    wobbe: grossMolar / realVolume / Math.sqrt(relativeDensity),
  };
}

export interface HeatingValue {
  /** ideal gas, 14.696 psia and 60 degF */
  readonly grossIdealBtuPerScf: number;
  readonly grossRealBtuPerScf: number;
  readonly netRealBtuPerScf: number;
  readonly wobbeRealBtuPerScf: number;
  readonly compressionFactor: number;
  readonly relativeDensity: number;
  readonly warnings: Warning[];
}

/**
 * Heating value of a gas in Btu (international table) per scf, at 14.696 psia and 60 degF, dry.
 *
 * @throws {DomainError} as `calorificProperties`
 * @example heatingValue([methane]).grossIdealBtuPerScf // => 1009.95
 * @see ISO 6976:2016; the ideal component values are those of GPA 2145 within 0.15 Btu/scf
 */
export function heatingValue(components: readonly GasComponent[]): HeatingValue {
  const properties = calorificProperties(components, "60 degF");
  const perScf = (megajoulesPerCubicMetre: number) =>
    (megajoulesPerCubicMetre * CUBIC_METRES_PER_CUBIC_FOOT) / MEGAJOULES_PER_BTU;
  return {
    grossIdealBtuPerScf: perScf(properties.grossIdeal),
    grossRealBtuPerScf: perScf(properties.grossReal),
    netRealBtuPerScf: perScf(properties.netReal),
    wobbeRealBtuPerScf: perScf(properties.wobbe),
    compressionFactor: properties.compressionFactor,
    relativeDensity: properties.relativeDensity,
    warnings: heatingValueWarnings(components, properties.grossMolar),
  };
}

function heatingValueWarnings(components: readonly GasComponent[], grossMolar: number): Warning[] {
  const heavy = components.filter(({ light }) => light === null);
  const share =
    heavy.reduce(
      (sum, component) =>
        sum + component.moleFraction * valueOf(component, (entry) => entry.gross["60 degF"]),
      0,
    ) / grossMolar;
  if (!(share > NOTICEABLE_HEAVY_SHARE)) return [];
  return [
    {
      code: "heating_value_of_heavy_end",
      severity: "warning",
      input: "stream.plus",
      message:
        `${(100 * share).toFixed(1)} % of the heating value comes from heptanes plus, which counts as paraffins of its ` +
        "molecular weight. Naphthenes and aromatics give 1 to 5 % less.",
    },
  ];
}
