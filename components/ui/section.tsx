import type { ReactNode } from "react";
import Link from "next/link";
import { classNames } from "./class-names";
import { Icon } from "./icon";

/** The page's content, under the strips. `wide` for working tables. */
export function Page({ wide = false, children }: { wide?: boolean; children: ReactNode }) {
  return (
    <main id="main" tabIndex={-1} className={classNames("page outline-none", wide && "page-wide")}>
      {children}
    </main>
  );
}

export interface PageHeadProps {
  title: ReactNode;
  /** one or two sentences under the title */
  lead?: ReactNode;
  crumbs?: { label: string; href?: string }[];
  /** state, dates, flags: separated by hairlines */
  meta?: ReactNode;
  actions?: ReactNode;
}

export function PageHead({ title, lead, crumbs, meta, actions }: PageHeadProps) {
  return (
    <div className="page-head">
      <div>
        {crumbs && (
          <nav className="crumbs" aria-label="Where this page is">
            <ol>
              {crumbs.map(({ label, href }, index) => (
                <li key={`${index} ${label}`}>
                  {index > 0 && <Icon name="chevron-right" size={9} />}
                  {href ? <Link href={href}>{label}</Link> : label}
                </li>
              ))}
            </ol>
          </nav>
        )}
        <h1>{title}</h1>
        {lead && <p className="lead">{lead}</p>}
        {meta && <div className="meta">{meta}</div>}
      </div>
      {actions && <div className="page-actions">{actions}</div>}
    </div>
  );
}

export interface SectionProps {
  /** states the finding, with the figure in it */
  title: ReactNode;
  note?: ReactNode;
  tools?: ReactNode;
  id?: string;
  level?: 2 | 3;
  className?: string;
  children: ReactNode;
}

/** A ruled section: a 2 px ink rule, a hairline 2 px under it, a heading that says what is found. */
export function Section({ title, note, tools, id, level = 2, className, children }: SectionProps) {
  const Heading = level === 2 ? "h2" : "h3";
  return (
    <section className={classNames("section", className)} id={id}>
      <header className="section-head">
        <div>
          <Heading>{title}</Heading>
          {note && <p>{note}</p>}
        </div>
        {tools && <div className="tools">{tools}</div>}
      </header>
      {children}
    </section>
  );
}

/** Two columns that become one on a narrow screen. `side`: work at the left, 376 px of context. */
export function Columns({
  kind = "wide-narrow",
  className,
  children,
}: {
  kind?: "wide-narrow" | "equal" | "side";
  className?: string;
  children: ReactNode;
}) {
  return (
    <div className={classNames("columns", kind !== "wide-narrow" && `columns-${kind}`, className)}>
      {children}
    </div>
  );
}

/** Sections under each other at the section gap (48 px, 36 on a phone; 32 when `close`). */
export function Stack({
  close = false,
  className,
  children,
}: {
  close?: boolean;
  className?: string;
  children: ReactNode;
}) {
  return <div className={classNames("stack", close && "stack-close", className)}>{children}</div>;
}
