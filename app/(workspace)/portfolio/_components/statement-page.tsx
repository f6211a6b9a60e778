"use client";

import { errorWords } from "@/app/_client/request";
import { useCan } from "@/app/_client/use-session";
import { UseOwnSet } from "@/app/_workspace/use-own-set";
import type { Statement } from "@/app/api/v1/portfolio/schema";
import { basisHref, type Basis } from "@/components/basis/basis";
import { useBasis } from "@/components/basis/use-basis";
import { listWords, reportingOf } from "@/components/portfolio/reporting";
import { Button, LinkButton } from "@/components/ui/button";
import { formatDate } from "@/components/ui/format";
import { Columns, Page, PageHead, Stack } from "@/components/ui/section";
import { EmptyState, Notice, Skeleton } from "@/components/ui/status";
import { useStatement } from "../_queries/statement";
import { AttentionSection } from "./attention-section";
import { BasinSection } from "./basin-section";
import { ConcentrationSection } from "./concentration-section";
import { ContributionSection } from "./contribution-section";
import { DiversificationSection } from "./diversification-section";
import { ExceedanceSection } from "./exceedance-section";
import { TotalsSection } from "./totals-section";
import { MoversSection, YearBridge } from "./year-section";

const TITLE = "Statement of the portfolio";

/** The home of the workspace: what the whole book comes to, on what it hangs, and what needs a look. */
export function StatementPage() {
  const { basis } = useBasis();
  const { data, error, refetch, isPlaceholderData } = useStatement(basis);

  if (error) {
    return (
      <Page>
        <PageHead title={TITLE} />
        <Notice
          tone="error"
          title="The statement could not be computed."
          actions={
            <>
              <UseOwnSet error={error} />
              <Button size="small" onClick={() => void refetch()}>
                Try again
              </Button>
            </>
          }
        >
          {errorWords(error)} Nothing in the book has changed.
        </Notice>
      </Page>
    );
  }
  if (!data) {
    return (
      <Page>
        <PageHead title={TITLE} lead="Adding up the fields, trial by trial." />
        <Skeleton lines={14} label="Computing the statement" />
      </Page>
    );
  }
  return (
    <Page>
      <StatementHead statement={data} basis={basis} />
      <div aria-busy={isPlaceholderData} className={isPlaceholderData ? "opacity-60" : undefined}>
        {data.totals ? (
          <StatementBody statement={data} basis={basis} />
        ) : (
          <NothingCounted statement={data} basis={basis} />
        )}
      </div>
    </Page>
  );
}

function StatementHead({ statement, basis }: { statement: Statement; basis: Basis }) {
  const can = useCan();
  const { asOf, counted, leftOut } = statement;
  const kind = basis.estimates === "approved" ? "an approved estimate" : "a computed estimate";
  const names = leftOut.map(({ name }) => name);
  const lead = [
    `As of ${formatDate(asOf, "long")}. ${counted} of ${counted + leftOut.length} fields have ${kind} and are counted here.`,
    names.length > 0 && names.length <= 6
      ? ` ${listWords(names)} ${names.length === 1 ? "has" : "have"} none yet and ${names.length === 1 ? "is" : "are"} left out, not counted as zero.`
      : names.length > 6 &&
        ` ${names.length} fields have none yet and are left out, not counted as zero.`,
  ];
  return (
    <PageHead
      title={TITLE}
      lead={lead}
      actions={
        <>
          <Button icon="print" onClick={() => window.print()}>
            Print
          </Button>
          {can("export.create") && (
            <>
              <a className="button" href={basisHref("/api/v1/exports/budget.csv", basis)} download>
                Budget CSV
              </a>
              <a className="button button-quiet" href="/api/v1/exports/budget-dictionary.csv">
                Its columns explained
              </a>
            </>
          )}
        </>
      }
    />
  );
}

function NothingCounted({ statement, basis }: { statement: Statement; basis: Basis }) {
  const can = useCan();
  if (statement.leftOut.length === 0) {
    return (
      <EmptyState
        title="The book has no fields yet"
        action={
          can("import.create") ? (
            <LinkButton kind="primary" href="/import">
              Import reservoirs from a spreadsheet
            </LinkButton>
          ) : undefined
        }
      >
        Fields come in with their reservoirs, separator tests and ranges. Once an estimate is
        approved, its volumes and values are added up here.
      </EmptyState>
    );
  }
  return (
    <EmptyState
      title={
        basis.estimates === "approved"
          ? "No field has an approved estimate yet"
          : "No estimate has been computed yet"
      }
      action={
        <LinkButton kind="primary" href={basisHref("/fields", basis)}>
          Look at the fields
        </LinkButton>
      }
    >
      Totals appear here as soon as one is there. Fields without one are never counted as zero.
    </EmptyState>
  );
}

function StatementBody({ statement, basis }: { statement: Statement; basis: Basis }) {
  const reporting = reportingOf(basis, statement.prices);
  const part = { statement, reporting };
  return (
    <>
      {!statement.prices && (
        <div className="mb-6">
          <Notice tone="info" title="There is no published price deck.">
            Volumes are shown; values appear when a planner publishes one.
          </Notice>
        </div>
      )}
      <TotalsSection {...part} basis={basis} />
      <Columns className="statement-columns mt-[var(--gap)]">
        <Stack>
          <ExceedanceSection {...part} />
          <ContributionSection {...part} />
          <ConcentrationSection {...part} />
          {statement.year && <YearBridge {...part} year={statement.year} />}
        </Stack>
        <Stack>
          <AttentionSection {...part} />
          <DiversificationSection {...part} />
          <BasinSection {...part} />
          {statement.year && <MoversSection {...part} year={statement.year} />}
        </Stack>
      </Columns>
    </>
  );
}
