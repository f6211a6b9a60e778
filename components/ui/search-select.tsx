"use client";

import {
  Combobox,
  ComboboxInput,
  ComboboxOption,
  ComboboxOptions,
  Field,
  Label,
  Switch as HeadlessSwitch,
} from "@headlessui/react";
import { useState } from "react";
import type { Option } from "./choice";
import { classNames } from "./class-names";
import { Icon } from "./icon";

export interface SearchSelectProps<Value extends string> {
  label: string;
  labelHidden?: boolean;
  value: Value | null;
  options: readonly Option<Value>[];
  onChange: (value: Value) => void;
  placeholder?: string;
  disabled?: boolean;
  className?: string;
}

/** One choice of many, found by typing. */
export function SearchSelect<Value extends string>({
  label,
  labelHidden = false,
  value,
  options,
  onChange,
  placeholder = "Type to find",
  disabled,
  className,
}: SearchSelectProps<Value>) {
  const [query, setQuery] = useState("");
  const wanted = query.trim().toLowerCase();
  const found = options.filter((option) => option.label.toLowerCase().includes(wanted));
  const labelOf = (chosen: Value | null) =>
    options.find((option) => option.value === chosen)?.label ?? "";

  return (
    <Field className={classNames("field", className)} disabled={disabled}>
      <Label className={labelHidden ? "sr-only" : "field-label"}>{label}</Label>
      <Combobox
        value={value}
        immediate
        onChange={(next) => next !== null && onChange(next)}
        onClose={() => setQuery("")}
      >
        <div className="field-box">
          <ComboboxInput
            displayValue={labelOf}
            placeholder={placeholder}
            onChange={(event) => setQuery(event.target.value)}
          />
          <Icon name="chevron-down" size={9} />
        </div>
        <ComboboxOptions anchor={{ to: "bottom start", gap: 2, offset: -9 }} className="panel">
          {found.length === 0 && <p className="px-3 py-1 text-ink-soft">Nothing by that name</p>}
          {found.map((option) => (
            <ComboboxOption
              key={option.value}
              value={option.value}
              disabled={option.disabled}
              className="panel-item"
            >
              <span className="panel-tick">{option.value === value && <Icon name="tick" />}</span>
              <span>
                {option.label}
                {option.note && <small>{option.note}</small>}
              </span>
            </ComboboxOption>
          ))}
        </ComboboxOptions>
      </Combobox>
    </Field>
  );
}

export interface SwitchProps {
  label: string;
  checked: boolean;
  onChange: (checked: boolean) => void;
  disabled?: boolean;
}

/** A setting that takes effect at once. A choice that waits for a Save is a Checkbox. */
export function Switch({ label, checked, onChange, disabled }: SwitchProps) {
  return (
    <Field className="check" disabled={disabled}>
      <HeadlessSwitch className="switch" checked={checked} onChange={onChange} />
      <Label>{label}</Label>
    </Field>
  );
}
