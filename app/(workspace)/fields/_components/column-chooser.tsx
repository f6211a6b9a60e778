"use client";

import {
  defaultRankingColumns,
  orderColumns,
  rankingColumn,
  rankingColumnGroups,
  type RankingColumnId,
} from "@/analytics/portfolio/ranking-columns";
import { Button } from "@/components/ui/button";

/** A strip between filters and table, so that it covers no figure. The choice lives in the address. */
export function ColumnChooser({
  chosen,
  onChange,
}: {
  chosen: readonly RankingColumnId[];
  onChange: (columns: RankingColumnId[]) => void;
}) {
  const toggle = (id: RankingColumnId) =>
    onChange(
      orderColumns(chosen.includes(id) ? chosen.filter((other) => other !== id) : [...chosen, id]),
    );
  return (
    <div className="column-chooser no-print" id="ranking-columns" role="group" aria-label="Columns">
      {rankingColumnGroups.map(({ label, ids }) => (
        <fieldset key={label}>
          <legend>{label}</legend>
          {ids.map((id) => (
            <label key={id} className="check">
              <input type="checkbox" checked={chosen.includes(id)} onChange={() => toggle(id)} />
              {rankingColumn(id).label}
            </label>
          ))}
        </fieldset>
      ))}
      <div className="column-chooser-foot">
        <p>The page’s link keeps the choice, and Export CSV writes these columns.</p>
        <Button size="small" onClick={() => onChange([...defaultRankingColumns])}>
          Reset
        </Button>
      </div>
    </div>
  );
}
