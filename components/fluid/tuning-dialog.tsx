"use client";

import { useId, useState } from "react";
import {
  tunableNames,
  type TunableName,
} from "@/analytics/equation-of-state/characterisation-schema";
import type { TuningResponse } from "@/app/api/v1/calculations/fluid-schema";
import { Button } from "@/components/ui/button";
import { Dialog } from "@/components/ui/dialog";
import { Checkbox } from "@/components/ui/field";
import { Figure } from "@/components/ui/figure";
import { formatFigure } from "@/components/ui/format";
import { Notice, Progress } from "@/components/ui/status";
import { TuningChart } from "./tuning-chart";

export const tunableWords: Record<TunableName, { label: string; note: string }> = {
  heavyCriticalTemperatureFactor: {
    label: "Critical temperature of the heavy fractions",
    note: "Moves the dew point most.",
  },
  heavyCriticalPressureFactor: {
    label: "Critical pressure of the heavy fractions",
    note: "Moves dew point and dropout.",
  },
  heavyAcentricFactorFactor: {
    label: "Acentric factor of the heavy fractions",
    note: "Bends the dropout at low pressure.",
  },
  methaneHeavyInteractionFactor: {
    label: "Interaction of methane with the heavy fractions",
    note: "Moves the dew point, hardly the densities.",
  },
  heavyVolumeShiftFactor: {
    label: "Volume shift of the heavy fractions",
    note: "Scales the liquid’s volume; no effect on the dew point.",
  },
};

/** What is usually moved first: both ends of the dew point, and little else. Common practice, no source. */
const FIRST_CHOICE: readonly TunableName[] = [
  "heavyCriticalTemperatureFactor",
  "methaneHeavyInteractionFactor",
];

export interface TuningDialogProps {
  open: boolean;
  onClose: () => void;
  measured: {
    dewPointPsia: number;
    rows: readonly { pressurePsia: number; liquidPercent: number | null }[];
  };
  result: TuningResponse | null;
  busy: boolean;
  /** why the last run gave nothing */
  failure: string | null;
  onRun: (tunables: TunableName[]) => void;
  onCancel: () => void;
  onAccept: (result: TuningResponse) => void;
}

/** Fits the equation of state to the laboratory's table: chosen, run, looked at, and only then taken over or not. */
export function TuningDialog({
  open,
  onClose,
  measured,
  result,
  busy,
  failure,
  onRun,
  onCancel,
  onAccept,
}: TuningDialogProps) {
  const [chosen, setChosen] = useState<readonly TunableName[]>(FIRST_CHOICE);
  const group = useId();
  return (
    <Dialog
      open={open}
      onClose={onClose}
      width={860}
      title="Tune the equation of state"
      description="Moves what you choose until dew point and dropout fit the laboratory’s table. Nothing is taken over before you have seen it."
      actions={
        <>
          <Button onClick={onClose}>{result ? "Discard" : "Cancel"}</Button>
          <Button
            kind={result ? "plain" : "primary"}
            disabled={chosen.length === 0}
            busy={busy}
            busyLabel="Fitting…"
            onClick={() => onRun([...chosen])}
          >
            {result ? "Run again" : "Run"}
          </Button>
          {result && (
            <Button kind="primary" disabled={busy} onClick={() => onAccept(result)}>
              Take it over
            </Button>
          )}
        </>
      }
    >
      <div className="grid grid-cols-1 gap-4">
        <div role="group" aria-labelledby={group} className="grid grid-cols-1 gap-1.5">
          <span id={group} className="field-label">
            What may move
          </span>
          {tunableNames.map((name) => (
            <Checkbox
              key={name}
              label={
                <>
                  {tunableWords[name].label}{" "}
                  <span className="text-ink-soft">{tunableWords[name].note}</span>
                </>
              }
              checked={chosen.includes(name)}
              onChange={(event) =>
                setChosen(
                  tunableNames.filter((other) =>
                    other === name ? event.target.checked : chosen.includes(other),
                  ),
                )
              }
            />
          ))}
        </div>
        {busy && (
          <Progress
            label="Fitting to the laboratory’s table"
            note="Each try is a whole depletion; it usually takes some seconds."
            action={
              <Button size="small" onClick={onCancel}>
                Stop
              </Button>
            }
          />
        )}
        {failure !== null && !busy && (
          <Notice tone="error" title="The fit gave no answer.">
            {failure} The equation of state stays as it was.
          </Notice>
        )}
        {result && !busy && <Outcome result={result} measured={measured} />}
      </div>
    </Dialog>
  );
}

function Outcome({
  result,
  measured,
}: {
  result: TuningResponse;
  measured: TuningDialogProps["measured"];
}) {
  const { before, after, changes, iterations, warnings } = result;
  const miss = (dewPointPsia: number | null) =>
    dewPointPsia === null ? null : dewPointPsia - measured.dewPointPsia;
  const rows = [
    {
      label: "Dew point, psia",
      values: [measured.dewPointPsia, before.dewPointPsia, after.dewPointPsia],
      digits: 4,
    },
    {
      label: "Dew point less measured, psi",
      values: [null, miss(before.dewPointPsia), miss(after.dewPointPsia)],
      signed: true,
    },
    {
      label: "Dropout misses by, points on average",
      values: [null, before.averageLiquidErrorPoints, after.averageLiquidErrorPoints],
    },
    { label: "Sum of squares", values: [null, before.objective, after.objective] },
  ];
  const bound = changes.filter(({ atBound }) => atBound);
  return (
    <div className="grid grid-cols-1 gap-4">
      <div className="tuning-outcome">
        <table className="ledger-table">
          <caption className="sr-only">The fit before and after</caption>
          <thead>
            <tr>
              <td />
              <th scope="col" className="right">
                Measured
              </th>
              <th scope="col" className="right">
                Before
              </th>
              <th scope="col" className="right">
                After
              </th>
            </tr>
          </thead>
          <tbody>
            {rows.map(({ label, values, digits, signed }) => (
              <tr key={label}>
                <th scope="row" className="plain wrap">
                  {label}
                </th>
                {values.map((value, index) => (
                  <td key={index} className={index === 2 ? "right strong" : "right"}>
                    <Figure value={value} digits={digits} signed={signed} />
                  </td>
                ))}
              </tr>
            ))}
          </tbody>
        </table>
        <table className="ledger-table">
          <caption className="sr-only">What was moved</caption>
          <thead>
            <tr>
              <th scope="col">Moved</th>
              <th scope="col" className="right">
                From
              </th>
              <th scope="col" className="right">
                To
              </th>
            </tr>
          </thead>
          <tbody>
            {changes.map(({ name, from, to, atBound }) => (
              <tr key={name} className={atBound ? "flagged" : undefined}>
                <th scope="row" className="plain wrap">
                  {tunableWords[name].label}
                  {atBound && <small>Stopped at its bound</small>}
                </th>
                <td className="right">
                  <Figure value={from} digits={4} />
                </td>
                <td className="right strong">
                  <Figure value={to} digits={4} />
                </td>
              </tr>
            ))}
          </tbody>
        </table>
      </div>
      {bound.length > 0 && (
        <Notice
          title={
            bound.length === 1
              ? "One stopped at its bound."
              : `${bound.length} stopped at their bounds.`
          }
        >
          The data ask for more than is plausible: check the plus fraction and the table, or let
          another quantity move.
        </Notice>
      )}
      {warnings.map(({ code, message }) => (
        <Notice key={code} title="To look at.">
          {message}
        </Notice>
      ))}
      <TuningChart result={result} measured={measured} />
      <p className="text-12 text-ink-soft">
        {formatFigure(iterations, { decimals: 0 })} iterations. A fit to one sample holds for that
        sample; it says nothing about the next well.
      </p>
    </div>
  );
}
