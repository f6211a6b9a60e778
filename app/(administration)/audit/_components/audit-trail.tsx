"use client";

import { useRouter, useSearchParams } from "next/navigation";

import { ReadError } from "@/app/_client/read-error";
import { Button } from "@/components/ui/button";
import { Page, PageHead } from "@/components/ui/section";
import { EmptyState, Skeleton } from "@/components/ui/status";
import { useAuditEvents } from "../_queries/audit-events";
import { AuditFilterBar } from "./audit-filter-bar";
import { AuditTable } from "./audit-table";
import { apiFilter, filterHref, readFilter, type AuditFilter } from "./filter";

const PAGE = 50;

/** Who did what, when, from what to what. The filter lives in the address, and the file has what the filter shows. */
export function AuditTrail() {
  const router = useRouter();
  const filter = readFilter(useSearchParams());
  const search = apiFilter(filter);
  const { data, error, refetch, isPlaceholderData } = useAuditEvents(
    search,
    PAGE,
    (filter.page - 1) * PAGE,
  );
  const isNarrowed = search.size > 0;

  function handleFilter(change: Partial<AuditFilter>) {
    router.replace(filterHref({ ...filter, page: 1, ...change }), { scroll: false });
  }

  return (
    <Page wide>
      <PageHead
        title={titleOf(data?.total, isNarrowed)}
        lead="Every change to the book, with who made it and what it was before. Nothing here can be changed or removed."
        actions={
          <a className="button" href={`/api/v1/exports/audit.csv?${search}`} download>
            {isNarrowed ? "Export these as CSV" : "Export CSV"}
          </a>
        }
      />
      <AuditFilterBar filter={filter} onChange={handleFilter} />
      {!data && !error && <Skeleton lines={12} label="Loading the audit trail" />}
      {error && (
        <ReadError error={error} onRetry={refetch}>
          The trail itself is kept; only this list could not be read.
        </ReadError>
      )}
      {data?.items.length === 0 && (
        <EmptyState
          title="Nothing happened that fits this filter"
          action={<Button onClick={() => router.replace("/audit")}>Show everything</Button>}
        />
      )}
      {data && data.items.length > 0 && (
        <>
          <AuditTable
            events={data.items}
            isOld={isPlaceholderData}
            onlyRecord={(entity, entityId) => handleFilter({ entity, entityId })}
          />
          <Pager page={filter.page} total={data.total} onPage={(page) => handleFilter({ page })} />
        </>
      )}
    </Page>
  );
}

interface PagerProps {
  page: number;
  total: number;
  onPage: (page: number) => void;
}

function Pager({ page, total, onPage }: PagerProps) {
  const first = (page - 1) * PAGE + 1;
  const last = Math.min(page * PAGE, total);
  return (
    <nav className="pager" aria-label="Pages of the trail">
      <span>
        {first.toLocaleString("en-GB")} to {last.toLocaleString("en-GB")} of{" "}
        {total.toLocaleString("en-GB")}
      </span>
      <span className="flex gap-2">
        <Button size="small" disabled={page <= 1} onClick={() => onPage(page - 1)}>
          Newer
        </Button>
        <Button size="small" disabled={last >= total} onClick={() => onPage(page + 1)}>
          Older
        </Button>
      </span>
    </nav>
  );
}

function titleOf(total: number | undefined, isNarrowed: boolean): string {
  if (total === undefined) return "Audit trail";
  const events = `${total.toLocaleString("en-GB")} ${total === 1 ? "change" : "changes"}`;
  return isNarrowed ? `${events} fit this filter` : `${events} on record`;
}
