"use client";

import { useState } from "react";
import { rankingColumn } from "@/analytics/portfolio/ranking-columns";
import { errorWords } from "@/app/_client/request";
import { useCan } from "@/app/_client/use-session";
import { UseOwnSet } from "@/app/_workspace/use-own-set";
import type { Ranking } from "@/app/api/v1/fields/ranking-schema";
import type { Basis } from "@/components/basis/basis";
import { capital, countOf, reportingOf, riskWords } from "@/components/portfolio/reporting";
import { Button, LinkButton } from "@/components/ui/button";
import { formatPercent } from "@/components/ui/format";
import { Page, PageHead } from "@/components/ui/section";
import { EmptyState, Notice, Skeleton } from "@/components/ui/status";
import { useRanking } from "../_queries/ranking";
import { ColumnChooser } from "./column-chooser";
import {
  isFiltered,
  noFilter,
  PAGE_ROWS,
  useRankingView,
  type RankingState,
} from "./ranking-address";
import { RankingFilters } from "./ranking-filters";
import { RankingTable } from "./ranking-table";
import { Selection } from "./selection";

/** The planner's working table: every field with its range, on one price deck. */
export function RankingPage() {
  const state = useRankingView();
  const { data, error, refetch, isPlaceholderData } = useRanking(state.apiSearch);
  const title = `Fields by ${rankingColumn(state.view.sort).label.replace(" mean", "").toLowerCase()}`;

  if (error) {
    return (
      <Page wide>
        <PageHead title={title} />
        <Notice
          tone="error"
          title="The fields could not be ranked."
          actions={
            <>
              <UseOwnSet error={error} />
              <Button size="small" onClick={() => void refetch()}>
                Try again
              </Button>
            </>
          }
        >
          {errorWords(error)} Nothing in the book has changed.
        </Notice>
      </Page>
    );
  }
  return (
    <Page wide>
      <PageHead
        title={title}
        lead={data ? leadOf(data, state.basis.risk) : "Reading the estimates."}
        actions={<Actions state={state} />}
      />
      {data ? (
        <RankingBody state={state} ranking={data} stale={isPlaceholderData} />
      ) : (
        <Skeleton lines={16} label="Ranking the fields" />
      )}
    </Page>
  );
}

function Actions({ state }: { state: RankingState }) {
  const can = useCan();
  return (
    <>
      {can("export.create") && (
        <a className="button" href={`/api/v1/exports/ranking.csv?${state.exportSearch}`} download>
          Export CSV
        </a>
      )}
      {can("import.create") && <LinkButton href="/import">Import reservoirs</LinkButton>}
      {can("field.create") && (
        <LinkButton kind="primary" icon="plus" href="/fields/new">
          Add field
        </LinkButton>
      )}
    </>
  );
}

/** What the ranking stands on, and how sure its first place is. */
function leadOf(
  { choices, prices, leader, fieldsInAll, dependence }: Ranking,
  risk: Basis["risk"],
): string {
  if (fieldsInAll === 0) return "The book has no fields yet.";
  const basins = capital(countOf(choices.basins.length, "basin"));
  const value = prices
    ? `${basins}, one price deck; values are undiscounted, at its flat prices.`
    : `${basins}, and no published price deck yet: volumes only.`;
  const first = leader
    ? ` ${leader.name} has the largest mean and comes first in ${formatPercent(leader.chance)} of trials.`
    : "";
  const totals = ` Totals are trial by trial, ${riskWords[risk]}, with fields moving together by “${dependence.name}”.`;
  const nothing =
    risk === "yesNo" ? " Where a field does not come, its trial counts as nothing." : "";
  return value + first + totals + nothing;
}

function RankingBody({
  state,
  ranking,
  stale,
}: {
  state: RankingState;
  ranking: Ranking;
  stale: boolean;
}) {
  const { view, setView, basis } = state;
  const can = useCan();
  const [columnsOpen, setColumnsOpen] = useState(false);
  const [selected, setSelected] = useState<ReadonlySet<string>>(new Set());
  const reporting = reportingOf(basis, ranking.prices);

  function handleSelect(ids: readonly string[], chosen: boolean) {
    setSelected((known) => {
      const next = new Set(known);
      for (const id of ids) {
        if (chosen) next.add(id);
        else next.delete(id);
      }
      return next;
    });
  }

  if (ranking.fieldsInAll === 0) {
    return (
      <EmptyState
        title="No fields yet"
        action={
          can("import.create") ? (
            <LinkButton kind="primary" href="/import">
              Import reservoirs from a spreadsheet
            </LinkButton>
          ) : undefined
        }
      >
        Reservoirs come in with their separator tests and ranges, and their fields with them.
      </EmptyState>
    );
  }
  return (
    <>
      <RankingFilters
        state={state}
        ranking={ranking}
        reporting={reporting}
        columnsOpen={columnsOpen}
        onToggleColumns={() => setColumnsOpen(!columnsOpen)}
      />
      {columnsOpen && (
        <ColumnChooser chosen={view.columns} onChange={(columns) => setView({ columns })} />
      )}
      <div aria-busy={stale} className={stale ? "opacity-60" : undefined}>
        {ranking.total === 0 ? (
          <EmptyState
            title="No field matches these filters"
            action={
              isFiltered(view) && <Button onClick={() => setView(noFilter)}>Clear filters</Button>
            }
          >
            {ranking.fieldsInAll} fields are in the book.
          </EmptyState>
        ) : (
          <RankingTable
            state={state}
            ranking={ranking}
            reporting={reporting}
            selected={selected}
            onSelect={handleSelect}
          />
        )}
      </div>
      <Pager state={state} ranking={ranking} />
      <Selection
        basis={basis}
        reporting={reporting}
        ids={[...selected]}
        rows={ranking.items}
        columns={view.columns}
        onClear={() => setSelected(new Set())}
      />
    </>
  );
}

function Pager({ state: { view, setView }, ranking }: { state: RankingState; ranking: Ranking }) {
  const { total, offset, items } = ranking;
  if (total <= PAGE_ROWS) return null;
  return (
    <nav className="mt-4 flex items-center gap-3" aria-label="Pages of the ranking">
      <Button
        size="small"
        disabled={offset === 0}
        onClick={() => setView({ offset: Math.max(0, view.offset - PAGE_ROWS) })}
      >
        Previous
      </Button>
      <span className="text-13 text-ink-soft">
        Rows {offset + 1} to {offset + items.length} of {total}
      </span>
      <Button
        size="small"
        disabled={offset + items.length >= total}
        onClick={() => setView({ offset: view.offset + PAGE_ROWS })}
      >
        Next
      </Button>
    </nav>
  );
}
