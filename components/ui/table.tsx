import Link from "next/link";
import type { ComponentProps, CSSProperties, ReactNode } from "react";
import { classNames } from "./class-names";
import { Figure, type FigureProps } from "./figure";
import { Icon } from "./icon";
import { Unit, VisuallyHidden } from "./text";

export interface LedgerTableProps {
  /** what the table holds; read out, and shown when `captionShown` */
  caption: string;
  captionShown?: boolean;
  /** row height: working 32, executive 37, change 46 (before over after), input 52 */
  density?: "working" | "executive" | "change" | "input";
  /** keeps the heading row in sight inside a scroller of `maxHeight` */
  maxHeight?: string;
  stickyColumn?: boolean;
  /** a frame with an ink top rule, for a table that is a page's main thing */
  framed?: boolean;
  className?: string;
  children: ReactNode;
}

export function LedgerTable({
  caption,
  captionShown = false,
  density = "working",
  maxHeight,
  stickyColumn = false,
  framed = false,
  className,
  children,
}: LedgerTableProps) {
  return (
    <div
      className={classNames("table-scroll", framed && "ledger-frame")}
      data-sticky-header={maxHeight ? "" : undefined}
      data-sticky-column={stickyColumn || undefined}
      style={maxHeight ? ({ "--table-height": maxHeight } as CSSProperties) : undefined}
      role="region"
      aria-label={caption}
      tabIndex={0}
    >
      <table
        className={classNames(
          "ledger-table",
          density !== "working" && `ledger-table-${density}`,
          className,
        )}
      >
        <caption className={captionShown ? "pb-2 text-left text-13 text-ink-soft" : "sr-only"}>
          {caption}
        </caption>
        {children}
      </table>
    </div>
  );
}

export type SortDirection = "ascending" | "descending";

export interface ColumnHeadingProps extends Omit<ComponentProps<"th">, "align"> {
  align?: "left" | "right" | "centre";
  unit?: string;
  /** present when the column can sort; give `onSort` (client) or `sortHref` (address) */
  sorted?: SortDirection | null;
  onSort?: () => void;
  sortHref?: string;
  /** a column of range marks: children is the `RangeScale` */
  mark?: boolean;
}

export function ColumnHeading({
  align = "left",
  unit,
  sorted,
  onSort,
  sortHref,
  mark = false,
  className,
  children,
  ...rest
}: ColumnHeadingProps) {
  const content = (
    <>
      {sorted && <Icon name={sorted === "descending" ? "down" : "sort-up"} size={10} />}
      <span>
        {children}
        {unit && <Unit> {unit}</Unit>}
      </span>
    </>
  );
  return (
    <th
      scope="col"
      aria-sort={sorted ?? (onSort || sortHref ? "none" : undefined)}
      className={classNames(
        align !== "left" && align,
        sorted && "sorted",
        mark && "mark",
        className,
      )}
      {...rest}
    >
      {onSort ? (
        <button type="button" onClick={onSort}>
          {content}
        </button>
      ) : sortHref ? (
        <Link className="sort" href={sortHref} scroll={false}>
          {content}
        </Link>
      ) : (
        content
      )}
    </th>
  );
}

/** The folio margin: rank or line number behind a double rule. */
export function FolioCell({
  heading = false,
  children,
}: {
  heading?: boolean;
  children?: ReactNode;
}) {
  if (heading) {
    return (
      <th scope="col" className="folio">
        <VisuallyHidden>{children ?? "Line"}</VisuallyHidden>
      </th>
    );
  }
  return <td className="folio">{children}</td>;
}

export interface FigureCellProps extends FigureProps {
  strong?: boolean;
  soft?: boolean;
  sorted?: boolean;
  /** the value it had: set above, soft, with the new one under it */
  before?: number | null;
  /** what the two are, read out: before and now unless told otherwise */
  beforeWord?: string;
  nowWord?: string;
  className?: string;
}

/** A figure in a column: right-aligned, points under each other when `fraction` is given. */
export function FigureCell({
  strong,
  soft,
  sorted,
  before,
  beforeWord = "before",
  nowWord = "now",
  className,
  ...figure
}: FigureCellProps) {
  return (
    <td
      className={classNames(
        "right",
        strong && "strong",
        soft && "soft",
        sorted && "sorted",
        className,
      )}
    >
      {before === undefined ? (
        <Figure {...figure} />
      ) : (
        <span className="before-after">
          <span>
            <VisuallyHidden>{beforeWord} </VisuallyHidden>
            <Figure {...figure} value={before} />
          </span>
          <span>
            <VisuallyHidden>{nowWord} </VisuallyHidden>
            <Figure {...figure} />
          </span>
        </span>
      )}
    </td>
  );
}

/** The cell of a range mark; an absent mark says why in words. */
export function MarkCell({
  className,
  colSpan,
  children,
}: {
  className?: string;
  colSpan?: number;
  children: ReactNode;
}) {
  return (
    <td className={classNames("mark", className)} colSpan={colSpan}>
      {typeof children === "string" ? <span className="no-mark">{children}</span> : children}
    </td>
  );
}

type RowProps = ComponentProps<"tr">;

/** Closes a table: 1 px above, 3 px double rule below. Its values are added up trial by trial. */
export const TotalRow = ({ className, ...rest }: RowProps) => (
  <tr {...rest} className={classNames("total", className)} />
);

/** Set below a total, soft and in italic serif: a sum of percentiles is no percentile. */
export const ArithmeticRow = ({ className, ...rest }: RowProps) => (
  <tr {...rest} className={classNames("arithmetic", className)} />
);

/** A band that names the rows under it. */
export const GroupRow = ({ columns, children }: { columns: number; children: ReactNode }) => (
  <tr className="group">
    <th scope="colgroup" colSpan={columns}>
      {children}
    </th>
  </tr>
);
