"use client";

import type { PlacedField } from "@/analytics/portfolio/factor-model";
import type { BasinView } from "@/app/api/v1/basins/schema";
import { Button } from "@/components/ui/button";
import { Select } from "@/components/ui/choice";
import { NumberField, TextArea, TextField } from "@/components/ui/field";
import { FactorFields } from "./factor-fields";
import { meaningWords } from "./rank-words";
import { readRank, type FactorText, type SetText } from "./set-text";

export interface SetFieldsProps {
  text: SetText;
  /** by place: `basinRanks.<id>`, `sharedFactors.0.fieldIds` */
  faults: Record<string, string>;
  basins: readonly BasinView[];
  fields: readonly PlacedField[];
  onChange: (change: Partial<SetText>) => void;
  onAddFactor: () => void;
}

/** What a rank typed here means; nothing while it is none. */
const hintOf = (typed: string): string | undefined => {
  const read = readRank(typed);
  return "rank" in read ? meaningWords(read.rank) : undefined;
};

/** The fields of a set: from the whole portfolio down to what a few fields share. */
export function SetFields({ text, faults, basins, fields, onChange, onAddFactor }: SetFieldsProps) {
  const changeFactor = (index: number, change: Partial<FactorText>) =>
    onChange({
      sharedFactors: text.sharedFactors.map((factor, place) =>
        place === index ? { ...factor, ...change } : factor,
      ),
    });
  const own = basins.filter(({ id }) => id in text.basinRanks);
  const others = basins.filter(({ id }) => !(id in text.basinRanks));
  const changeBasin = (id: string, typed: string) =>
    onChange({ basinRanks: { ...text.basinRanks, [id]: typed } });
  const factorFaults = (index: number): Record<string, string> => {
    const prefix = `sharedFactors.${index}.`;
    return Object.fromEntries(
      Object.entries(faults).flatMap(([place, fault]) =>
        place.startsWith(prefix) ? [[place.slice(prefix.length).split(".")[0], fault]] : [],
      ),
    );
  };

  return (
    <div className="set-fields">
      <div className="form-grid content-start">
        <TextField
          label="Name"
          value={text.name}
          error={faults.name}
          onChange={(event) => onChange({ name: event.target.value })}
        />
        <TextArea
          label="Why"
          rows={2}
          hint="What speaks for this view; shown beside the set."
          value={text.note}
          error={faults.note}
          onChange={(event) => onChange({ note: event.target.value })}
        />
      </div>
      <fieldset className="set-ranks">
        <legend>Rank correlation between two reservoirs</legend>
        <NumberField
          label="Anywhere in the portfolio"
          value={text.portfolioRank}
          hint={hintOf(text.portfolioRank)}
          error={faults.portfolioRank}
          onChange={(event) => onChange({ portfolioRank: event.target.value })}
        />
        {own.map(({ id, name }) => (
          <NumberField
            key={id}
            label={`Both in ${name}`}
            placeholder={text.otherBasinsRank}
            value={text.basinRanks[id]}
            hint={
              text.basinRanks[id].trim() === ""
                ? "Empty: as other basins"
                : hintOf(text.basinRanks[id])
            }
            error={faults[`basinRanks.${id}`]}
            onChange={(event) => changeBasin(id, event.target.value)}
          />
        ))}
        <NumberField
          label="Both in another basin"
          value={text.otherBasinsRank}
          hint={hintOf(text.otherBasinsRank) ?? "For basins that have no figure of their own"}
          error={faults.otherBasinsRank}
          onChange={(event) => onChange({ otherBasinsRank: event.target.value })}
        />
        {others.length > 0 && (
          <Select
            label="A figure of its own"
            placeholder="Choose a basin"
            value={null}
            options={others.map(({ id, name }) => ({ value: id, label: name }))}
            hint={`${others.length} ${others.length === 1 ? "basin follows" : "basins follow"} the others`}
            onChange={(id) => changeBasin(id, text.otherBasinsRank)}
          />
        )}
      </fieldset>
      <div className="set-factors">
        <h3>
          {text.sharedFactors.length === 0
            ? "No shared factors"
            : `${text.sharedFactors.length} shared ${text.sharedFactors.length === 1 ? "factor" : "factors"}, on top of the basin`}
        </h3>
        {text.sharedFactors.map((factor, index) => (
          <FactorFields
            key={factor.key}
            factor={factor}
            faults={factorFaults(index)}
            fields={fields}
            onChange={(change) => changeFactor(index, change)}
            onRemove={() =>
              onChange({ sharedFactors: text.sharedFactors.filter((_, place) => place !== index) })
            }
          />
        ))}
        <div>
          <Button
            size="small"
            icon="plus"
            disabled={text.sharedFactors.length >= 20}
            onClick={onAddFactor}
          >
            Add a shared factor
          </Button>
        </div>
      </div>
    </div>
  );
}
