import { formatPercent } from "@/components/ui/format";
import { percent } from "./scale";

export interface StackedRow {
  /** "P90" */
  label: string;
  /** the row's total as it is written at its end */
  total: string;
  /** in one order in every row, the last one soft: the rest together */
  parts: readonly { name: string; value: number }[];
}

/** Room kept for a total at the end of the longest bar [%]. */
const LONGEST = 90;
/** A part narrower than these [% of the row] has no room for its name, or its share; the table under the bars has both. */
const LEAST_NAMED = 18;
const LEAST_SHARED = 6;

/** Totals as bars on one scale, each cut into what its parts bring. */
export function StackedTotals({ label, rows }: { label: string; rows: readonly StackedRow[] }) {
  // A part below nothing takes no length; its figure stands in the table.
  const lengths = rows.map(({ parts }) =>
    parts.reduce((sum, { value }) => sum + Math.max(value, 0), 0),
  );
  const longest = Math.max(...lengths);
  if (!(longest > 0)) return null;

  return (
    <div className="stacked-totals" role="img" aria-label={`${label}: ${spoken(rows)}`}>
      {rows.map((row, index) => (
        <div key={row.label} className="stacked-row" aria-hidden="true">
          <span>{row.label}</span>
          <div>
            <div
              className="stacked-bar"
              style={{ width: percent((LONGEST * lengths[index]) / longest) }}
            >
              {row.parts.map(({ name, value }, part) => {
                const share = Math.max(value, 0) / lengths[index];
                const width = (share * LONGEST * lengths[index]) / longest;
                return (
                  <i
                    key={name}
                    data-part={part === row.parts.length - 1 ? "rest" : part % 3}
                    style={{ width: percent(100 * share) }}
                    title={`${name}, ${formatPercent(share)}`}
                  >
                    {width >= LEAST_SHARED && (
                      <b>
                        {width >= LEAST_NAMED && <span className="hide-phone">{name} </span>}
                        {formatPercent(share)}
                      </b>
                    )}
                  </i>
                );
              })}
            </div>
            <b>{row.total}</b>
          </div>
        </div>
      ))}
    </div>
  );
}

function spoken(rows: readonly StackedRow[]): string {
  return rows
    .map(({ label, total, parts }) => {
      const sum = parts.reduce((all, { value }) => all + value, 0);
      const [first] = parts;
      return `${label} ${total}, of which ${first.name} ${formatPercent(first.value / sum)}`;
    })
    .join("; ");
}
