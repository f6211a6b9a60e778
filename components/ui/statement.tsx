import type { ReactNode } from "react";
import { classNames } from "./class-names";
import { Icon, type IconName } from "./icon";
import { Unit } from "./text";

export interface KeyFigure {
  label: ReactNode;
  /** formatted; the largest type of the page */
  figure: ReactNode;
  unit?: string;
  /** one line under it: a range, a change, a caution */
  note?: ReactNode;
  /** a range mark */
  mark?: ReactNode;
}

/**
 * The answer of a page between a 2 px rule and a double rule. `headline`: the first figure is the
 * largest and each has room for its mark; otherwise a compact line of four or five.
 */
export function KeyFigures({
  label,
  figures,
  headline = false,
}: {
  label: string;
  figures: readonly KeyFigure[];
  headline?: boolean;
}) {
  return (
    <section
      className={classNames("statement", headline && "statement-headline")}
      aria-label={label}
      data-count={figures.length}
    >
      {figures.map((figure, index) => (
        <div key={index}>
          <h2>{figure.label}</h2>
          <p className="statement-figure">
            <span>{figure.figure}</span>
            {figure.unit && <Unit>{figure.unit}</Unit>}
          </p>
          {figure.note && <p className="statement-note">{figure.note}</p>}
          {figure.mark}
        </div>
      ))}
    </section>
  );
}

export interface Finding {
  title: ReactNode;
  detail?: ReactNode;
  /** at the right: state, age */
  aside?: ReactNode;
  tone?: "warning" | "ok" | "info" | "waiting";
}

const findingIcons: Record<NonNullable<Finding["tone"]>, IconName> = {
  warning: "warning",
  ok: "tick",
  info: "info",
  waiting: "clock",
};

/** What needs attention, or what was checked: one line each, ruled. */
export function FindingList({
  findings,
  ordered = false,
}: {
  findings: readonly Finding[];
  ordered?: boolean;
}) {
  const List = ordered ? "ol" : "ul";
  return (
    <List className="findings">
      {findings.map(({ title, detail, aside, tone = "info" }, index) => (
        <li key={index} data-tone={tone}>
          <Icon name={findingIcons[tone]} size={14} />
          <div>
            <b>{title}</b>
            {detail && <p>{detail}</p>}
          </div>
          {aside && <span className="finding-aside">{aside}</span>}
        </li>
      ))}
    </List>
  );
}

/** The bar that rides at the foot of a table while rows are chosen. */
export function SelectionBar({
  count,
  noun,
  summary,
  actions,
}: {
  count: number;
  /** "fields" */
  noun: string;
  /** what they come to together, trial by trial */
  summary?: ReactNode;
  actions: ReactNode;
}) {
  if (count === 0) return null;
  return (
    <div className="selection-bar no-print" role="region" aria-label="Chosen rows">
      <b role="status">
        {count} {noun} selected
      </b>
      {summary && <span>{summary}</span>}
      <span className="selection-actions">{actions}</span>
    </div>
  );
}

/** Search, filters and the count over a table; scrolls sideways on a phone. */
export function FilterBar({ label, children }: { label: string; children: ReactNode }) {
  return (
    <div className="filter-bar no-print" role="group" aria-label={label}>
      {children}
    </div>
  );
}

/** Content of a filter's menu button: soft name, value, chevron. Use with `filterClass(active)`. */
export function FilterWords({ name, value }: { name: string; value: string }) {
  return (
    <>
      {name} <b>{value}</b>
      <Icon name="chevron-down" size={9} />
    </>
  );
}

/** The `buttonClassName` of a filter's menu. */
export const filterClass = (active: boolean) => classNames("filter", active && "filter-on");
