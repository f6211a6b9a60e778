import type { CompositionSheet } from "@/analytics/composition/composition-schema";
import { readComposition } from "@/analytics/composition/read-sheet";
import { underPath } from "@/analytics/errors";
import { dewPointEstimates } from "@/analytics/fluid/dew-point-correlations";
import { classifyFluid } from "@/analytics/fluid/fluid-type";
import type { SeparatorTest } from "@/analytics/fluid/separator-test-schema";
import { recombine } from "@/analytics/fluid/wellstream";
import { compareZFactors } from "@/analytics/gas/pseudocritical-composition";
import { warningsUnder } from "./warnings-under";

export interface CompositionQuestion {
  sheet: CompositionSheet;
  reservoir: { pressurePsia: number; temperatureDegF: number } | null;
  separatorTest: SeparatorTest | null;
}

/**
 * A composition sheet normalised, with what follows from it without an equation of state: gravity, type of fluid, z and
 * the dew point by correlation.
 *
 * @throws {DomainError} with a path into the question
 */
export function describeComposition({ sheet, reservoir, separatorTest }: CompositionQuestion) {
  const { stream, normalised, reportedMolePercent, warnings } = underPath("sheet", () =>
    readComposition(sheet),
  );
  const tested = separatorTest && underPath("separatorTest", () => recombine(separatorTest));
  const z = reservoir && underPath("reservoir", () => compareZFactors(stream, reservoir));
  return {
    normalised: [...normalised],
    components: stream.components.map(({ name, moleFraction, molecularWeight }, index) => ({
      name,
      reportedMolePercent: reportedMolePercent?.[index] ?? null,
      moleFraction,
      molecularWeight,
    })),
    heptanesPlus: stream.heptanesPlus,
    molecularWeight: stream.molecularWeight,
    gravity: stream.gravity,
    gravityFromSeparatorTest: tested?.wellstreamGravity ?? null,
    fluidType: classifyFluid({
      heptanesPlusMoleFraction: stream.heptanesPlus?.moleFraction ?? 0,
      surfaceGasOilRatioScfPerStb: tested?.surfaceGasOilRatioScfPerStb ?? null,
    }),
    zFactors: z && {
      fromComposition: z.fromComposition,
      compositionMethod: z.compositionMethod,
      fromKay: z.fromKay,
      fromGravity: z.fromGravity,
      gravityMethod: z.gravityMethod,
      relativeDifference: z.relativeDifference,
    },
    dewPointEstimates: reservoir
      ? dewPointEstimates(stream, reservoir.temperatureDegF).map((estimate) => ({
          ...estimate,
          warnings: estimate.warnings.map((warning) => ({
            ...warning,
            input: warning.input?.startsWith("stream")
              ? `sheet.${warning.input}`
              : `reservoir.${warning.input ?? ""}`,
          })),
        }))
      : [],
    warnings: [
      ...warningsUnder("sheet", warnings),
      // Warnings of a separator test name it as estimates do.
      ...(tested?.warnings ?? []).map((warning) => ({
        ...warning,
        input: (warning.input ?? "fluid").replace(/^fluid/, "separatorTest"),
      })),
      ...warningsUnder("reservoir", z?.warnings ?? []),
    ],
  };
}
