"use client";

import { Fragment } from "react";
import type { InputName } from "@/analytics/volumetrics/inputs-schema";
import type { Range } from "@/analytics/volumetrics/results-schema";
import type { Warning } from "@/analytics/warnings";
import { formatFigure } from "@/components/ui/format";
import { FolioCell, GroupRow } from "@/components/ui/table";
import { Unit } from "@/components/ui/text";
import type { EstimateReading } from "./estimate-reading";
import type { EstimateText, InputText } from "./estimate-text";
import { inputGroups, inputOfPath } from "./input-catalogue";
import { InputRow } from "./input-row";

export interface InputTableProps {
  text: EstimateText;
  reading: EstimateReading;
  warnings: readonly Warning[];
  /** z of the trials; `null` until something was run */
  zFactor: Range | null;
  /** absent: the table is read, not typed */
  onChange?: (name: InputName, text: InputText) => void;
}

/** The ten inputs as a ledger, in three groups, and the z that follows from them. */
export function InputTable({ text, reading, warnings, zFactor, onChange }: InputTableProps) {
  const lines = inputGroups.reduce((count, group) => count + group.inputs.length, 0);
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
          {inputGroups.map((group) => (
            <Fragment key={group.title}>
              <GroupRow columns={7}>{group.title}</GroupRow>
              {group.inputs.map((name) => (
                <InputRow
                  key={name}
                  name={name}
                  text={text.inputs[name]}
                  reading={reading.inputs[name]}
                  warnings={warnings.filter((warning) => inputOfPath(warning.input) === name)}
                  onChange={onChange && ((next) => onChange(name, next))}
                />
              ))}
            </Fragment>
          ))}
          <tr>
            <td className="folio">{lines + 1}</td>
            <th scope="row" className="soft">
              Deviation factor z<small>of the wellstream</small>
            </th>
            {(["p90", "p50", "p10"] as const).map((key) => (
              <td key={key} className="slot">
                <span className="derived">{formatFigure(zFactor?.[key])}</span>
                <span className="slot-name" data-same="">
                  {key.toUpperCase()}
                </span>
              </td>
            ))}
            <td className="curve soft">Not typed</td>
            <td className="hint soft">
              Follows from pressure, temperature, yield and the fluid sample, trial by trial
            </td>
          </tr>
        </tbody>
      </table>
    </div>
  );
}
