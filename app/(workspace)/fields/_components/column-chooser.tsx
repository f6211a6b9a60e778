"use client";

import { useState } from "react";
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
  // The address changes in a transition; a box shows its tick at once.
  const [shown, setShown] = useState(chosen);
  const [known, setKnown] = useState(chosen);
  if (chosen.join() !== known.join()) {
    setKnown(chosen);
    setShown(chosen);
  }
  function choose(columns: RankingColumnId[]) {
    setShown(columns);
    onChange(columns);
  }
  const toggle = (id: RankingColumnId) =>
    choose(
      orderColumns(shown.includes(id) ? shown.filter((other) => other !== id) : [...shown, id]),
    );

  return (
    <div className="column-chooser no-print" id="ranking-columns" role="group" aria-label="Columns">
      {rankingColumnGroups.map(({ label, ids }) => (
        <fieldset key={label}>
          <legend>{label}</legend>
          {ids.map((id) => (
            <label key={id} className="check">
              <input type="checkbox" checked={shown.includes(id)} onChange={() => toggle(id)} />
              {rankingColumn(id).label}
            </label>
          ))}
        </fieldset>
      ))}
      <div className="column-chooser-foot">
        <p>The page’s link keeps the choice, and Export CSV writes these columns.</p>
        <Button size="small" onClick={() => choose([...defaultRankingColumns])}>
          Reset
        </Button>
      </div>
    </div>
  );
}
