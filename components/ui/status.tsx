import type { ReactNode } from "react";
import { Icon, type IconName } from "./icon";
import { VisuallyHidden } from "./text";

export type NoticeTone = "error" | "warning" | "info" | "success";

const noticeIcons: Record<NoticeTone, IconName> = {
  error: "warning",
  warning: "warning",
  info: "info",
  success: "tick",
};

export interface NoticeProps {
  tone?: NoticeTone;
  /** what happened */
  title: ReactNode;
  /** what was kept, and what to do */
  children?: ReactNode;
  actions?: ReactNode;
  /** interrupts a screen reader; on by default for errors */
  live?: boolean;
}

/** Says what happened, what was kept, and what to do. */
export function Notice({
  tone = "warning",
  title,
  children,
  actions,
  live = tone === "error",
}: NoticeProps) {
  return (
    <div className="notice" data-tone={tone} role={live ? "alert" : undefined}>
      <Icon name={noticeIcons[tone]} size={14} />
      <div className="notice-body">
        <b>{title}</b> {children}
      </div>
      {actions && <div className="notice-actions">{actions}</div>}
    </div>
  );
}

/** An empty list that starts its first action. */
export function EmptyState({
  title,
  children,
  action,
}: {
  title: ReactNode;
  children?: ReactNode;
  action?: ReactNode;
}) {
  return (
    <div className="empty-state">
      <h3>{title}</h3>
      {children && <p>{children}</p>}
      {action && <div className="mt-2 flex flex-wrap gap-2">{action}</div>}
    </div>
  );
}

export interface ProgressProps {
  label: string;
  /** 0 to 1; leave out while the length is unknown */
  fraction?: number;
  /** such as "9,216 of 16,384 trials, 3 s left" */
  detail?: ReactNode;
  note?: ReactNode;
  /** a Cancel button */
  action?: ReactNode;
}

/** Real progress of long work, with a way to stop it. */
export function Progress({ label, fraction, detail, note, action }: ProgressProps) {
  const percent = fraction === undefined ? undefined : Math.round(fraction * 100);
  return (
    <div className="run-status">
      <div className="run-status-line">
        <b>{label}</b>
        <span>{detail ?? (percent === undefined ? "Under way" : `${percent} %`)}</span>
        {action}
      </div>
      <div
        className="progress-bar mt-1.5"
        role="progressbar"
        aria-label={label}
        aria-valuemin={0}
        aria-valuemax={100}
        aria-valuenow={percent}
      >
        <i style={{ width: `${percent ?? 100}%`, opacity: percent === undefined ? 0.35 : 1 }} />
      </div>
      {note && <p>{note}</p>}
    </div>
  );
}

/** Ruled lines where rows will stand, so that the page does not jump. */
export function Skeleton({ lines = 6, label = "Loading" }: { lines?: number; label?: string }) {
  return (
    <div className="skeleton" role="status">
      <VisuallyHidden>{label}</VisuallyHidden>
      {Array.from({ length: lines }, (_, line) => (
        <i key={line} aria-hidden="true" style={{ width: `${92 - ((line * 17) % 38)}%` }} />
      ))}
    </div>
  );
}
