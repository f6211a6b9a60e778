"use client";

import { useSearchParams } from "next/navigation";

import { ReadError } from "@/app/_client/read-error";
import { useCan } from "@/app/_client/use-session";
import type { DependenceSetView } from "@/app/api/v1/dependence-sets/schema";
import { useBasis } from "@/components/basis/use-basis";
import { Button, LinkButton } from "@/components/ui/button";
import { Page, PageHead, Stack } from "@/components/ui/section";
import { EmptyState, Notice, Skeleton } from "@/components/ui/status";
import { useBasins, useBookFields, useDependenceSets, useSetTotals } from "../_queries/dependence";
import { RankMeaning } from "./rank-meaning";
import { basinRankWords } from "./rank-words";
import { SetEditor } from "./set-editor";
import { SetReadingView } from "./set-reading";
import { SetsTable } from "./sets-table";

/** The named answers to how fields move together: what each says, what it does to the total, and its editor. */
export function DependencePage() {
  const { basis, setBasis, withBasis } = useBasis();
  const can = useCan();
  const search = useSearchParams();
  const { data: sets, error, refetch } = useDependenceSets();
  const { data: allBasins } = useBasins();
  const { data: fields } = useBookFields();
  const totals = useSetTotals(basis, sets ?? []);
  const crumbs = [{ label: "Portfolio", href: withBasis("/portfolio") }, { label: "Dependence" }];

  if (!sets || !allBasins || !fields) {
    return (
      <Page>
        <PageHead title="How fields move together" crumbs={crumbs} />
        {error ? (
          <ReadError error={error} onRetry={refetch}>
            The sets are kept; only this page could not be read.
          </ReadError>
        ) : (
          <Skeleton lines={10} label="Loading the dependence sets" />
        )}
      </Page>
    );
  }

  // A basin without a field or a figure has nothing to say here; it follows the other basins until it has.
  const basins = allBasins.filter(
    ({ id }) =>
      fields.some(({ basinId }) => basinId === id) ||
      sets.some(({ dependence }) => id in dependence.basinRanks),
  );
  const wanted = search.get("set");
  const mayEdit = can("dependenceSet.update");
  const isNew = wanted === "new" && can("dependenceSet.create");
  const inUse = sets.find(({ id, isDefault }) =>
    basis.dependence === "default" ? isDefault : id === basis.dependence,
  );
  const isGone = wanted !== null && wanted !== "new" && !sets.some(({ id }) => id === wanted);
  const chosen = isGone ? undefined : (sets.find(({ id }) => id === wanted) ?? inUse ?? sets[0]);
  const context = { sets, basins, fields, totals };
  return (
    <Page>
      <PageHead
        title={titleOf(sets, fields)}
        crumbs={crumbs}
        lead="Reservoirs that share a source rock, a survey or a plant tend to disappoint together. The more they do, the wider the total and the lower its P90. Means do not change beyond sampling."
        actions={
          can("dependenceSet.create") && (
            <LinkButton
              kind="primary"
              icon="plus"
              href={withBasis("/portfolio/dependence?set=new")}
              scroll={false}
            >
              New set
            </LinkButton>
          )
        }
      />
      <Stack>
        {!inUse && sets.length > 0 && basis.dependence !== "default" && (
          <Notice
            title="The basis names a dependence set that is not here."
            actions={
              <Button size="small" onClick={() => setBasis({ dependence: "default" })}>
                Use the book’s own set
              </Button>
            }
          >
            It was deleted, or the link is not of this book. The totals below are those of the sets
            that there are.
          </Notice>
        )}
        {isGone && (
          <Notice
            title="The dependence set of this link is not here."
            actions={
              <LinkButton size="small" href={withBasis("/portfolio/dependence")} scroll={false}>
                Show the set in use
              </LinkButton>
            }
          >
            It was deleted, or the link is not of this book. The audit trail keeps what a deleted
            set held; the sets that there are stand below.
          </Notice>
        )}
        {sets.length === 0 ? (
          <EmptyState title="There is no dependence set yet">
            Until a planner makes one, totals treat reservoirs as independent of each other.
          </EmptyState>
        ) : (
          <SetsTable {...context} chosenId={isNew ? null : (chosen?.id ?? null)} inUse={inUse} />
        )}
        {isNew ? (
          <SetEditor key="new" {...context} set={null} />
        ) : (
          chosen &&
          (mayEdit ? (
            // Another set is another form; what was typed stays while the set does.
            <SetEditor key={chosen.id} {...context} set={chosen} />
          ) : (
            <SetReadingView set={chosen} basins={basins} fields={fields} />
          ))
        )}
        <RankMeaning />
      </Stack>
    </Page>
  );
}

function titleOf(
  sets: readonly DependenceSetView[],
  fields: readonly { basinId: string }[],
): string {
  const standing = sets.find(({ isDefault }) => isDefault);
  if (!standing) return "How fields move together";
  const ids = [...new Set(fields.map(({ basinId }) => basinId))];
  return `Totals stand on “${standing.name}”: rank correlation ${basinRankWords(standing.dependence, ids)} within a basin`;
}
