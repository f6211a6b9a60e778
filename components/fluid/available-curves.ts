import {
  recoveryRouteLabels,
  recoveryRoutes,
  type RecoveryCurve,
  type RecoveryRoute,
} from "@/analytics/recovery/recovery-curve-schema";

/** A depletion curve that a sample can give, with the words that belong to it wherever it is used. */
export interface AvailableCurve {
  readonly route: RecoveryRoute;
  /** "Laboratory moles" */
  readonly label: string;
  /** what it rests on, in a sentence */
  readonly note: string;
  readonly curve: RecoveryCurve;
}

export const routeWords: Record<RecoveryRoute, { label: string; note: string }> = {
  laboratory: {
    label: recoveryRouteLabels.laboratory,
    note: "The laboratory’s moles and produced gas, flashed through the separators.",
  },
  tunedEquationOfState: {
    label: recoveryRouteLabels.tunedEquationOfState,
    note: "Peng–Robinson, fitted to the laboratory’s dew point and dropout.",
  },
  untunedEquationOfState: {
    label: recoveryRouteLabels.untunedEquationOfState,
    note: "Peng–Robinson as it comes, fitted to no measurement: an indication, not a fact.",
  },
  correlation: {
    label: recoveryRouteLabels.correlation,
    note: "From the yield and the dew point alone, for want of a depletion study.",
  },
};

/** The curves that exist, most trusted first. */
export function availableCurves(
  curves: readonly (RecoveryCurve | null | undefined)[],
): AvailableCurve[] {
  return curves
    .filter((curve): curve is RecoveryCurve => curve !== null && curve !== undefined)
    .sort((a, b) => recoveryRoutes.indexOf(a.route) - recoveryRoutes.indexOf(b.route))
    .map((curve) => ({ route: curve.route, ...routeWords[curve.route], curve }));
}
