import { degreesRankine } from "../units/conversions";
import type { Warning } from "../warnings";
import { gasDensityLbPerCubicFoot } from "./density";
import {
  assertGasState,
  gasFormationVolumeFactorCfPerScf,
  gasFormationVolumeFactorRbPerMscf,
} from "./formation-volume-factor";
import {
  pseudocritical,
  pseudocriticalWarnings,
  type Impurities,
  type PseudocriticalMethod,
} from "./pseudocritical";
import { gasViscosityCp, gasViscosityWarnings } from "./viscosity";
import { hallYarboroughZFactor, zFactor, zFactorWarnings } from "./z-factor";

export interface GasPropertiesInput extends Impurities {
  /** of the whole gas, air = 1 */
  readonly gasGravity: number;
  readonly pressurePsia: number;
  readonly temperatureDegF: number;
  readonly pseudocriticalMethod?: PseudocriticalMethod;
  readonly zMethod?: "dranchuk-abou-kassem" | "hall-yarborough";
}

export interface GasProperties {
  readonly pseudocriticalTemperatureDegR: number;
  readonly pseudocriticalPressurePsia: number;
  readonly reducedTemperature: number;
  readonly reducedPressure: number;
  readonly zFactor: number;
  readonly formationVolumeFactorCfPerScf: number;
  readonly formationVolumeFactorRbPerMscf: number;
  readonly densityLbPerCubicFoot: number;
  readonly viscosityCp: number;
  readonly warnings: Warning[];
}

/**
 * Properties of a gas at one pressure and temperature: gravity to pseudocriticals to z, then Bg, density, viscosity.
 *
 * @throws {DomainError} when the state, the gravity or the impurities are impossible
 * @throws {ConvergenceError} when z does not converge
 * @example gasProperties({ gasGravity: 0.8, nitrogen: 0, carbonDioxide: 0, hydrogenSulphide: 0,
 *   pressurePsia: 5000, temperatureDegF: 250 }).zFactor // => 1.008198
 */
export function gasProperties(input: GasPropertiesInput): GasProperties {
  const { gasGravity, pressurePsia, temperatureDegF, pseudocriticalMethod } = input;
  assertGasState(pressurePsia, temperatureDegF, 1);
  const critical = pseudocritical(gasGravity, input, pseudocriticalMethod);
  const reducedTemperature = degreesRankine(temperatureDegF) / critical.temperatureDegR;
  const reducedPressure = pressurePsia / critical.pressurePsia;
  const z = (input.zMethod === "hall-yarborough" ? hallYarboroughZFactor : zFactor)(
    reducedPressure,
    reducedTemperature,
  );
  return {
    pseudocriticalTemperatureDegR: critical.temperatureDegR,
    pseudocriticalPressurePsia: critical.pressurePsia,
    reducedTemperature,
    reducedPressure,
    zFactor: z,
    formationVolumeFactorCfPerScf: gasFormationVolumeFactorCfPerScf(
      pressurePsia,
      temperatureDegF,
      z,
    ),
    formationVolumeFactorRbPerMscf: gasFormationVolumeFactorRbPerMscf(
      pressurePsia,
      temperatureDegF,
      z,
    ),
    densityLbPerCubicFoot: gasDensityLbPerCubicFoot(gasGravity, pressurePsia, temperatureDegF, z),
    viscosityCp: gasViscosityCp(gasGravity, pressurePsia, temperatureDegF, z),
    warnings: [
      ...pseudocriticalWarnings(gasGravity, input, pseudocriticalMethod),
      ...zFactorWarnings(reducedPressure, reducedTemperature),
      ...gasViscosityWarnings(pressurePsia, temperatureDegF),
    ],
  };
}
