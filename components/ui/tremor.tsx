"use client";

import {
  SearchSelect as TremorSearchSelect,
  SearchSelectItem,
  Switch as TremorSwitch,
} from "@tremor/react";
import { useId } from "react";

export interface SearchSelectProps<Value extends string> {
  label: string;
  labelHidden?: boolean;
  value: Value | "";
  options: readonly { value: Value; label: string }[];
  onChange: (value: Value) => void;
  placeholder?: string;
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
  className,
}: SearchSelectProps<Value>) {
  const id = useId();
  return (
    <div className={`field tremor-control ${className ?? ""}`}>
      <label htmlFor={id} className={labelHidden ? "sr-only" : "field-label"}>
        {label}
      </label>
      <TremorSearchSelect
        id={id}
        value={value}
        onValueChange={(next) => onChange(next as Value)}
        placeholder={placeholder}
        enableClear={false}
      >
        {options.map((option) => (
          <SearchSelectItem key={option.value} value={option.value}>
            {option.label}
          </SearchSelectItem>
        ))}
      </TremorSearchSelect>
    </div>
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
  const id = useId();
  return (
    <span className="check">
      <TremorSwitch id={id} checked={checked} onChange={onChange} disabled={disabled} />
      <label htmlFor={id}>{label}</label>
    </span>
  );
}
