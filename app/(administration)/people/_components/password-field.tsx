"use client";

import { Button } from "@/components/ui/button";
import { TextField } from "@/components/ui/field";

export interface PasswordFieldProps {
  value: string;
  error?: string;
  onChange: (value: string) => void;
  onMake: () => void;
}

/** A first password that an administrator hands over: typed, or made here. It is shown, because it is meant to be told. */
export function PasswordField({ value, error, onChange, onMake }: PasswordFieldProps) {
  return (
    <div className="grid grid-cols-[minmax(0,1fr)_auto] items-start gap-2">
      <TextField
        label="First password"
        autoComplete="off"
        spellCheck={false}
        hint="12 characters or more. Tell it to the person; they can change it under Profile."
        value={value}
        error={error}
        onChange={(event) => onChange(event.target.value)}
      />
      <Button className="mt-[22px]" onClick={onMake}>
        Make another
      </Button>
    </div>
  );
}
