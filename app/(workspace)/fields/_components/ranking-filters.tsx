"use client";

import { useEffect, useRef, useState } from "react";
import { estimateFilters, rankedClasses } from "@/analytics/portfolio/ranking";
import type { Ranking } from "@/app/api/v1/fields/ranking-schema";
import { capital, type Reporting } from "@/components/portfolio/reporting";
import { Button } from "@/components/ui/button";
import { Menu, type MenuEntry } from "@/components/ui/choice";
import { formatFigure } from "@/components/ui/format";
import { Icon } from "@/components/ui/icon";
import { FilterBar, filterClass, FilterWords } from "@/components/ui/statement";
import { isFiltered, noFilter, type RankingState, type RankingView } from "./ranking-address";

const stateWords = {
  approved: "Approved",
  draft: "Draft in work",
  submitted: "Submitted",
  returned: "Returned",
  none: "No estimate",
} as const;

export interface RankingFiltersProps {
  state: RankingState;
  ranking: Ranking;
  reporting: Reporting;
  columnsOpen: boolean;
  onToggleColumns: () => void;
}

/** Search, filters, the count, and the button of the column chooser. */
export function RankingFilters({
  state: { view, setView },
  ranking,
  reporting,
  columnsOpen,
  onToggleColumns,
}: RankingFiltersProps) {
  const { choices, total, fieldsInAll } = ranking;
  return (
    <FilterBar label="Filters">
      <SearchBox value={view.search} onChange={(search) => setView({ search })} />
      <ListFilter
        name="Basin"
        all="all"
        chosen={view.basin}
        options={choices.basins.map(({ slug, name }) => ({ value: slug, label: name }))}
        onChange={(basin) => setView({ basin })}
      />
      <ListFilter
        name="Class"
        all="all"
        chosen={view.class}
        options={rankedClasses.map((value) => ({ value, label: capital(value) }))}
        onChange={(chosen) => setView({ class: chosen })}
      />
      <YieldFilter view={view} setView={setView} reporting={reporting} />
      <ListFilter
        name="Estimate"
        all="any state"
        chosen={view.state}
        options={estimateFilters.map((value) => ({ value, label: stateWords[value] }))}
        onChange={(chosen) => setView({ state: chosen })}
      />
      <ListFilter
        name="Engineer"
        all="anyone"
        chosen={view.engineer}
        options={choices.engineers.map(({ id, name }) => ({ value: id, label: name }))}
        onChange={(engineer) => setView({ engineer })}
      />
      {isFiltered(view) && (
        <Button kind="quiet" size="small" onClick={() => setView(noFilter)}>
          Clear filters
        </Button>
      )}
      <span className="filter-count" role="status">
        {total} of {fieldsInAll} fields
      </span>
      <Button
        size="small"
        aria-expanded={columnsOpen}
        aria-controls="ranking-columns"
        onClick={onToggleColumns}
      >
        Columns <span className="text-ink-soft">{view.columns.length}</span>
        <Icon name="chevron-down" size={9} />
      </Button>
    </FilterBar>
  );
}

/** Waits for a pause in typing, then changes the address. */
const TYPING_PAUSE_MS = 250;

function SearchBox({ value, onChange }: { value: string; onChange: (value: string) => void }) {
  const [text, setText] = useState(value);
  const [known, setKnown] = useState(value);
  const waiting = useRef<ReturnType<typeof setTimeout>>(undefined);
  // The address changed by itself (filters cleared, a step back): what was typed gives way to it.
  if (value !== known) {
    setKnown(value);
    setText(value);
  }
  useEffect(() => () => clearTimeout(waiting.current), []);

  function handleType(next: string) {
    setText(next);
    clearTimeout(waiting.current);
    waiting.current = setTimeout(() => {
      setKnown(next);
      onChange(next);
    }, TYPING_PAUSE_MS);
  }

  return (
    <label className="field-box ranking-search">
      <Icon name="search" />
      <input
        type="search"
        value={text}
        maxLength={100}
        placeholder="Find a field"
        aria-label="Find a field, basin or operator"
        onChange={(event) => handleType(event.target.value)}
      />
    </label>
  );
}

interface ListFilterProps<Value extends string> {
  name: string;
  /** what it says while nothing is filtered */
  all: string;
  chosen: readonly Value[];
  options: readonly { value: Value; label: string }[];
  onChange: (chosen: Value[]) => void;
}

/** Any of several; choosing a ticked one again takes it out. */
function ListFilter<Value extends string>({
  name,
  all,
  chosen,
  options,
  onChange,
}: ListFilterProps<Value>) {
  const labels = options.filter(({ value }) => chosen.includes(value)).map(({ label }) => label);
  const words =
    chosen.length === 0 ? all : labels.length === 1 ? labels[0] : `${chosen.length} chosen`;
  const entries: MenuEntry[] = options.map(({ value, label }) => ({
    label,
    current: chosen.includes(value),
    onSelect: () =>
      onChange(
        chosen.includes(value) ? chosen.filter((other) => other !== value) : [...chosen, value],
      ),
  }));
  return (
    <Menu
      buttonClassName={filterClass(chosen.length > 0)}
      button={<FilterWords name={name} value={words} />}
      groups={[
        {
          entries: [
            { label: capital(all), current: chosen.length === 0, onSelect: () => onChange([]) },
            ...entries,
          ],
        },
      ]}
    />
  );
}

/** Lean, middling and rich gas condensates, by initial yield; common practice, no one source. */
const yieldBands = [
  { label: "Lean", from: undefined, to: 50 },
  { label: "Middling", from: 50, to: 150 },
  { label: "Rich", from: 150, to: undefined },
] as const;

function YieldFilter({
  view,
  setView,
  reporting,
}: Pick<RankingState, "view" | "setView"> & { reporting: Reporting }) {
  const { factor, unit } = reporting.condensateYield;
  const words = ({ yieldFrom: from, yieldTo: to }: Pick<RankingView, "yieldFrom" | "yieldTo">) => {
    const shown = (value: number) => formatFigure(value * factor, { digits: 3 });
    if (from !== undefined && to !== undefined) return `${shown(from)} to ${shown(to)} ${unit}`;
    if (from !== undefined) return `from ${shown(from)} ${unit}`;
    if (to !== undefined) return `up to ${shown(to)} ${unit}`;
    return "any";
  };
  const active = view.yieldFrom !== undefined || view.yieldTo !== undefined;
  return (
    <Menu
      buttonClassName={filterClass(active)}
      button={<FilterWords name="Yield" value={words(view)} />}
      groups={[
        {
          entries: [
            {
              label: "Any",
              current: !active,
              onSelect: () => setView({ yieldFrom: undefined, yieldTo: undefined }),
            },
            ...yieldBands.map(({ label, from, to }) => ({
              label,
              note: words({ yieldFrom: from, yieldTo: to }),
              current: active && view.yieldFrom === from && view.yieldTo === to,
              onSelect: () => setView({ yieldFrom: from, yieldTo: to }),
            })),
          ],
        },
      ]}
    />
  );
}
