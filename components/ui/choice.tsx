"use client";

import {
  Description,
  Field,
  Label,
  Listbox,
  ListboxButton,
  ListboxOption,
  ListboxOptions,
  Menu as HeadlessMenu,
  MenuButton,
  MenuItem,
  MenuItems,
  MenuHeading,
  MenuSection,
} from "@headlessui/react";
import Link from "next/link";
import { useRef, type KeyboardEvent, type ReactNode } from "react";
import { classNames } from "./class-names";
import { Icon } from "./icon";

export interface Option<Value extends string> {
  value: Value;
  label: string;
  /** a soft line under the label */
  note?: string;
  disabled?: boolean;
}

export interface SelectProps<Value extends string> {
  label: ReactNode;
  labelHidden?: boolean;
  value: Value | null;
  options: readonly Option<Value>[];
  onChange: (value: Value) => void;
  placeholder?: string;
  hint?: ReactNode;
  error?: string;
  disabled?: boolean;
  /** posts the value with a form */
  name?: string;
  className?: string;
}

/** One choice of a few. */
export function Select<Value extends string>({
  label,
  labelHidden = false,
  value,
  options,
  onChange,
  placeholder = "Choose",
  hint,
  error,
  disabled,
  name,
  className,
}: SelectProps<Value>) {
  const chosen = options.find((option) => option.value === value);
  return (
    <Field className={classNames("field", className)} disabled={disabled}>
      <Label className={labelHidden ? "sr-only" : "field-label"}>{label}</Label>
      <Listbox
        value={value}
        name={name}
        invalid={error !== undefined}
        onChange={(next) => next !== null && onChange(next)}
      >
        <ListboxButton className="select-button">
          <span className={chosen ? undefined : "text-ink-soft"}>
            {chosen?.label ?? placeholder}
          </span>
          <Icon name="chevron-down" size={9} />
        </ListboxButton>
        <ListboxOptions anchor={{ to: "bottom start", gap: 2 }} className="panel">
          {options.map((option) => (
            <ListboxOption
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
            </ListboxOption>
          ))}
        </ListboxOptions>
      </Listbox>
      {error && (
        <Description className="field-error">
          <Icon name="warning" />
          {error}
        </Description>
      )}
      {hint && <Description className="field-hint">{hint}</Description>}
    </Field>
  );
}

export interface MenuEntry {
  label: ReactNode;
  note?: string;
  href?: string;
  onSelect?: () => void;
  /** ticked: what is chosen now */
  current?: boolean;
  disabled?: boolean;
}

export interface MenuGroup {
  heading?: string;
  entries: MenuEntry[];
}

export interface MenuProps {
  /** content of the button */
  button: ReactNode;
  /** name of the button when its content does not say it */
  label?: string;
  buttonClassName?: string;
  changed?: boolean;
  groups: MenuGroup[];
  align?: "start" | "end";
}

/** Actions or links behind a button. Entries with `current` are shown as a choice. */
export function Menu({
  button,
  label,
  buttonClassName = "button",
  changed,
  groups,
  align = "start",
}: MenuProps) {
  return (
    <HeadlessMenu>
      <MenuButton
        className={buttonClassName}
        aria-label={label}
        data-changed={changed || undefined}
      >
        {button}
      </MenuButton>
      <MenuItems anchor={{ to: `bottom ${align}`, gap: 2 }} className="panel" modal={false}>
        {groups.map((group, index) => (
          <MenuSection key={group.heading ?? index}>
            {group.heading && <MenuHeading className="panel-heading">{group.heading}</MenuHeading>}
            {group.entries.map((entry, position) => (
              <MenuItem key={position} disabled={entry.disabled}>
                {entry.href ? (
                  <Link href={entry.href} className="panel-item" scroll={false}>
                    <EntryContent {...entry} />
                  </Link>
                ) : (
                  <button type="button" className="panel-item" onClick={entry.onSelect}>
                    <EntryContent {...entry} />
                  </button>
                )}
              </MenuItem>
            ))}
          </MenuSection>
        ))}
      </MenuItems>
    </HeadlessMenu>
  );
}

function EntryContent({ label, note, current }: MenuEntry) {
  return (
    <>
      {current !== undefined && (
        <span className="panel-tick">
          {current && (
            <>
              <Icon name="tick" />
              <span className="sr-only">Chosen: </span>
            </>
          )}
        </span>
      )}
      <span>
        {label}
        {note && <small>{note}</small>}
      </span>
    </>
  );
}

export interface SegmentedProps<Value extends string> {
  label: string;
  value: Value | null;
  options: readonly { value: Value; label: string; tone?: "quiet" | "off"; disabled?: boolean }[];
  onChange: (value: Value) => void;
  disabled?: boolean;
}

/** A few words side by side, one of them chosen; arrow keys move the choice. */
export function Segmented<Value extends string>({
  label,
  value,
  options,
  onChange,
  disabled = false,
}: SegmentedProps<Value>) {
  const group = useRef<HTMLDivElement>(null);
  const chosen = options.findIndex((option) => option.value === value);

  function handleKey(event: KeyboardEvent) {
    const step = { ArrowRight: 1, ArrowDown: 1, ArrowLeft: -1, ArrowUp: -1 }[event.key];
    if (!step || disabled) return;
    event.preventDefault();
    const next = (Math.max(chosen, 0) + step + options.length) % options.length;
    onChange(options[next].value);
    group.current?.querySelectorAll("button")[next]?.focus();
  }

  return (
    <div
      ref={group}
      className="segmented"
      role="radiogroup"
      aria-label={label}
      onKeyDown={handleKey}
    >
      {options.map((option, index) => (
        <button
          key={option.value}
          type="button"
          role="radio"
          aria-checked={option.value === value}
          tabIndex={index === Math.max(chosen, 0) ? 0 : -1}
          disabled={disabled || option.disabled}
          data-tone={option.tone}
          onClick={() => onChange(option.value)}
        >
          {option.label}
        </button>
      ))}
    </div>
  );
}
