"use client";

import { Fragment, type ReactNode } from "react";
import { planRanges } from "@/analytics/recovery/plan-ranges";
import type { DriverName, Range, SimulationSummary } from "@/analytics/volumetrics/results-schema";
import { usualRanges } from "@/analytics/volumetrics/usual-ranges";
import type { Warning } from "@/analytics/warnings";
import { formatFigure } from "@/components/ui/format";
import { FolioCell, GroupRow } from "@/components/ui/table";
import { Unit } from "@/components/ui/text";
import { caseSetsOf } from "./case-sets";
import type { EstimateReading } from "./estimate-reading";
import { inputText, type EstimateText } from "./estimate-text";
import { inputGroups, inputOfPath } from "./input-catalogue";
import type { InputReading } from "./input-reading";
import { InputRow, type ExpectedRange } from "./input-row";
import type { InputText } from "./input-text";
import { HandRow, PlanHeadRow, PlanSettingsRow, type PlanChanges } from "./plan-rows";

export interface InputTableProps {
  text: EstimateText;
  reading: EstimateReading;
  warnings: readonly Warning[];
  /** of the trials; `null` until something was run */
  summary: SimulationSummary | null;
  /** where curves and concepts are looked at */
  fluidHref: string;
  /** absent: the table is read, not typed */
  onChange?: (name: DriverName, text: InputText) => void;
  /** absent as `onChange` */
  planChanges?: PlanChanges | null;
}

/**
 * The inputs as a ledger, in three groups, and what follows from them: z, and with a recovery plan the recoveries, whose
 * lines the plan's inputs take.
 */
export function InputTable(props: InputTableProps) {
  const { text, reading, summary, fluidHref, planChanges } = props;
  const planInputs = reading.plan && reading.plan.used;
  const groups = inputGroups(planInputs);
  const lines = groups.flatMap(({ inputs }) => inputs);
  const workedOut = planInputs ? 2 : 0;
  return (
    <div className="ledger-frame">
      <table className="ledger-table ledger-table-input input-table">
        <caption className="sr-only">Inputs, with their ranges, shapes and sources</caption>
        <thead>
          <tr>
            <FolioCell heading />
            <th scope="col">Input</th>
            <th scope="col" className="slot">
              Low, P90
            </th>
            <th scope="col" className="slot">
              Best, P50
            </th>
            <th scope="col" className="slot">
              High, P10
            </th>
            <th scope="col">
              Curve <Unit>bar below: usual range</Unit>
            </th>
            <th scope="col">Shape, usual range, source</th>
          </tr>
        </thead>
        <tbody>
          {groups.map((group) => (
            <Fragment key={group.title}>
              <GroupRow columns={7}>{group.title}</GroupRow>
              {group.inputs.map((name) => (
                <Fragment key={name}>
                  {name === planInputs?.[0] && text.plan && reading.plan && (
                    <PlanHeadRow
                      text={text.plan}
                      fluidHref={fluidHref}
                      changes={planChanges ?? undefined}
                    />
                  )}
                  <Line {...props} name={name} line={lines.indexOf(name) + 1} />
                  {name === planInputs?.at(-1) && text.plan && reading.plan && (
                    <PlanSettingsRow
                      text={text.plan}
                      reading={reading.plan}
                      changes={planChanges ?? undefined}
                    />
                  )}
                  {name === "condensateRecovery" && planChanges && (
                    <HandRow plan={text.plan} fluidHref={fluidHref} changes={planChanges} />
                  )}
                </Fragment>
              ))}
            </Fragment>
          ))}
          {planInputs && (
            <>
              <WorkedOutRow
                line={lines.length + 1}
                label="Gas recovery"
                note="of dry gas in place"
                range={summary?.derived.gasRecovery}
              >
                Worked out from the curve in every trial
              </WorkedOutRow>
              <WorkedOutRow
                line={lines.length + 2}
                label="Condensate recovery"
                note="of condensate in place"
                range={summary?.derived.condensateRecovery}
              >
                Worked out from the curve in every trial
              </WorkedOutRow>
            </>
          )}
          <WorkedOutRow
            line={lines.length + workedOut + 1}
            label="Deviation factor z"
            note="of the wellstream"
            range={summary?.derived.zFactor}
          >
            Follows from pressure, temperature, yield and the fluid sample, trial by trial
          </WorkedOutRow>
        </tbody>
      </table>
    </div>
  );
}

function Line({
  name,
  line,
  text,
  reading,
  warnings,
  onChange,
}: InputTableProps & { name: DriverName; line: number }) {
  const typed = inputText(text, name);
  if (!typed) return null;
  return (
    <InputRow
      name={name}
      line={line}
      expected={expectedOf(name, text)}
      text={typed}
      reading={readingOf(name, reading)}
      warnings={warnings.filter((warning) => inputOfPath(warning.input) === name)}
      caseSets={name in text.inputs ? caseSetsOf(text.inputs) : null}
      onChange={onChange && ((next) => onChange(name, next))}
    />
  );
}

function expectedOf(name: DriverName, { plan }: EstimateText): ExpectedRange {
  if (name in usualRanges) return usualRanges[name as keyof typeof usualRanges];
  if (!plan) throw new RangeError(`${name} belongs to a recovery plan, and there is none`);
  const ranges = planRanges(plan);
  return ranges[name as keyof typeof ranges];
}

const readingOf = (name: DriverName, { inputs, plan }: EstimateReading): InputReading =>
  ({ ...inputs, ...plan?.inputs })[name as keyof typeof inputs];

/** What is not typed but follows from the inputs. */
function WorkedOutRow({
  line,
  label,
  note,
  range,
  children,
}: {
  line: number;
  label: string;
  note: string;
  range: Range | undefined;
  children: ReactNode;
}) {
  return (
    <tr>
      <td className="folio">{line}</td>
      <th scope="row" className="soft">
        {label}
        <small>{note}</small>
      </th>
      {(["p90", "p50", "p10"] as const).map((key) => (
        <td key={key} className="slot">
          <span className="derived">{formatFigure(range?.[key])}</span>
          <span className="slot-name" data-same="">
            {key.toUpperCase()}
          </span>
        </td>
      ))}
      <td className="curve soft">Not typed</td>
      <td className="hint soft">{children}</td>
    </tr>
  );
}
