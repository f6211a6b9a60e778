"use client";

import { tuningStanding } from "@/analytics/depletion/tuning-record";
import { isAdjusted } from "@/analytics/equation-of-state/characterisation-schema";
import { EquationOfStateSettings } from "@/components/fluid/equation-of-state-settings";
import { PhaseEnvelope } from "@/components/fluid/phase-envelope";
import { StagesSheet } from "@/components/fluid/stages-sheet";
import { Button } from "@/components/ui/button";
import { formatFigure } from "@/components/ui/format";
import { Section, Stack } from "@/components/ui/section";
import { Skeleton } from "@/components/ui/status";
import type { FluidPartProps } from "./fluid-sample";
import { FluidTuning } from "./fluid-tuning";

/** The phase envelope with what it is computed from: separators, split of the heavy end, tuning. */
export function FluidPhase(props: FluidPartProps) {
  const { study, reservoir, place } = props;
  const { equationOfState } = study;
  return (
    <div id="phase">
      <Stack close>
        {equationOfState.data && study.temperatureDegF !== null && props.draft.reading.stages ? (
          <div className={equationOfState.isStale ? "stale" : undefined}>
            <PhaseEnvelope
              result={equationOfState.data}
              temperatureDegF={study.temperatureDegF}
              initialPressurePsia={reservoir?.pressurePsia ?? null}
              abandonmentPressurePsia={props.abandonment}
              stages={props.draft.reading.stages}
              fileName={`${place}-phase-envelope`}
            />
          </div>
        ) : (
          <Section title="Phase envelope">
            {equationOfState.isFetching ? (
              <Skeleton lines={10} label="Working out the phase envelope" />
            ) : (
              <p className="text-13 text-ink-soft">{missingWords(props)}</p>
            )}
          </Section>
        )}
        <EquationOfStateSection {...props} />
      </Stack>
    </div>
  );
}

/** What the envelope still waits for. */
function missingWords({ draft, study }: FluidPartProps): string {
  const missing = [
    !study.sheet && "the composition",
    !draft.reading.stages && "the sheet of separators",
    study.temperatureDegF === null && "the reservoir temperature",
  ].filter((part) => part !== false);
  return missing.length === 0
    ? "It could not be worked out from this sheet."
    : `Appears when ${missing.join(" and ")} ${missing.length === 1 ? "is" : "are"} known.`;
}

function EquationOfStateSection({ draft, study, mayType, remarks }: FluidPartProps) {
  const { text, reading } = draft;
  const { characterisation } = reading;
  const { isTuned: tuned, doubt } = study.sheet
    ? tuningStanding({ sheet: study.sheet, characterisation, table: study.table }, text.tuning)
    : { isTuned: false, doubt: null };
  return (
    <Section
      level={3}
      title={tuned ? "Peng–Robinson, tuned" : "Peng–Robinson, untuned"}
      note={
        text.tuning && tuned
          ? `Fitted to a dew point of ${formatFigure(text.tuning.measuredDewPointPsia, { digits: 4 })} psia: gives ${formatFigure(text.tuning.fittedDewPointPsia, { digits: 4 })}${text.tuning.averageLiquidErrorPoints === null ? "" : `, dropout within ${formatFigure(text.tuning.averageLiquidErrorPoints, { digits: 2 })} points on average`}.`
          : (doubt ??
            "How the heavy end is described, and the separators that streams are flashed through.")
      }
    >
      <div className="grid grid-cols-1 gap-4">
        <EquationOfStateSettings
          value={characterisation}
          onChange={
            mayType ? (next) => draft.change({ characterisation: next, tuning: null }) : undefined
          }
        />
        {mayType && (
          <div className="flex flex-wrap items-center gap-2">
            <FluidTuning draft={draft} study={study} />
            {isAdjusted(characterisation) && (
              <Button
                size="small"
                onClick={() => draft.change({ characterisation: null, tuning: null })}
              >
                Back to untuned
              </Button>
            )}
          </div>
        )}
        <StagesSheet
          text={text.stages}
          stages={reading.stages}
          train={study.equationOfState.data?.train ?? null}
          isAssumed={reading.isStagesAssumed && study.sheet !== null}
          isTuned={study.equationOfState.data?.isTuned ?? false}
          hasTest={reading.separator.test !== null && text.origin === "measured"}
          state={{
            fields: reading.stagesReading?.fields ?? {},
            problems: study.problems.stages,
            remarks: remarks.stages,
          }}
          onChange={mayType ? (stages) => draft.change({ stages }) : undefined}
        />
      </div>
    </Section>
  );
}
