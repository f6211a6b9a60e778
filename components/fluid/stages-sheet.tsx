"use client";

import type { SeparatorStage } from "@/analytics/composition/composition-schema";
import type { EquationOfStateResponse } from "@/app/api/v1/calculations/fluid-schema";
import { Button } from "@/components/ui/button";
import { Figure } from "@/components/ui/figure";
import { Checkbox } from "@/components/ui/field";
import { Unit } from "@/components/ui/text";
import { EntryCell, EntryGrid, EntryProblems, type EntryState } from "./entry-grid";
import {
  emptyStages,
  MOST_STAGES,
  textOfStages,
  withStageCount,
  type StagesText,
} from "./stages-text";

export interface StagesSheetProps {
  /** `null`: those of the separator test */
  text: StagesText | null;
  /** what is computed with */
  stages: readonly SeparatorStage[] | null;
  train: EquationOfStateResponse["train"] | null;
  state: Omit<EntryState, "onChange" | "cells">;
  /** there is a separator test whose separators can be taken */
  hasTest: boolean;
  /** the equation of state that the streams are flashed by */
  isTuned: boolean;
  /** nobody has given any: the usual ones stand in */
  isAssumed?: boolean;
  /** absent: the sheet is read, not typed */
  onChange?: (text: StagesText | null) => void;
}

const stageName = (index: number, count: number) =>
  index === count - 1 ? "Stock tank" : `Separator ${index + 1}`;

/** Separators that streams are flashed through, and what each gives. */
export function StagesSheet({
  text,
  stages,
  train,
  state,
  hasTest,
  isTuned,
  isAssumed = false,
  onChange,
}: StagesSheetProps) {
  const count = text?.count ?? stages?.length ?? 0;
  const isOwn = text !== null;
  const entry: EntryState = {
    ...state,
    cells: text?.cells ?? (stages ? textOfStages(stages).cells : {}),
    onChange:
      onChange && text
        ? (changes) => onChange({ ...text, cells: { ...text.cells, ...changes } })
        : undefined,
  };
  const columns = train ? 5 : 3;
  return (
    <div className="grid grid-cols-1 gap-3">
      {onChange && hasTest && (
        <Checkbox
          label="The separators of the test"
          checked={!isOwn}
          onChange={(event) =>
            onChange(event.target.checked ? null : stages ? textOfStages(stages) : emptyStages())
          }
        />
      )}
      {isAssumed && (
        <p className="text-13 text-ink-soft">
          Assumed, as the sample gives no separators: one at 500 psia and 80 °F before the stock
          tank (common practice, no source).{" "}
          {onChange && stages && (
            <Button size="small" onClick={() => onChange(textOfStages(stages))}>
              Change them
            </Button>
          )}
        </p>
      )}
      {count === 0 ? (
        <p className="text-13 text-ink-soft">
          {onChange && !isOwn ? (
            <Button size="small" onClick={() => onChange(emptyStages())}>
              Enter the separators
            </Button>
          ) : (
            "No separators are given."
          )}
        </p>
      ) : (
        <EntryGrid
          grid={Array.from({ length: count }, (_, index) => [
            `${index}.pressurePsia`,
            `${index}.temperatureDegF`,
          ])}
          onFill={entry.onChange}
        >
          <table className="ledger-table entry-table">
            <caption className="sr-only">Separators</caption>
            <thead>
              <tr>
                <th scope="col">Stage</th>
                <th scope="col" className="right">
                  psia
                </th>
                <th scope="col" className="right">
                  °F
                </th>
                {train && (
                  <>
                    <th scope="col" className="right">
                      scf/STB
                    </th>
                    <th scope="col" className="right">
                      Gravity
                    </th>
                  </>
                )}
              </tr>
            </thead>
            <tbody>
              {Array.from({ length: count }, (_, index) => {
                const name = stageName(index, count);
                const places = [
                  { place: `${index}.pressurePsia`, label: `${name}, pressure` },
                  { place: `${index}.temperatureDegF`, label: `${name}, temperature` },
                ];
                const computed = train?.stages[index];
                return [
                  <tr key={name}>
                    <th scope="row" className="plain">
                      {name}
                    </th>
                    {places.map((cell) => (
                      <td key={cell.place} className="entry">
                        <EntryCell {...cell} state={entry} />
                      </td>
                    ))}
                    {train && (
                      <>
                        <td className="right">
                          <Figure value={computed?.gasScfPerStb} />
                        </td>
                        <td className="right">
                          <Figure value={computed?.gasGravity} />
                        </td>
                      </>
                    )}
                  </tr>,
                  <EntryProblems
                    key={`${name} problems`}
                    places={places}
                    columns={columns}
                    state={entry}
                  />,
                ];
              })}
              {train && (
                <tr className="total">
                  <th scope="row" colSpan={3}>
                    {isTuned ? "Tuned flash" : "Untuned flash"}, all stages:{" "}
                    {train.condensateApi.toFixed(1)} <Unit>°API</Unit>
                  </th>
                  <td className="right">
                    <Figure value={train.totalGasScfPerStb} />
                  </td>
                  <td className="right">
                    <Figure value={train.surfaceGas.gravity} />
                  </td>
                </tr>
              )}
            </tbody>
          </table>
        </EntryGrid>
      )}
      {onChange && text && (
        <div className="flex flex-wrap gap-2">
          <Button
            size="small"
            disabled={count >= MOST_STAGES}
            onClick={() => onChange(withStageCount(text, count + 1))}
          >
            Add a separator
          </Button>
          <Button
            size="small"
            disabled={count <= 1}
            onClick={() => onChange(withStageCount(text, count - 1))}
          >
            Take one out
          </Button>
        </div>
      )}
    </div>
  );
}
