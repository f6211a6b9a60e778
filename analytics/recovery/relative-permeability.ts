import { DomainError } from "../errors";

/** Corey curves of gas and condensate; saturations are fractions of the hydrocarbon pore volume. */
export interface RelativePermeability {
  readonly gasExponent: number;
  readonly condensateExponent: number;
  readonly criticalCondensateSaturation: number;
  readonly residualGasSaturation: number;
}

/** @throws {DomainError} when no saturation is left at which both flow */
export function assertRelativePermeability({
  criticalCondensateSaturation: critical,
  residualGasSaturation: residual,
}: RelativePermeability): void {
  if (critical + residual < 1) return;
  throw new DomainError(
    `With ${critical} of immobile condensate and ${residual} of trapped gas there is no saturation at which both flow.`,
    { input: "relativePermeability.criticalCondensateSaturation", value: critical },
  );
}

/** krg = ((1 - S - Sgr) / (1 - Sgr))^n: 1 without condensate. */
export function gasRelativePermeability(
  saturation: number,
  { gasExponent, residualGasSaturation }: RelativePermeability,
): number {
  const movable = 1 - saturation - residualGasSaturation;
  return movable > 0 ? (movable / (1 - residualGasSaturation)) ** gasExponent : 0;
}

/** kro = ((S - Sc) / (1 - Sc - Sgr))^n: 0 up to the critical saturation, 1 where gas is trapped. */
export function condensateRelativePermeability(
  saturation: number,
  {
    condensateExponent,
    criticalCondensateSaturation: critical,
    residualGasSaturation,
  }: RelativePermeability,
): number {
  const movable = saturation - critical;
  return movable > 0 ? (movable / (1 - critical - residualGasSaturation)) ** condensateExponent : 0;
}

const BISECTIONS = 60;

/**
 * Condensate saturation at which gas and condensate flow in a given ratio krg / kro, which falls steadily from infinity
 * at the critical saturation to zero where gas is trapped.
 *
 * @param ratio  above zero
 */
export function saturationAtRatio(ratio: number, curves: RelativePermeability): number {
  let low = curves.criticalCondensateSaturation;
  let high = 1 - curves.residualGasSaturation;
  for (let i = 0; i < BISECTIONS; i += 1) {
    const middle = 0.5 * (low + high);
    const gas = gasRelativePermeability(middle, curves);
    if (gas > ratio * condensateRelativePermeability(middle, curves)) low = middle;
    else high = middle;
  }
  return 0.5 * (low + high);
}
