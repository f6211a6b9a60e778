"use client";

import { useState } from "react";
import { errorWords } from "@/app/_client/request";
import { FindingList } from "@/components/estimate/finding-list";
import type { Cells } from "@/components/fluid/grid-paste";
import {
  BalanceTable,
  type VolumetricRanges,
} from "@/components/recovery/pressure-over-z/balance-table";
import { balanceWarnings } from "@/components/recovery/pressure-over-z/balance-words";
import { PressureOverZChart } from "@/components/recovery/pressure-over-z/pressure-over-z-chart";
import { RecordsSheet } from "@/components/recovery/pressure-over-z/records-sheet";
import {
  hasEntries,
  placeOfRecord,
  readRecords,
  type RecordsReading,
} from "@/components/recovery/pressure-over-z/records-text";
import { Disclosure } from "@/components/ui/dialog";
import { Section } from "@/components/ui/section";
import { Notice, Skeleton } from "@/components/ui/status";
import { readRecordsBackup, writeRecordsBackup } from "../_editor/records-backup";
import { useReservoir } from "../_editor/reservoir-context";
import { refusalsOf } from "../_queries/fluid-calculations";
import { useMaterialBalance } from "../_queries/material-balance";
import type { FluidPartProps } from "./fluid-sample";

type Props = Pick<FluidPartProps, "study" | "curve" | "reservoir" | "place">;

/** Gas in place by the p/z line, for a reservoir that has produced: a second opinion on the volumes of the rock. */
export function PressureOverZSection(props: Props) {
  const { page } = useReservoir();
  const [stored] = useState(() => readRecordsBackup(page.id));
  return (
    <Section
      title="Gas in place from pressures"
      note="For a reservoir that has produced: a straight line of p/z against what it gave, without a volume of rock. Kept in this tab only, and in none of the figures above."
    >
      <Disclosure label="Pressures and production" defaultOpen={hasEntries(stored)}>
        <Balance {...props} />
      </Disclosure>
    </Section>
  );
}

function Balance({ study, curve, reservoir, place }: Props) {
  const { page, text: estimate, results } = useReservoir();
  const [text, setText] = useState(() => readRecordsBackup(page.id));
  const reading = readRecords(text);
  const temperatureDegF = reservoir?.temperatureDegF ?? study.temperatureDegF;
  // A curve by correlation measures nothing, and pressures are not judged by it.
  const twoPhase = curve && curve.route !== "correlation" ? curve : null;
  const missing = missingOf(reading, study.test === null, temperatureDegF === null);
  // Without it the first line would be one by the gas's own z, which then moves.
  const isCurveComing =
    curve === null && (study.depletion.isFetching || study.equationOfState.isFetching);
  const query = useMaterialBalance(
    missing === null && !isCurveComing && reading.records && study.test && temperatureDegF !== null
      ? {
          records: reading.records,
          separatorTest: study.test,
          temperatureDegF,
          curve: twoPhase?.curve ?? null,
          depthFt: estimate?.depthFt ?? page.depthFt,
        }
      : null,
  );
  const problems = problemsOf(query.error, reading);
  const result = missing === null && !isCurveComing && !query.error ? (query.data ?? null) : null;
  const volumetric = volumetricOf(results.summary);
  return (
    <div className="balance">
      <RecordsSheet
        text={text}
        reading={reading}
        problems={problems}
        onChange={(next) => {
          setText(next);
          writeRecordsBackup(page.id, next);
        }}
      />
      <div className="grid grid-cols-1 content-start gap-4">
        {missing !== null && <p className="text-13 text-ink-soft">{missing}</p>}
        {missing === null && query.error && Object.keys(problems).length === 0 && (
          <Notice tone="error" live={false} title="These pressures give no line.">
            {errorWords(query.error)} What was typed is kept.
          </Notice>
        )}
        {missing === null && !query.error && !result && (
          <Skeleton lines={8} label="Fitting the line" />
        )}
        {result && (
          <div
            className={query.isPlaceholderData ? "stale grid gap-4" : "grid gap-4"}
            aria-live="polite"
          >
            <PressureOverZChart
              result={result}
              volumetric={volumetric?.wellstreamScf ?? null}
              source={twoPhase?.label ?? null}
              fileName={`${place}-pressure-over-z`}
            />
            <BalanceTable result={result} volumetric={volumetric} />
            <FindingList
              findings={balanceWarnings(result).map(({ severity, message }) => ({
                tone: severity,
                text: message,
              }))}
            />
          </div>
        )}
      </div>
    </div>
  );
}

/** What a line still needs, in a sentence; `null` when it has all. */
function missingOf(
  { records, incomplete, rowsOfRecords }: RecordsReading,
  lacksTest: boolean,
  lacksTemperature: boolean,
): string | null {
  if (rowsOfRecords.length === 0) {
    return "Type three or more reservoir pressures with the gas and condensate produced by then, or paste them from a spreadsheet: first row before production, with zeros.";
  }
  if (lacksTest)
    return "A separator test, entered above, turns condensate into gas: it is missing.";
  if (lacksTemperature) return "The reservoir temperature is missing from the estimate.";
  if (incomplete.length > 0) {
    const rows = incomplete.length === 1 ? `Row ${incomplete[0]} lacks` : "Some rows lack";
    return `${rows} a figure. Where no condensate was made, type 0.`;
  }
  if (records === null) return "A figure cannot be read.";
  if (records.length < 3) return "A line needs three pressures at least.";
  return null;
}

function problemsOf(error: Error | null, { rowsOfRecords }: RecordsReading): Cells {
  return Object.fromEntries(
    refusalsOf(error).flatMap(({ pointer, detail }) => {
      const at = placeOfRecord(pointer, rowsOfRecords);
      return at === null ? [] : [[at, detail]];
    }),
  );
}

function volumetricOf(
  summary: ReturnType<typeof useReservoir>["results"]["summary"],
): VolumetricRanges | null {
  return (
    summary && {
      wellstreamScf: summary.results.wetGasInPlaceScf,
      dryGasScf: summary.results.dryGasInPlaceScf,
      condensateStb: summary.results.condensateInPlaceStb,
    }
  );
}
