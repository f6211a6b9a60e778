"use client";

import { Button } from "@/components/ui/button";
import { Select, type Option } from "@/components/ui/choice";
import { TextField } from "@/components/ui/field";
import { useEverybody } from "../_queries/audit-events";
import { entityWords } from "./changes";
import type { AuditFilter } from "./filter";

const ANY = "any";

const entities = [
  "estimate",
  "reservoir",
  "fluidSample",
  "field",
  "basin",
  "priceDeck",
  "user",
  "settings",
  "apiToken",
  "import",
  "run",
  "export",
] as const;

const entityOptions: Option<string>[] = [
  { value: ANY, label: "Everything" },
  ...entities.map((entity) => ({ value: entity as string, label: entityWords(entity) })),
];

export interface AuditFilterBarProps {
  filter: AuditFilter;
  onChange: (change: Partial<AuditFilter>) => void;
}

export function AuditFilterBar({ filter, onChange }: AuditFilterBarProps) {
  const { data: people = [] } = useEverybody();
  const chosen = (value: string) => (value === ANY ? null : value);
  const isNarrowed = [filter.entity, filter.entityId, filter.person, filter.from, filter.to].some(
    (part) => part !== null,
  );
  return (
    <div className="filter-bar" role="group" aria-label="Narrow the trail">
      <Select
        label="What"
        value={filter.entity ?? ANY}
        options={entityOptions}
        onChange={(value) => onChange({ entity: chosen(value), entityId: null })}
      />
      <Select
        label="Who"
        value={filter.person ?? ANY}
        options={[{ value: ANY, label: "Everybody" }, ...people]}
        onChange={(value) => onChange({ person: chosen(value) })}
      />
      <TextField
        label="From"
        type="date"
        value={filter.from ?? ""}
        max={filter.to ?? undefined}
        onChange={(event) => onChange({ from: event.target.value || null })}
      />
      <TextField
        label="To, included"
        type="date"
        value={filter.to ?? ""}
        min={filter.from ?? undefined}
        onChange={(event) => onChange({ to: event.target.value || null })}
      />
      {isNarrowed && (
        <Button
          kind="quiet"
          onClick={() =>
            onChange({ entity: null, entityId: null, person: null, from: null, to: null })
          }
        >
          {filter.entityId ? "Show all records" : "Clear"}
        </Button>
      )}
    </div>
  );
}
