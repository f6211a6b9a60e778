"use client";

import { useState } from "react";
import type { PlacedField } from "@/analytics/portfolio/factor-model";
import { listWords } from "@/components/portfolio/reporting";
import { Button } from "@/components/ui/button";
import { Disclosure } from "@/components/ui/dialog";
import { Checkbox, NumberField, SearchField, TextField } from "@/components/ui/field";
import { Icon } from "@/components/ui/icon";
import { meaningWords } from "./rank-words";
import { readRank, type FactorText } from "./set-text";

export interface FactorFieldsProps {
  factor: FactorText;
  /** `name`, `note`, `rank`, `fieldIds` */
  faults: Record<string, string>;
  fields: readonly PlacedField[];
  onChange: (change: Partial<FactorText>) => void;
  onRemove: () => void;
}

/** One thing that some fields share: what, why, how strongly, and which. */
export function FactorFields({ factor, faults, fields, onChange, onRemove }: FactorFieldsProps) {
  const [search, setSearch] = useState("");
  const names = fields.filter(({ id }) => factor.fieldIds.includes(id)).map(({ name }) => name);
  const wanted = search.trim().toLowerCase();
  const listed = fields.filter(
    ({ name, basinName }) => wanted === "" || `${name} ${basinName}`.toLowerCase().includes(wanted),
  );
  const read = readRank(factor.rank, 0.01);

  const toggle = (id: string, isChosen: boolean) =>
    onChange({
      fieldIds: isChosen
        ? [...factor.fieldIds, id]
        : factor.fieldIds.filter((chosen) => chosen !== id),
    });

  return (
    <div className="factor" role="group" aria-label={factor.name || "New shared factor"}>
      <div className="factor-line">
        <TextField
          label="What they share"
          placeholder="Such as one seismic survey"
          value={factor.name}
          error={faults.name}
          onChange={(event) => onChange({ name: event.target.value })}
        />
        <NumberField
          label="Adds"
          value={factor.rank}
          hint={"rank" in read ? meaningWords(read.rank) : undefined}
          error={faults.rank}
          onChange={(event) => onChange({ rank: event.target.value })}
        />
        <TextField
          label="Why it moves them together"
          value={factor.note}
          error={faults.note}
          onChange={(event) => onChange({ note: event.target.value })}
        />
        <Button size="small" kind="quiet" onClick={onRemove}>
          Remove
        </Button>
      </div>
      {faults.fieldIds && (
        <p className="field-error mt-2">
          <Icon name="warning" />
          {faults.fieldIds}
        </p>
      )}
      <Disclosure
        defaultOpen={factor.fieldIds.length === 0}
        label={
          names.length === 0
            ? "Choose its fields"
            : `${names.length} ${names.length === 1 ? "field" : "fields"}: ${listWords(names)}`
        }
      >
        <div className="mt-2 grid gap-2">
          <SearchField
            label="Find a field or basin"
            value={search}
            onChange={(event) => setSearch(event.target.value)}
          />
          <div className="factor-choices">
            {listed.map(({ id, name, basinName }) => (
              <Checkbox
                key={id}
                label={
                  <span>
                    {name} <span className="text-ink-soft">{basinName}</span>
                  </span>
                }
                checked={factor.fieldIds.includes(id)}
                onChange={(event) => toggle(id, event.target.checked)}
              />
            ))}
            {listed.length === 0 && <p className="text-13 text-ink-soft">No field is called so.</p>}
          </div>
        </div>
      </Disclosure>
    </div>
  );
}
