"use client";

import { DailyRates } from "@/components/estimate/daily-rates";
import { BalanceTable, GasTable } from "@/components/estimate/wellstream-view";
import { CriticalBandFields } from "@/components/fluid/critical-band-fields";
import { DepletionPanels } from "@/components/fluid/depletion-panels";
import { DepletionSheet } from "@/components/fluid/depletion-sheet";
import { emptyDepletion } from "@/components/fluid/depletion-text";
import { fluidTypeOf } from "@/components/fluid/fluid-figures";
import { GasCompositionChart } from "@/components/fluid/gas-composition-chart";
import { producedBeforeDewPoint } from "@/components/fluid/above-dew-point";
import { HoffmannPlot } from "@/components/fluid/hoffmann-plot";
import { Button } from "@/components/ui/button";
import { Segmented } from "@/components/ui/choice";
import { formatPercent } from "@/components/ui/format";
import { Columns, Section, Stack } from "@/components/ui/section";
import { Skeleton } from "@/components/ui/status";
import { ConceptComparison } from "./concept-comparison";
import { keep } from "./fluid-entry";
import type { FluidPartProps } from "./fluid-sample";

interface DepletionProps extends FluidPartProps {
  /** the saved sample's name */
  sampleName: string | null;
}

/** What drops out, what is produced, and the laboratory's table that says so. */
export function FluidDepletion(props: DepletionProps) {
  const { study, place } = props;
  const { depletion, equationOfState } = study;
  const measuredGas = study.table?.rows.some(({ producedGas }) => producedGas !== null) ?? false;
  const gasTable = measuredGas ? study.table : (equationOfState.data?.depletion ?? null);
  const wellstream = study.wellstream.data ?? null;
  return (
    <div id="depletion">
      <Stack close>
        <ConceptComparison
          curves={study.curves}
          fluid={
            study.sheet && {
              sheet: study.sheet,
              characterisation: props.draft.reading.characterisation,
              tuning: props.draft.text.tuning,
              table: study.table,
            }
          }
          sampleName={props.sampleName}
          route={props.curve?.route}
          criticalBand={props.criticalBand}
          edits={props.edits}
          onEdits={props.onEdits}
          noCurveReason={study.noCurveReason}
          beside={<Panels {...props} />}
        />
        <TableSection {...props} />
        <Columns kind="equal">
          {gasTable && (
            <GasCompositionChart
              table={gasTable}
              source={
                measuredGas ? "laboratory" : equationOfState.data?.isTuned ? "tuned" : "untuned"
              }
              fileName={`${place}-produced-gas`}
            />
          )}
          {depletion.data && depletion.data.hoffmann.length > 0 && (
            <HoffmannPlot steps={depletion.data.hoffmann} fileName={`${place}-hoffmann`} />
          )}
          {wellstream && (
            <Section
              title={`Surface gas is ${formatPercent(wellstream.dryGasFraction, { decimals: 1 })} of the wellstream`}
              note="Moles that come with one stock-tank barrel, as gas at 14.696 psia and 60 °F"
            >
              <BalanceTable wellstream={wellstream} />
            </Section>
          )}
          {wellstream && (
            <Section title="The gas in numbers">
              <GasTable
                wellstream={wellstream}
                fluidType={study.composition.data && fluidTypeOf(null, study.composition.data)}
              />
            </Section>
          )}
          {wellstream && <DailyRates wellstream={wellstream} />}
        </Columns>
      </Stack>
    </div>
  );
}

function Panels({
  study,
  reservoir,
  place,
  curve,
  setRoute,
  abandonment,
  onAbandon,
  criticalBand,
  setCriticalBand,
  waterSaturation,
  abandonmentRange,
}: DepletionProps) {
  const { curves, table } = study;
  if (!curve || abandonment === null) {
    return (
      <Section title="Depletion">
        {study.equationOfState.isFetching || study.depletion.isFetching ? (
          <Skeleton lines={8} label="Working out the depletion" />
        ) : (
          <p className="text-13 text-ink-soft">
            {study.standing
              ? `${study.standing.heading}. A depletion below a dew point does not apply.`
              : "Appears with a composition and the reservoir temperature; a depletion table of the laboratory makes it a measurement."}
          </p>
        )}
      </Section>
    );
  }
  return (
    <div className={study.depletion.isStale || study.equationOfState.isStale ? "stale" : undefined}>
      <DepletionPanels
        curve={curve}
        others={curves.filter((other) => other !== curve)}
        measured={
          table?.rows.filter(({ pressurePsia }) => pressurePsia <= table.dewPointPsia) ?? []
        }
        initialPressurePsia={reservoir?.pressurePsia ?? null}
        contradiction={study.standing?.heading ?? null}
        criticalBand={criticalBand}
        waterSaturation={waterSaturation}
        abandonmentRange={abandonmentRange}
        producedBefore={producedBeforeDewPoint(
          study.wellstream.data?.pseudocritical ?? null,
          reservoir,
          curve.curve.dewPointPsia,
        )}
        abandonmentPressurePsia={abandonment}
        onAbandon={onAbandon}
        fileName={`${place}-depletion`}
      />
      <div className="mt-3 flex flex-wrap items-end gap-x-6 gap-y-2">
        {curves.length > 1 && (
          <div className="field">
            <span className="field-label">Figures from</span>
            <Segmented
              label="Figures from"
              value={curve.route}
              options={curves.map(({ route: value, label }) => ({ value, label }))}
              onChange={setRoute}
            />
          </div>
        )}
        <CriticalBandFields band={criticalBand} onChange={setCriticalBand} />
      </div>
    </div>
  );
}

function TableSection({ draft, study, mayType, reservoir, remarks, setRemarks }: DepletionProps) {
  const { text, reading } = draft;
  const { findings } = study;
  if (!text.depletion || !reading.depletion) {
    if (!mayType) return null;
    return (
      <Section title="Depletion table">
        <div className="flex flex-wrap items-center gap-3">
          <Button
            onClick={() =>
              draft.change({
                depletion: emptyDepletion(
                  reservoir?.temperatureDegF ?? null,
                  reading.separator.fields.dewPointPsia.value,
                ),
              })
            }
          >
            Enter a depletion table
          </Button>
          <p className="text-13 text-ink-soft">
            A constant-volume depletion of the laboratory: pressures, liquid, moles produced, z and
            the produced gas.
          </p>
        </div>
      </Section>
    );
  }
  const { depletion } = text;
  const worst = findings.filter(({ severity }) => severity !== "passed");
  const asked = worst.filter(({ message }) => !message.startsWith("Not checked"));
  return (
    <Section
      title="Depletion table"
      note={
        findings.length > 0
          ? asked.length === 0
            ? `${findings.length - worst.length} checks passed${worst.length > 0 ? `, ${worst.length} could not be made` : ""}.`
            : `${asked.length} of ${findings.length} checks ask for a look: they stand under “Does the sample hold together?”.`
          : "Constant volume, pressures from the dew point down. Empty cells: not reported."
      }
      tools={
        mayType && (
          <button type="button" onClick={() => draft.change({ depletion: null })}>
            Take the table out
          </button>
        )
      }
    >
      <DepletionSheet
        text={depletion}
        reading={reading.depletion}
        state={{
          problems: study.problems.depletion,
          remarks: { ...study.remarks.depletion, ...remarks.depletion },
        }}
        flags={
          new Set(
            worst.flatMap(({ row, column }) =>
              row === null || column === null
                ? []
                : [`rows.${reading.depletion?.rowsOfTable[row] ?? row}.${column}`],
            ),
          )
        }
        onChange={
          mayType
            ? (next) => {
                draft.change({ depletion: next });
                setRemarks({
                  ...remarks,
                  depletion: keep(remarks.depletion, depletion.cells, next.cells),
                });
              }
            : undefined
        }
      />
    </Section>
  );
}
