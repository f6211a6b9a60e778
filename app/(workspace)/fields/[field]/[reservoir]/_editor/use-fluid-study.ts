"use client";

import { useMemo } from "react";
import { availableCurves } from "@/components/fluid/available-curves";
import { placeOfPointer } from "@/components/fluid/composition-text";
import type { Cells } from "@/components/fluid/grid-paste";
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
      depletion: problemsAt(
        [depletion.error],
        "table",
        reading.depletion?.fields ?? {},
        reading.depletion?.rowsOfTable,
      ),
    }),
    [composition.error, equationOfState.error, depletion.error, reading],
  );

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
    /** why a fluid without a composition has no curve; `null` when it has one, or has nothing to begin with */
    noCurveReason: screening.reason,
    /** what to know about the curve of a fluid without a composition */
    screeningWarnings: screening.warnings,
    problems,
  };
}

export type FluidStudy = ReturnType<typeof useFluidStudy>;

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
