import { z } from "zod";

/**
 * Where a recovery comes from, in the order of trust: laboratory moles with separator flash, a tuned equation of state,
 * an untuned one (never shown as fact), a correlation.
 */
export const recoveryRoutes = [
  "laboratory",
  "tunedEquationOfState",
  "untunedEquationOfState",
  "correlation",
] as const;
export type RecoveryRoute = (typeof recoveryRoutes)[number];

/** Words for screens and files. */
export const recoveryRouteLabels: Record<RecoveryRoute, string> = {
  laboratory: "Laboratory",
  tunedEquationOfState: "Tuned equation of state",
  untunedEquationOfState: "Untuned equation of state",
  correlation: "Correlation",
};

/** The route that decides how far a figure from several of them can be trusted; null when there is none among them. */
export function leastTrusted(routes: readonly (RecoveryRoute | null)[]): RecoveryRoute | null {
  return [...recoveryRoutes].reverse().find((route) => routes.includes(route)) ?? null;
}

/** Whether a recovery has no measured depletion behind it, and is marked wherever it goes. */
export const isUnmeasured = (route: RecoveryRoute | null): boolean =>
  route === "untunedEquationOfState" || route === "correlation";

const share = z.number().min(0).max(1);

/** State of the depletion at one pressure, per unit of the fluid at the dew point. */
export const recoveryPointSchema = z
  .object({
    pressurePsia: z.number().positive(),
    /** wellstream produced so far, share of the moles at the dew point */
    wellstreamProduced: share,
    /** surface gas produced so far, share of the surface gas in place at the dew point */
    gasProduced: share,
    /** stock-tank condensate produced so far, share of the condensate in place at the dew point */
    condensateProduced: share,
    /** condensate still in the reservoir's gas phase, as stock-tank liquid, same basis */
    condensateInGas: share,
    /** retrograde liquid, fraction of the hydrocarbon pore volume */
    liquidSaturation: share,
    /** of the gas phase */
    gasZ: z.number().positive(),
    twoPhaseZ: z.number().positive(),
    /** condensate of the gas being produced, STB per MMscf of its surface gas */
    producingYieldStbPerMmscf: z.number().nonnegative(),
  })
  .strict();
export type RecoveryPoint = z.infer<typeof recoveryPointSchema>;

/**
 * Depletion below the dew point, from the dew point (first point: nothing produced, all condensate in the gas) to the
 * lowest pressure known. What is left in the rock is 1 less produced less in the gas.
 */
export const recoveryCurveSchema = z
  .object({
    route: z.enum(recoveryRoutes),
    temperatureDegF: z.number(),
    dewPointPsia: z.number().positive(),
    points: z.array(recoveryPointSchema).min(2).max(60),
    /** what speaks against it, a sentence each: checks that its table failed. Absent where nothing does. */
    doubts: z.array(z.string().max(1000)).max(20).optional(),
  })
  .strict();
export type RecoveryCurve = z.infer<typeof recoveryCurveSchema>;
