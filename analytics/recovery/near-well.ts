import { depleteCell, defaultPressuresPsia } from "../depletion/simulate-depletion";
import { Flasher } from "../equation-of-state/flash";
import type { Characterised, Mixture } from "../equation-of-state/mixture";
import { upperSaturation } from "../equation-of-state/saturation";
import { DomainError } from "../errors";
import { gasViscosityCp, gasViscosityWarnings } from "../gas/viscosity";
import { degreesRankine, GAS_CONSTANT } from "../units/conversions";
import { AIR_MOLECULAR_WEIGHT } from "../units/standard-conditions";
import type { Warning } from "../warnings";
import { condensateViscosityCp } from "./condensate-viscosity";
import {
  assertRelativePermeability,
  gasRelativePermeability,
  saturationAtRatio,
  type RelativePermeability,
} from "./relative-permeability";

export interface NearWellConditions {
  readonly temperatureDegF: number;
  readonly reservoirPressurePsia: number;
  readonly flowingPressurePsia: number;
  readonly relativePermeability: RelativePermeability;
}

export interface NearWellPoint {
  readonly pressurePsia: number;
  readonly gasViscosityCp: number;
  /** null where there is no condensate */
  readonly condensateViscosityCp: number | null;
  readonly liquidSaturation: number;
  readonly gasRelativePermeability: number;
}

export interface NearWell {
  /** rate with liquid over rate of the same gas without, at the same drawdown */
  readonly productivityRatio: number;
  /** from the flowing to the reservoir pressure; twice at the dew point, on either side of it */
  readonly points: NearWellPoint[];
  readonly warnings: Warning[];
}

/** Intervals of pressure in each region. */
const INTERVALS = 24;
/** Losing more than this is severe. Common practice, no source. */
const SEVERE = 0.3;

/**
 * Pseudopressure of a fluid between the first and the last pressure, by the trapezoidal rule, which is exact for an
 * ideal gas of constant viscosity: (p2^2 - p1^2) / (mu z).
 *
 *     m = 2 integral of p / (mu z) dp
 *
 * @param pressuresPsia  rising
 * @param mobilities     p / (mu z) at each of them, psia/cp; with two phases, their sum weighted by relative permeability
 * @returns  psia2/cp
 * @see R. Al-Hussainy, H. J. Ramey, P. B. Crawford, J. Pet. Technol. 18 (May 1966) 624-636
 * @example pseudopressure([1000, 2000], [1000 / 0.02, 2000 / 0.02]) // => 1.5e8
 */
export function pseudopressure(
  pressuresPsia: readonly number[],
  mobilities: readonly number[],
): number {
  let sum = 0;
  for (let i = 1; i < pressuresPsia.length; i += 1) {
    sum += (pressuresPsia[i] - pressuresPsia[i - 1]) * (mobilities[i] + mobilities[i - 1]);
  }
  return sum;
}

/**
 * How much of its rate a well loses to the liquid around it, by two-phase pseudopressure. Steady flow between the
 * flowing and the reservoir pressure; near the well (region 1) gas and condensate flow in the ratio in which the
 * produced stream parts at each pressure,
 *
 *     krg / kro = (V / L) (mu_g / mu_o) (v_g / v_o)
 *
 * with V and L moles of gas and liquid and v their molar volumes; that ratio gives the saturation by the relative
 * permeabilities, and
 *
 *     rate ratio = integral of krg p / (mu_g z_g V) dp / integral of p / (mu z) dp
 *
 * The lower integral is the same stream as a gas that drops no liquid. Farther out the stream is one gas (region 3).
 * The region between, where liquid collects without flowing (2), is counted with region 1: on the low side. Capillary
 * number and velocity effects are left out; non-Darcy flow and skin cancel only as far as they are the same in both.
 *
 * Above the dew point the produced stream is the fluid itself; below, the gas that is left after depletion to the
 * reservoir pressure.
 *
 * @param viscosityMixture  critical points for the condensate's viscosity, component by component as in the mixture:
 *   those before tuning, because factors that fit drop-out move critical points by more than the viscosity bears
 * @throws {DomainError} when the flowing pressure is not below the reservoir's, no saturation lets both phases flow, or
 *   the fluid is not a gas condensate at this temperature
 * @throws {ConvergenceError} when a flash does not converge
 * @see O. Fevang, C. H. Whitson, Modeling gas-condensate well deliverability, SPE Reservoir Eng. 11 (November 1996)
 *      221-230
 */
export function nearWell(
  characterised: Characterised,
  conditions: NearWellConditions,
  viscosityMixture: Mixture = characterised.mixture,
): NearWell {
  const { temperatureDegF, reservoirPressurePsia, flowingPressurePsia } = conditions;
  const { relativePermeability } = conditions;
  assertPressures(conditions);
  assertRelativePermeability(relativePermeability);
  assertSameComponents(characterised.mixture, viscosityMixture);
  const { stream, dewPointPsia } = producedStream(characterised, conditions);
  const fluid = new NearWellFluid(characterised, stream, temperatureDegF, viscosityMixture);
  const meets = Math.min(dewPointPsia, reservoirPressurePsia);

  const inner =
    flowingPressurePsia < meets
      ? steps(flowingPressurePsia, meets).map((pressure, i) =>
          i === INTERVALS
            ? fluid.atDewPoint(pressure, relativePermeability)
            : fluid.withLiquid(pressure, relativePermeability),
        )
      : [];
  const outer =
    reservoirPressurePsia > meets || inner.length === 0
      ? steps(Math.max(meets, flowingPressurePsia), reservoirPressurePsia).map((pressure) =>
          fluid.withoutLiquid(pressure),
        )
      : [];
  const total = (states: readonly State[], mobility: (state: State) => number) =>
    states.length > 1
      ? pseudopressure(
          states.map(({ point }) => point.pressurePsia),
          states.map(mobility),
        )
      : 0;
  const without = ({ mobilityWithoutLiquid }: State) => mobilityWithoutLiquid;
  const rate = total(inner, ({ mobility }) => mobility) + total(outer, without);
  const productivityRatio = rate / (total(inner, without) + total(outer, without));
  return {
    productivityRatio,
    points: [...inner, ...outer].map(({ point }) => point),
    warnings: warningsOf(conditions, dewPointPsia, productivityRatio),
  };
}

function assertPressures({
  reservoirPressurePsia: reservoir,
  flowingPressurePsia: flowing,
}: NearWellConditions): void {
  if (!(flowing > 0 && reservoir < Infinity)) {
    throw new DomainError(`A flowing pressure is above zero, not ${flowing} psia.`, {
      input: "flowingPressurePsia",
      value: flowing,
    });
  }
  if (!(flowing < reservoir)) {
    throw new DomainError(
      `A well flows when its pressure, ${flowing} psia, is below the reservoir's, ${reservoir} psia.`,
      { input: "flowingPressurePsia", value: flowing },
    );
  }
}

function assertSameComponents({ names }: Mixture, { names: others }: Mixture): void {
  if (names.length === others.length && names.every((name, i) => name === others[i])) return;
  throw new DomainError(
    `The components given for viscosity, ${others.join(", ")}, are not those of the mixture, ${names.join(", ")}.`,
    { input: "viscosityMixture" },
  );
}

/** What flows into the well, and the pressure below which it drops liquid. */
function producedStream(
  characterised: Characterised,
  { temperatureDegF, reservoirPressurePsia }: NearWellConditions,
): { stream: Float64Array; dewPointPsia: number } {
  const { mixture, moleFractions } = characterised;
  const upper = upperSaturation(mixture, moleFractions, degreesRankine(temperatureDegF));
  if (!upper) {
    return { stream: moleFractions, dewPointPsia: 0 };
  }
  if (upper.kind === "dewPoint" && upper.pressurePsia <= reservoirPressurePsia) {
    return { stream: moleFractions, dewPointPsia: upper.pressurePsia };
  }
  const steps = defaultPressuresPsia(upper.pressurePsia).filter(
    (pressure) => pressure > reservoirPressurePsia,
  );
  const depleted = depleteCell(characterised, temperatureDegF, [...steps, reservoirPressurePsia]);
  return {
    stream: depleted.steps[depleted.steps.length - 1].gas,
    dewPointPsia: reservoirPressurePsia,
  };
}

function steps(low: number, high: number): number[] {
  return Array.from({ length: INTERVALS + 1 }, (_, i) => low + ((high - low) * i) / INTERVALS);
}

interface State {
  readonly point: NearWellPoint;
  /** krg p / (mu_g z_g V), psia/cp */
  readonly mobility: number;
  /** p / (mu z) of the stream as a gas that drops no liquid */
  readonly mobilityWithoutLiquid: number;
}

/** The produced stream at the pressures around a well. */
class NearWellFluid {
  private readonly flasher: Flasher;
  private readonly temperatureDegR: number;
  private readonly molecularWeight: number;

  constructor(
    { mixture }: Characterised,
    private readonly stream: Float64Array,
    private readonly temperatureDegF: number,
    private readonly viscosityMixture: Mixture,
  ) {
    this.flasher = new Flasher(mixture);
    this.temperatureDegR = degreesRankine(temperatureDegF);
    this.molecularWeight = stream.reduce(
      (sum, fraction, i) => sum + fraction * mixture.molecularWeight[i],
      0,
    );
  }

  withoutLiquid(pressurePsia: number): State {
    const { viscosity, mobility } = this.oneGas(pressurePsia);
    return {
      point: {
        pressurePsia,
        gasViscosityCp: viscosity,
        condensateViscosityCp: null,
        liquidSaturation: 0,
        gasRelativePermeability: 1,
      },
      mobility,
      mobilityWithoutLiquid: mobility,
    };
  }

  /** Just inside region 1: the first drops have collected until they can flow. */
  atDewPoint(pressurePsia: number, curves: RelativePermeability): State {
    const state = this.withoutLiquid(pressurePsia);
    const saturation = curves.criticalCondensateSaturation;
    const krg = gasRelativePermeability(saturation, curves);
    return {
      point: { ...state.point, liquidSaturation: saturation, gasRelativePermeability: krg },
      mobility: krg * state.mobility,
      mobilityWithoutLiquid: state.mobility,
    };
  }

  withLiquid(pressurePsia: number, curves: RelativePermeability): State {
    const { temperatureDegF, temperatureDegR } = this;
    const { vapour, liquid, vapourFraction } = this.flasher.flash(this.stream, {
      pressurePsia,
      temperatureDegR,
    });
    // Below the lower dew point everything is gas again.
    if (!vapour || !liquid) return this.withoutLiquid(pressurePsia);
    const gasViscosity = gasViscosityCp(
      vapour.molecularWeight / AIR_MOLECULAR_WEIGHT,
      pressurePsia,
      temperatureDegF,
      vapour.z,
    );
    const condensateViscosity = condensateViscosityCp(
      this.viscosityMixture,
      liquid.moleFractions,
      temperatureDegR,
      liquid.molarVolumeFt3PerLbmol,
    );
    const ratio =
      ((vapourFraction / (1 - vapourFraction)) * (gasViscosity * vapour.molarVolumeFt3PerLbmol)) /
      (condensateViscosity * liquid.molarVolumeFt3PerLbmol);
    const saturation = saturationAtRatio(ratio, curves);
    const krg = gasRelativePermeability(saturation, curves);
    return {
      point: {
        pressurePsia,
        gasViscosityCp: gasViscosity,
        condensateViscosityCp: condensateViscosity,
        liquidSaturation: saturation,
        gasRelativePermeability: krg,
      },
      mobility: (krg * pressurePsia) / (gasViscosity * vapour.z * vapourFraction),
      mobilityWithoutLiquid: this.oneGas(pressurePsia).mobility,
    };
  }

  /** The stream as one gas, whether or not it would stay one. */
  private oneGas(pressurePsia: number): { viscosity: number; mobility: number } {
    const { equation, stability } = this.flasher;
    equation.setTemperature(this.temperatureDegR);
    equation.evaluate(this.stream, pressurePsia, "gas", stability.feed);
    const volume = equation.molarVolume(this.stream, pressurePsia, stability.feed.z);
    const z = (volume * pressurePsia) / (GAS_CONSTANT * this.temperatureDegR);
    const viscosity = gasViscosityCp(
      this.molecularWeight / AIR_MOLECULAR_WEIGHT,
      pressurePsia,
      this.temperatureDegF,
      z,
    );
    return { viscosity, mobility: pressurePsia / (viscosity * z) };
  }
}

function warningsOf(
  { temperatureDegF, reservoirPressurePsia, flowingPressurePsia }: NearWellConditions,
  dewPointPsia: number,
  productivityRatio: number,
): Warning[] {
  const warnings: Warning[] = [];
  const warn = (code: string, input: string, message: string) =>
    warnings.push({ code, severity: "warning", input, message });
  if (flowingPressurePsia >= dewPointPsia) {
    warn(
      "no_liquid_near_well",
      "flowingPressurePsia",
      dewPointPsia > 0
        ? `The well flows above the dew point, ${figure(dewPointPsia)} psia: no liquid drops out around it.`
        : "The fluid drops no liquid at this temperature.",
    );
  }
  if (reservoirPressurePsia === dewPointPsia) {
    warn(
      "stream_after_depletion",
      "reservoirPressurePsia",
      "The reservoir is below its dew point, so the well produces the gas that depletion leaves, leaner than the fluid " +
        "at first.",
    );
  }
  if (productivityRatio < SEVERE) {
    warn(
      "severe_liquid_block",
      "relativePermeability",
      `The well keeps ${Math.round(100 * productivityRatio)} % of its rate. Losses like this were seen where permeability ` +
        "times thickness is below about 1,000 md ft; the relative permeabilities decide, so have them measured.",
    );
  }
  const outside = [flowingPressurePsia, reservoirPressurePsia].flatMap((pressure) =>
    gasViscosityWarnings(pressure, temperatureDegF),
  );
  return [...warnings, ...outside.slice(0, 1)];
}

const FIGURE = new Intl.NumberFormat("en-GB", { maximumSignificantDigits: 4 });
const figure = (value: number) => FIGURE.format(value);
