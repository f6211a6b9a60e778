"use client";

import { useState } from "react";
import { errorWords } from "@/app/_client/request";
import { useCan } from "@/app/_client/use-session";
import { prmsClassNames, prmsSubClassNames } from "@/components/fields/prms";
import { Button } from "@/components/ui/button";
import { Select } from "@/components/ui/choice";
import { NumberField, TextArea, TextField } from "@/components/ui/field";
import { prmsClasses, prmsSubClasses } from "@/models/vocabulary";
import { useBasins, useCreateBasin, useEngineers } from "../_queries/field";
import { firstSubClass, type FieldProblems, type FieldText } from "./field-form";

export interface FieldFieldsProps {
  text: FieldText;
  problems: FieldProblems;
  /** interests and chance are the planners' to set once a field exists */
  mayEditCommercial: boolean;
  onChange: (text: FieldText) => void;
}

/** The fields of a field's form, for a new one and for an edit. */
export function FieldFields({ text, problems, mayEditCommercial, onChange }: FieldFieldsProps) {
  const engineers = useEngineers();
  const set = <Key extends keyof FieldText>(key: Key, value: FieldText[Key]) =>
    onChange({ ...text, [key]: value });
  const typed = (key: "name" | "operator" | "latitude" | "longitude" | "waterDepthFt") => ({
    value: text[key],
    error: problems[key],
    onChange: (event: { target: { value: string } }) => set(key, event.target.value),
  });
  const share = (key: "workingInterest" | "netRevenueInterest" | "chanceOfCommerciality") => ({
    value: text[key],
    error: problems[key],
    unit: "%",
    disabled: !mayEditCommercial,
    onChange: (event: { target: { value: string } }) => set(key, event.target.value),
  });
  return (
    <div className="grid gap-4">
      <div className="grid grid-cols-2 gap-3 phone:grid-cols-1">
        <TextField label="Name" maxLength={120} {...typed("name")} />
        <TextField label="Operator" maxLength={120} {...typed("operator")} />
        <BasinChoice
          basinId={text.basinId}
          error={problems.basinId}
          onChange={(basinId) => set("basinId", basinId)}
        />
        <Select
          label="Responsible engineer"
          placeholder="Nobody yet"
          value={text.responsibleEngineerId}
          error={problems.responsibleEngineerId}
          options={(engineers.data?.items ?? []).map(({ id, name }) => ({
            value: id,
            label: name,
          }))}
          onChange={(id) => set("responsibleEngineerId", id)}
        />
        <Select
          label="Class (PRMS)"
          value={text.prmsClass}
          options={prmsClasses.map((value) => ({ value, label: prmsClassNames[value] }))}
          onChange={(prmsClass) =>
            onChange({ ...text, prmsClass, prmsSubClass: firstSubClass(prmsClass) })
          }
        />
        <Select
          label="Sub-class"
          value={text.prmsSubClass}
          error={problems.prmsSubClass}
          options={prmsSubClasses[text.prmsClass].map((value) => ({
            value,
            label: prmsSubClassNames[value],
          }))}
          onChange={(prmsSubClass) => set("prmsSubClass", prmsSubClass)}
        />
      </div>
      <div className="grid grid-cols-3 gap-3 phone:grid-cols-1">
        <NumberField
          label="Working interest"
          hint="Share of the costs"
          {...share("workingInterest")}
        />
        <NumberField
          label="Net revenue interest"
          hint="Share of the revenue after royalty"
          {...share("netRevenueInterest")}
        />
        <NumberField
          label="Chance of commerciality"
          hint="100 % once it produces"
          {...share("chanceOfCommerciality")}
        />
        {!mayEditCommercial && (
          <p className="col-span-full text-12 text-ink-soft">
            Interests and chance turn volumes into the company’s money; a planner changes them.
          </p>
        )}
        <NumberField
          label="Latitude"
          hint="Decimal degrees, south negative"
          {...typed("latitude")}
        />
        <NumberField
          label="Longitude"
          hint="Decimal degrees, west negative"
          {...typed("longitude")}
        />
        <NumberField
          label="Water depth"
          unit="ft"
          hint="Empty on land"
          {...typed("waterDepthFt")}
        />
      </div>
      <TextArea
        label="Notes"
        rows={2}
        maxLength={5000}
        error={problems.notes}
        value={text.notes}
        onChange={(event) => set("notes", event.target.value)}
      />
    </div>
  );
}

/** Basins there are, and a way to name a new one. */
function BasinChoice({
  basinId,
  error,
  onChange,
}: {
  basinId: string | null;
  error?: string;
  onChange: (id: string) => void;
}) {
  const basins = useBasins();
  const can = useCan();
  const create = useCreateBasin();
  const [name, setName] = useState<string | null>(null);
  if (name !== null) {
    return (
      <div className="grid gap-1.5">
        <TextField
          label="Name of the new basin"
          maxLength={120}
          value={name}
          error={create.error ? errorWords(create.error) : undefined}
          onChange={(event) => setName(event.target.value)}
        />
        <div className="flex gap-2">
          <Button
            size="small"
            busy={create.isPending}
            disabled={name.trim() === ""}
            onClick={() =>
              create.mutate(name.trim(), {
                onSuccess: (basin) => {
                  onChange(basin.id);
                  setName(null);
                },
              })
            }
          >
            Add the basin
          </Button>
          <Button size="small" kind="quiet" onClick={() => setName(null)}>
            Choose instead
          </Button>
        </div>
      </div>
    );
  }
  return (
    <div className="grid gap-1.5">
      <Select
        label="Basin"
        value={basinId}
        error={error}
        options={(basins.data?.items ?? []).map((basin) => ({
          value: basin.id,
          label: basin.name,
        }))}
        onChange={onChange}
      />
      {can("basin.create") && (
        <div>
          <Button size="small" kind="quiet" onClick={() => setName("")}>
            A new basin
          </Button>
        </div>
      )}
    </div>
  );
}
