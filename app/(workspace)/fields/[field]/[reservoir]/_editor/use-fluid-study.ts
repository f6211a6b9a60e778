"use client";

import { useMemo } from "react";
import type { CompositionSheet } from "@/analytics/composition/composition-schema";
import { availableCurves } from "@/components/fluid/available-curves";
import { placeOfPointer } from "@/components/fluid/composition-text";
import type { Cells } from "@/components/fluid/grid-paste";
import { phaseStanding, type PhaseStanding } from "@/components/fluid/phase-standing";
import { failuresAtCells, rowChecks } from "@/components/fluid/row-checks";
import { screeningCurve } from "@/components/fluid/screening-curve";
import type { SampleReading, SampleText } from "@/components/fluid/sample-text";
import { useWellstream } from "../_queries/fluid";
import {
  refusalsOf,
  useComposition,
  useDepletion,
  useEquationOfState,
} from "../_queries/fluid-calculations";

export interface ReservoirPoint {
  pressurePsia: number;
  temperatureDegF: number;
}

/**
 * Everything that follows from a sample's sheets, as far as they are filled in: the wellstream, what the composition
 * says, the equation of state, the checked depletion table, and the depletion curves that they give.
 *
 * @param reservoir  P50 of the estimate; `null` while unknown
 */
export function useFluidStudy(
  text: SampleText,
  reading: SampleReading,
  reservoir: ReservoirPoint | null,
) {
  const sheet = reading.composition.sheet;
  const table = reading.depletion?.table ?? null;
  const typedTest = text.origin === "measured" ? reading.separator.test : null;
  const temperatureDegF = table?.temperatureDegF ?? reservoir?.temperatureDegF ?? null;
  const measuredDewPointPsia =
    table?.dewPointPsia ?? reading.separator.fields.dewPointPsia.value ?? null;
  const { stages, characterisation } = reading;

  const composition = useComposition(sheet && { sheet, reservoir, separatorTest: typedTest });
  const equationOfState = useEquationOfState(
    sheet && stages && temperatureDegF !== null
      ? {
          sheet,
          characterisation,
          temperatureDegF,
          measuredDewPointPsia,
          stages,
          depletionPressuresPsia: null,
          tuning: text.tuning,
          table: text.tuning && table,
        }
      : null,
  );
  const depletion = useDepletion(
    sheet && stages && table ? { sheet, table, stages, characterisation } : null,
  );
  const test =
    text.origin === "measured" ? typedTest : (equationOfState.data?.train?.separatorTest ?? null);
  const wellstream = useWellstream(test, reservoir);
  // Only for want of a composition: with one, the equation of state is the better guess.
  const screening = useMemo(
    () => screeningCurve(sheet ? null : test, temperatureDegF, measuredDewPointPsia),
    [sheet, test, temperatureDegF, measuredDewPointPsia],
  );
  const standing =
    equationOfState.data && temperatureDegF !== null
      ? phaseStanding(equationOfState.data, temperatureDegF)
      : null;
  const findings = useMemo(
    () => depletion.data?.findings ?? (table ? rowChecks(table) : []),
    [depletion.data, table],
  );
  const curves = useMemo(
    () => availableCurves([depletion.data?.curve, equationOfState.data?.curve, screening.curve]),
    [depletion.data, equationOfState.data, screening],
  );
  const problems = useMemo(
    () => ({
      composition: problemsAt(
        [composition.error, equationOfState.error, depletion.error],
        "sheet",
        reading.composition.fields,
      ),
      stages: problemsAt(
        [equationOfState.error, depletion.error],
        "stages",
        reading.stagesReading?.fields ?? {},
      ),
      depletion: {
        ...failuresAtCells(findings, reading.depletion?.rowsOfTable ?? []),
        ...problemsAt(
          [depletion.error],
          "table",
          reading.depletion?.fields ?? {},
          reading.depletion?.rowsOfTable,
        ),
      },
    }),
    [composition.error, equationOfState.error, depletion.error, findings, reading],
  );
  const remarks = remarksOf(standing, sheet?.kind ?? "wellstream");

  return {
    sheet,
    table,
    test,
    temperatureDegF,
    measuredDewPointPsia,
    composition,
    equationOfState,
    depletion,
    wellstream,
    curves,
    /** checks of the depletion table: all of them, or those of its rows while there is no composition */
    findings,
    /** what speaks against a dew point; `null` when nothing does */
    standing,
    /** what the equation of state says about a figure, by place */
    remarks,
    /** why a fluid without a composition has no curve; `null` when it has one, or has nothing to begin with */
    noCurveReason: screening.reason,
    /** what to know about the curve of a fluid without a composition */
    screeningWarnings: screening.warnings,
    problems,
  };
}

export type FluidStudy = ReturnType<typeof useFluidStudy>;

/** Where to look for what makes a fluid an oil, or a gas without a dew point. */
function remarksOf(
  standing: PhaseStanding | null,
  kind: CompositionSheet["kind"],
): { composition: Cells; depletion: Cells } {
  if (!standing || standing.kind === "dryGas") return { composition: {}, depletion: {} };
  const plus = `${kind === "wellstream" ? "stream" : "liquid"}.plus.molePercent`;
  return standing.kind === "oil"
    ? { composition: { [plus]: standing.advice }, depletion: {} }
    : { composition: {}, depletion: { temperatureDegF: standing.advice } };
}

/** The server's refusals that belong to a sheet's cells, by place. */
function problemsAt(
  errors: readonly (Error | null)[],
  under: string,
  fields: Readonly<Record<string, unknown>>,
  rowsOfTable: readonly number[] = [],
): Cells {
  return Object.fromEntries(
    errors.flatMap((error) =>
      refusalsOf(error).flatMap(({ pointer, detail }) => {
        const place = placeOfPointer(pointer, under).replace(
          /^rows\.(\d+)/,
          (whole, row: string) => `rows.${rowsOfTable[Number(row)] ?? row}`,
        );
        return place in fields ? [[place, detail]] : [];
      }),
    ),
  );
}
