"use client";

import { useRouter, useSearchParams } from "next/navigation";
import { errorWords, ProblemError } from "@/app/_client/request";
import type { ComparisonSide } from "@/app/api/v1/comparisons/schema";
import { useBasis } from "@/components/basis/use-basis";
import { comparisonHref, readComparison, type ComparisonAddress } from "@/components/compare/sides";
import { Button } from "@/components/ui/button";
import { Columns, Page, PageHead } from "@/components/ui/section";
import { EmptyState, Notice, Skeleton } from "@/components/ui/status";
import { useComparison } from "../_queries/comparison";
import { ComparisonBody } from "./comparison-body";
import { SidePicker } from "./side-picker";

/** Any two revisions, concepts or fields beside each other. Both sides are in the address. */
export function ComparePage() {
  const router = useRouter();
  const { basis, withBasis } = useBasis();
  const address = readComparison(useSearchParams());
  const { left, right, result } = address;
  const query = useComparison(left && right ? { left, right, result } : null, basis);

  // The same question would be refused again.
  const isRefused = query.error instanceof ProblemError && query.error.status === 422;

  function go(change: Partial<ComparisonAddress>) {
    router.replace(withBasis(comparisonHref({ ...address, ...change })), { scroll: false });
  }
  const choose = (end: "left" | "right") => (side: ComparisonSide) => go({ [end]: side });

  return (
    <Page wide>
      <PageHead
        title={query.data ? `${query.data.left.label} and ${query.data.right.label}` : "Compare"}
        lead="Any two revisions, ways of producing or whole fields, gross and unrisked."
        actions={
          left &&
          right && <Button onClick={() => go({ left: right, right: left })}>Swap the sides</Button>
        }
      />
      <Columns kind="equal" className="mb-10">
        <SidePicker title="On the left" side={left} onChange={choose("left")} />
        <SidePicker title="On the right" side={right} onChange={choose("right")} />
      </Columns>
      {!left || !right ? (
        <EmptyState title={left || right ? "One side is chosen" : "Choose two sides"}>
          Their results, curves and inputs stand beside each other here, and what explains the
          difference in P50.
        </EmptyState>
      ) : query.isError ? (
        <Notice
          tone="error"
          title="The two could not be compared."
          actions={
            !isRefused && (
              <Button size="small" onClick={() => void query.refetch()}>
                Try again
              </Button>
            )
          }
        >
          {errorWords(query.error)} Choose another side above{isRefused ? "." : ", or try again."}
        </Notice>
      ) : query.data ? (
        <div
          aria-busy={query.isPlaceholderData}
          className={query.isPlaceholderData ? "opacity-60" : undefined}
        >
          <ComparisonBody
            comparison={query.data}
            result={result}
            onResult={(next) => go({ result: next })}
          />
        </div>
      ) : (
        <Skeleton lines={14} label="Setting the two beside each other" />
      )}
    </Page>
  );
}
