import { wellstreamGravityAtYield, yieldConstants } from "../fluid/wellstream";
import { pseudocritical, pseudocriticalWarnings } from "../gas/pseudocritical";
import { zFactor, zFactorWarnings } from "../gas/z-factor";
import { degreesRankine } from "../units/conversions";
import type { Warning } from "../warnings";
import type { EstimateInputs } from "./inputs-schema";
import type { PreparedInputs } from "./prepare-inputs";

/** z of gas reservoirs; outside, an input is wrong more often than the gas is odd. Common practice, no source. */
const USUAL_Z = [0.6, 1.8] as const;

/**
 * Questions about the state of the gas in the reservoir, at the corners of pressure, temperature and yield that
 * stretch the correlations most (P90 and P10) and at P50: pseudocriticals and z factor outside their data, unusual z.
 * One warning of each kind.
 */
export function stateWarnings({ fluid }: EstimateInputs, prepared: PreparedInputs): Warning[] {
  const { pressurePsia, temperatureDegF, condensateYieldStbPerMmscf } = prepared.distributions;
  const constants = yieldConstants(prepared.wellstream);
  const found = new Map<string, Warning>();
  const corners = [
    ["p50", "p50", "p50"],
    ["p10", "p90", "p10"],
    ["p90", "p10", "p90"],
  ] as const;
  for (const [pressureLevel, temperatureLevel, yieldLevel] of corners) {
    const gravity = wellstreamGravityAtYield(
      condensateYieldStbPerMmscf.range[yieldLevel],
      constants,
    );
    const critical = pseudocritical(gravity, fluid);
    const reducedPressure = pressurePsia.range[pressureLevel] / critical.pressurePsia;
    const reducedTemperature =
      degreesRankine(temperatureDegF.range[temperatureLevel]) / critical.temperatureDegR;
    for (const warning of [
      ...pseudocriticalWarnings(gravity, fluid),
      ...zFactorWarnings(reducedPressure, reducedTemperature),
      ...unusualZ(zFactor(reducedPressure, reducedTemperature)),
    ]) {
      if (!found.has(warning.code)) found.set(warning.code, warning);
    }
  }
  return [...found.values()];
}

function unusualZ(z: number): Warning[] {
  if (z >= USUAL_Z[0] && z <= USUAL_Z[1]) return [];
  return [
    {
      code: "unusual_z",
      severity: "warning",
      input: "uncertain.pressurePsia",
      message: `The z factor is ${z.toFixed(2)}; usual values lie between 0.6 and 1.8. Check pressure, temperature and gravity.`,
    },
  ];
}
