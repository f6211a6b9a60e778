import type { Range } from "@/analytics/volumetrics/results-schema";
import { RangeMark, RangeScale } from "@/components/charts/range-mark";
import { scaleFor } from "@/components/charts/scale";
import { Figure } from "@/components/ui/figure";
import { formatDate, fractionDigits, MISSING } from "@/components/ui/format";
import { StateMark, type State } from "@/components/ui/text";

export interface Revision {
  id: string;
  revision: number;
  state: State;
  note: string;
  /** who decided, or else who wrote it */
  person: string;
  /** when that was */
  at: string;
  /** in the unit shown; `null` before the first run */
  range: Range | null;
}

/** Every revision of a reservoir with its mark, newest first, on one scale. */
export function RevisionList({
  revisions,
  unit,
  caption,
}: {
  revisions: readonly Revision[];
  unit: string;
  caption: string;
}) {
  const scale = scaleFor(
    revisions.flatMap(({ range }) => (range ? [range.p90, range.p10, range.mean] : [])),
  );
  const digits = fractionDigits(revisions.map(({ range }) => range?.p50));
  return (
    <table className="ledger-table">
      <caption className="sr-only">{caption}</caption>
      <thead>
        <tr>
          <th scope="col">
            <span className="sr-only">Revision</span>
          </th>
          <th scope="col">
            <span className="sr-only">State and reason</span>
          </th>
          <th scope="col" className="right">
            P50
          </th>
          <th scope="col" className="mark">
            <span className="sr-only">Range, {unit}</span>
            <RangeScale scale={scale} ticks={3} />
          </th>
        </tr>
      </thead>
      <tbody>
        {revisions.map(({ id, revision, state, note, person, at, range }) => (
          <tr key={id}>
            <th scope="row">r{revision}</th>
            <td className="wrap">
              <StateMark state={state} worded />
              <small className="block text-ink-soft">
                {note && `${note} `}
                {person}, {formatDate(at)}
              </small>
            </td>
            <td className="right strong">
              {range ? <Figure value={range.p50} fraction={digits} /> : MISSING}
            </td>
            <td className="mark">
              {range ? (
                <RangeMark
                  name={`r${revision}`}
                  range={range}
                  unit={unit}
                  scale={scale}
                  ticks={3}
                  tone={state === "superseded" ? "soft" : "condensate"}
                  tipSide="right"
                />
              ) : (
                <span className="no-mark">Not run</span>
              )}
            </td>
          </tr>
        ))}
      </tbody>
    </table>
  );
}
