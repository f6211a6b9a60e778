"use client";

import { useId, type ComponentProps, type ReactNode } from "react";
import { classNames } from "./class-names";
import { Icon } from "./icon";
import { VisuallyHidden } from "./text";

export interface FieldProps {
  label: ReactNode;
  /** for a grid whose columns are named by their headings */
  labelHidden?: boolean;
  hint?: ReactNode;
  /** in words, beside the field; makes the field invalid */
  error?: string;
  className?: string;
}

/** Ids that tie a control to its label, hint and error. */
function useFieldIds({ hint, error }: Pick<FieldProps, "hint" | "error">, given?: string) {
  const own = useId();
  const id = given ?? own;
  const describedBy =
    [error && `${id}-error`, hint && `${id}-hint`].filter(Boolean).join(" ") || undefined;
  return { id, describedBy };
}

function FieldShell({
  id,
  label,
  labelHidden,
  hint,
  error,
  className,
  children,
}: FieldProps & { id: string; children: ReactNode }) {
  return (
    <div className={classNames("field", className)}>
      <label htmlFor={id} id={`${id}-label`} className={labelHidden ? "sr-only" : "field-label"}>
        {label}
      </label>
      {children}
      {error && (
        <p className="field-error" id={`${id}-error`}>
          <Icon name="warning" />
          {error}
        </p>
      )}
      {hint && (
        <p className="field-hint" id={`${id}-hint`}>
          {hint}
        </p>
      )}
    </div>
  );
}

export interface TextFieldProps
  extends FieldProps,
    Omit<ComponentProps<"input">, "className" | "size"> {
  /** stands inside the field, after the value */
  unit?: ReactNode;
  /** outside the usual range: flagged, not blocked */
  flagged?: boolean;
}

/** Label above, unit inside, hint below, error in words. Spreads react-hook-form's `register`. */
export function TextField({
  label,
  labelHidden,
  hint,
  error,
  className,
  unit,
  flagged = false,
  id: givenId,
  ...input
}: TextFieldProps) {
  const { id, describedBy } = useFieldIds({ hint, error }, givenId);
  return (
    <FieldShell {...{ id, label, labelHidden, hint, error, className }}>
      <div
        className="field-box field-box-tall"
        data-invalid={error ? "" : undefined}
        data-flagged={flagged || undefined}
      >
        <input
          type="text"
          {...input}
          id={id}
          aria-invalid={error ? true : undefined}
          aria-describedby={describedBy}
        />
        {unit && <span className="unit">{unit}</span>}
      </div>
    </FieldShell>
  );
}

export interface NumberFieldProps extends TextFieldProps {
  /** what the arithmetic or unit typed comes to, such as "= 3,488 acre"; shown while it is there */
  preview?: string | null;
}

/**
 * A text input for a quantity: figures at the right, unit inside. It takes arithmetic ("12*640") and
 * unit suffixes ("38 bar") because it is text; the caller parses and passes back what it comes to.
 */
export function NumberField({
  label,
  labelHidden,
  hint,
  error,
  className,
  unit,
  flagged = false,
  preview,
  id: givenId,
  ...input
}: NumberFieldProps) {
  const { id, describedBy } = useFieldIds({ hint, error }, givenId);
  return (
    <FieldShell {...{ id, label, labelHidden, hint, error, className }}>
      <div
        className="field-box"
        data-numeric=""
        data-invalid={error ? "" : undefined}
        data-flagged={flagged || undefined}
      >
        <input
          type="text"
          inputMode="decimal"
          autoComplete="off"
          spellCheck={false}
          {...input}
          id={id}
          aria-invalid={error ? true : undefined}
          aria-describedby={describedBy}
        />
        {unit && <span className="unit">{unit}</span>}
        <output htmlFor={id} className={preview ? "calculated" : "sr-only"}>
          {preview}
        </output>
      </div>
    </FieldShell>
  );
}

export interface TextAreaProps extends FieldProps, Omit<ComponentProps<"textarea">, "className"> {}

export function TextArea({
  label,
  labelHidden,
  hint,
  error,
  className,
  id: givenId,
  rows = 3,
  ...area
}: TextAreaProps) {
  const { id, describedBy } = useFieldIds({ hint, error }, givenId);
  return (
    <FieldShell {...{ id, label, labelHidden, hint, error, className }}>
      <textarea
        rows={rows}
        {...area}
        id={id}
        className="field-area"
        aria-invalid={error ? true : undefined}
        aria-describedby={describedBy}
      />
    </FieldShell>
  );
}

export interface CheckboxProps extends Omit<ComponentProps<"input">, "type"> {
  label: ReactNode;
  labelHidden?: boolean;
  /** some of the rows it stands for are chosen */
  mixed?: boolean;
}

export function Checkbox({
  label,
  labelHidden = false,
  mixed = false,
  className,
  ...input
}: CheckboxProps) {
  return (
    <label className={classNames("check", className)}>
      <input
        {...input}
        type="checkbox"
        ref={(box) => {
          if (box) box.indeterminate = mixed;
        }}
      />
      {labelHidden ? <VisuallyHidden>{label}</VisuallyHidden> : label}
    </label>
  );
}

/** A search box over a list: `value` and `onChange` as an input's. */
export function SearchField({
  label,
  className,
  ...input
}: Omit<ComponentProps<"input">, "type"> & { label: string }) {
  return (
    <label className={classNames("field-box w-44", className)}>
      <Icon name="search" />
      <VisuallyHidden>{label}</VisuallyHidden>
      <input type="search" placeholder={label} {...input} />
    </label>
  );
}
