import { describe, expect, it } from "vitest";
import { readComposition } from "@/analytics/composition/read-sheet";
import { checkTable } from "@/analytics/depletion/check-table";
import { tuningStanding } from "@/analytics/depletion/tuning-record";
import { characterise } from "@/analytics/equation-of-state/characterise";
import { saturationPressures } from "@/analytics/equation-of-state/saturation";
import { sampleStudySchema } from "@/analytics/fluid/sample-study-schema";
import { recombine } from "@/analytics/fluid/wellstream";
import { recoveryCurveOfTable } from "@/analytics/depletion/curve-from-table";
import { degreesRankine } from "@/analytics/units/conversions";
import { separatorTestOf } from "@/seeders/demo/inputs";
import { studyOf } from "@/seeders/demo/recovery-plans";
import { demoReservoirs } from "@/seeders/demo/reservoirs";

const studies = demoReservoirs.flatMap((demo) => {
  const test = separatorTestOf(demo);
  const study = studyOf(demo, test);
  const { composition, characterisation } = study;
  if (!composition || !characterisation) return [];
  const { stream } = readComposition(composition);
  return [{ name: `${demo.field}, ${demo.name}`, test, study, stream, characterisation }];
});
const withTable = studies.flatMap(({ study, ...rest }) =>
  study.depletion ? [{ ...rest, study, table: study.depletion }] : [],
);
const analysed = withTable.filter(({ table }) => table.rows[1].producedGas !== null);

describe("studies of the demo", () => {
  it("cover laboratory tables, tuned and untuned fluids, an extended analysis and separator streams", () => {
    expect(analysed).toHaveLength(4);
    expect(studies.filter(({ study }) => study.tuning)).toHaveLength(6);
    expect(
      studies.some(({ stream }) => stream.components.some(({ name }) => name === "C12+")),
    ).toBe(true);
    expect(studies.some(({ study }) => study.composition?.kind === "separatorStreams")).toBe(true);
  });

  it.each(studies)(
    "$name is what a sample can keep, of one fluid with its separator sheet",
    (of) => {
      sampleStudySchema.parse(of.study);
      const { wellstreamGravity } = recombine(of.test);
      expect(Math.abs(of.stream.gravity / wellstreamGravity - 1)).toBeLessThan(0.04);
    },
  );

  it.each(analysed)("$name has a table that carries a recovery curve", (of) => {
    const failed = checkTable(of.table, of.stream).filter(({ severity }) => severity === "failed");
    // One laboratory printed a two-phase z that its own moles contradict.
    expect(failed.map(({ code, row }) => `${code} ${row}`)).toEqual(
      of.name.startsWith("Umberlow") ? ["two_phase_z 4"] : [],
    );
    const { curve } = recoveryCurveOfTable({
      table: of.table,
      stream: of.stream,
      stages: of.study.stages ?? [],
      characterisation: of.characterisation,
      route: "laboratory",
    });
    expect(curve?.points).toHaveLength(8);
  });

  it.each(studies.filter(({ study }) => study.tuning))(
    "$name keeps a tuning that counts as one and meets its dew point",
    ({ study, stream, characterisation }) => {
      const sheet = study.composition;
      if (!sheet) throw new Error("a tuned study without a composition");
      const fluid = { sheet, characterisation, table: study.depletion };
      expect(tuningStanding(fluid, study.tuning)).toEqual({ isTuned: true, doubt: null });
      const { mixture, moleFractions } = characterise(stream, characterisation);
      const temperature = degreesRankine(study.depletion?.temperatureDegF ?? 0);
      const { upper } = saturationPressures(mixture, moleFractions, temperature);
      expect(upper?.kind).toBe("dewPoint");
      expect(upper?.pressurePsia).toBeCloseTo(study.tuning?.fittedDewPointPsia ?? 0, -1);
      expect(
        Math.abs((upper?.pressurePsia ?? 0) - (study.tuning?.measuredDewPointPsia ?? 0)),
      ).toBeLessThan(5);
    },
  );
});
