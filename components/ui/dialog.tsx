"use client";

import {
  Description,
  Dialog as HeadlessDialog,
  DialogBackdrop,
  DialogPanel,
  DialogTitle,
  Disclosure as HeadlessDisclosure,
  DisclosureButton,
  DisclosurePanel,
} from "@headlessui/react";
import type { CSSProperties, ReactNode } from "react";
import { IconButton } from "./button";
import { Icon } from "./icon";

export interface DialogProps {
  open: boolean;
  onClose: () => void;
  title: string;
  description?: ReactNode;
  /** buttons, the primary one last */
  actions?: ReactNode;
  width?: number;
  children?: ReactNode;
}

/** One question or one short form, over the page. Escape and the backdrop close it. */
export function Dialog({
  open,
  onClose,
  title,
  description,
  actions,
  width = 520,
  children,
}: DialogProps) {
  return (
    <HeadlessDialog open={open} onClose={onClose}>
      <DialogBackdrop className="backdrop" />
      <div className="dialog-place">
        <DialogPanel className="dialog" style={{ "--dialog-width": `${width}px` } as CSSProperties}>
          <div className="dialog-head">
            <DialogTitle>{title}</DialogTitle>
            <IconButton icon="close" label="Close" onClick={onClose} />
          </div>
          <div className="dialog-body">
            {description && <Description className="text-ink-soft">{description}</Description>}
            {children}
          </div>
          {actions && <div className="dialog-actions">{actions}</div>}
        </DialogPanel>
      </div>
    </HeadlessDialog>
  );
}

export interface DisclosureProps {
  label: ReactNode;
  defaultOpen?: boolean;
  children: ReactNode;
}

/** More, for those who want it. */
export function Disclosure({ label, defaultOpen = false, children }: DisclosureProps) {
  return (
    <HeadlessDisclosure defaultOpen={defaultOpen}>
      <DisclosureButton className="disclosure-button">
        <Icon name="chevron-right" size={9} />
        {label}
      </DisclosureButton>
      <DisclosurePanel>{children}</DisclosurePanel>
    </HeadlessDisclosure>
  );
}
