"use client";

import { planRanges } from "@/analytics/recovery/plan-ranges";
import {
  producingConcepts,
  type PlanInputName,
  type ProducingConcept,
} from "@/analytics/recovery/recovery-plan-schema";
import { InputRow } from "@/components/estimate/input-row";
import { PlanFields } from "@/components/estimate/plan-fields";
import type { PlanReading } from "@/components/estimate/plan-reading";
import type { PlanText } from "@/components/estimate/plan-text";
import { conceptLabels, shortConcepts } from "@/components/estimate/plan-words";
import { FolioCell, GroupRow } from "@/components/ui/table";

export type ConceptTexts = Record<ProducingConcept, { text: PlanText; reading: PlanReading }>;

interface Line {
  name: PlanInputName;
  concept: ProducingConcept;
  /** where every concept has its own */
  of?: string;
}

const groups: { title: string; part: "water" | "own"; lines: Line[] }[] = [
  {
    title: "All concepts",
    part: "water",
    lines: [{ name: "condensateCurveFactor", concept: "depletion" }],
  },
  {
    title: "Each concept",
    part: "own",
    lines: [
      ...producingConcepts.map((concept) => ({
        name: "abandonmentPressurePsia" as const,
        concept,
        of: shortConcepts[concept].toLowerCase(),
      })),
      { name: "sweepEfficiency", concept: "cycling" },
      { name: "displacementEfficiency", concept: "cycling" },
    ],
  },
];

/** What the concepts are worked out with, typed in the same rows as an estimate's inputs. */
export function AssumptionTable({
  texts,
  onChange,
}: {
  texts: ConceptTexts;
  onChange: (now: PlanText, next: PlanText) => void;
}) {
  const lines = groups.flatMap((group) => group.lines);
  return (
    <div className="ledger-frame">
      <table className="ledger-table ledger-table-input input-table">
        <caption className="sr-only">Assumptions of the concepts, with their ranges</caption>
        <thead>
          <tr>
            <FolioCell heading />
            <th scope="col">Assumption</th>
            <th scope="col" className="slot">
              Low, P90
            </th>
            <th scope="col" className="slot">
              Best, P50
            </th>
            <th scope="col" className="slot">
              High, P10
            </th>
            <th scope="col">Curve</th>
            <th scope="col">Shape, usual range, source</th>
          </tr>
        </thead>
        <tbody>
          {groups.map((group) => {
            const { concept } = group.part === "water" ? group.lines[0] : lines[lines.length - 1];
            const { text, reading } = texts[concept];
            return [
              <GroupRow key={group.title} columns={7}>
                {group.title}
              </GroupRow>,
              ...group.lines.map((line) => (
                <AssumptionRow
                  key={`${line.name} ${line.concept}`}
                  line={line}
                  number={lines.indexOf(line) + 1}
                  texts={texts}
                  onChange={onChange}
                />
              )),
              <tr key={`${group.title} figures`} className="follow plan-tail">
                <td className="folio" />
                <td colSpan={6}>
                  {group.part === "own" && (
                    <h4 className="mb-2 text-13 font-semibold">{conceptLabels.cycling}</h4>
                  )}
                  <PlanFields
                    part={group.part}
                    text={text}
                    reading={reading}
                    onChange={(next) => onChange(text, next)}
                  />
                </td>
              </tr>,
            ];
          })}
        </tbody>
      </table>
    </div>
  );
}

function AssumptionRow({
  line: { name, concept, of },
  number,
  texts,
  onChange,
}: {
  line: Line;
  number: number;
  texts: ConceptTexts;
  onChange: (now: PlanText, next: PlanText) => void;
}) {
  const { text, reading } = texts[concept];
  return (
    <InputRow
      name={name}
      of={of}
      line={number}
      expected={planRanges(text)[name]}
      text={text.inputs[name]}
      reading={reading.inputs[name]}
      warnings={[]}
      onChange={(next) => onChange(text, { ...text, inputs: { ...text.inputs, [name]: next } })}
    />
  );
}
