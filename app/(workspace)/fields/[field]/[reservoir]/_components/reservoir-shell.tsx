"use client";

import { usePathname } from "next/navigation";
import type { ReactNode } from "react";
import { errorWords, ProblemError } from "@/app/_client/request";
import { Button, LinkButton } from "@/components/ui/button";
import { Page, PageHead } from "@/components/ui/section";
import { Notice, Skeleton } from "@/components/ui/status";
import { Tabs } from "@/components/ui/tabs";
import { ReservoirProvider, useReservoir } from "../_editor/reservoir-context";
import { useReservoirPage, type Place } from "../_queries/reservoir-page";
import { ConflictDialog } from "./conflict-dialog";
import { ReservoirHead } from "./reservoir-head";
import { ReservoirNotices } from "./reservoir-notices";

/** The frame of a reservoir's tabs. What is being typed lives here, so that changing tabs loses nothing. */
export function ReservoirShell({ place, children }: { place: Place; children: ReactNode }) {
  const query = useReservoirPage(place);
  if (query.isPending) {
    return (
      <Page wide>
        <Skeleton lines={14} label="Loading the reservoir" />
      </Page>
    );
  }
  if (query.isError) return <Failure error={query.error} onRetry={() => void query.refetch()} />;
  return (
    <Page wide>
      <ReservoirProvider key={query.data.id} place={place} page={query.data}>
        <ReservoirHead />
        <ReservoirTabs />
        <ReservoirNotices />
        {children}
        <ConflictDialog />
      </ReservoirProvider>
    </Page>
  );
}

function ReservoirTabs() {
  const { place, page, shown, before, withBasis } = useReservoir();
  const pathname = usePathname();
  const here = `/fields/${place.field}/${place.reservoir}`;
  const tabs = [
    { href: here, label: "Inputs" },
    { href: `${here}/fluid`, label: "Fluid sample", count: page.fluidSamples.length || undefined },
    { href: `${here}/results`, label: "Results" },
    ...(shown && (before || shown.can.approve || shown.can.return)
      ? [{ href: `${here}/compare`, label: before ? `Compare with r${before.revision}` : "Review" }]
      : []),
    { href: `${here}/history`, label: "History", count: page.revisions.length || undefined },
  ];
  return (
    <Tabs
      label="Parts of the estimate"
      current={pathname}
      tabs={tabs.map((tab) => ({ ...tab, href: withBasis(tab.href) }))}
    />
  );
}

function Failure({ error, onRetry }: { error: Error; onRetry: () => void }) {
  const isMissing = error instanceof ProblemError && error.status === 404;
  return (
    <Page>
      <PageHead title={isMissing ? "No such reservoir" : "The reservoir could not be loaded"} />
      <Notice
        tone="error"
        title={isMissing ? "Nothing is at this address." : errorWords(error)}
        actions={
          isMissing ? (
            <LinkButton href="/fields" size="small">
              All fields
            </LinkButton>
          ) : (
            <Button size="small" onClick={onRetry}>
              Try again
            </Button>
          )
        }
      >
        {isMissing ? "It may have been renamed." : "Nothing was changed."}
      </Notice>
    </Page>
  );
}
