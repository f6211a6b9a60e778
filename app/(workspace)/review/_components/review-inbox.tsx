"use client";

import { ReadError } from "@/app/_client/read-error";
import { countWord } from "@/app/_client/words";
import { useSession } from "@/app/_client/use-session";
import { useBasis } from "@/components/basis/use-basis";
import { LinkButton } from "@/components/ui/button";
import { Page, PageHead, Section, Stack } from "@/components/ui/section";
import { EmptyState, Skeleton } from "@/components/ui/status";
import { useReview } from "../_queries/review";
import { ReviewTable } from "./review-table";
import { inboxTitle } from "./waiting";

/** Estimates that wait for a decision, and those that were sent back. The decision itself is taken on the reservoir's page. */
export function ReviewInbox() {
  const { basis, withBasis } = useBasis();
  const { data: session } = useSession();
  const { data, error, refetch, isPending } = useReview(basis);
  const now = new Date();

  if (isPending) {
    return (
      <Page>
        <PageHead title="Review" />
        <Skeleton lines={8} label="Loading what waits for review" />
      </Page>
    );
  }
  if (!data) {
    return (
      <Page>
        <PageHead title="Review" />
        <ReadError error={error} onRetry={refetch}>
          What waits is kept; only this list could not be read.
        </ReadError>
      </Page>
    );
  }

  const waiting = data.items.filter(({ state }) => state === "submitted");
  const returned = data.items.filter(({ state }) => state === "returned");
  const interest = basis.interest === "net" ? "net to the company" : "gross";
  const unit = `${data.unit}, ${interest}, unrisked`;
  return (
    <Page wide>
      <PageHead
        title={inboxTitle(waiting, now)}
        lead={
          session?.role === "reviewer"
            ? "Open one to see what changed, then approve it or return it with a note. Nobody decides on their own estimate."
            : "Reviewers decide here. Until they do, the approved revision stands in every total."
        }
      />
      <Stack>
        {waiting.length > 0 ? (
          <Section
            title="Waiting for a decision"
            note={`Condensate to the tank, ${unit}; the approved revision behind it.`}
          >
            <ReviewTable items={waiting} unit={data.unit} now={now} />
          </Section>
        ) : (
          <EmptyState
            title="Nothing waits for a decision"
            action={<LinkButton href={withBasis("/fields")}>Open the fields</LinkButton>}
          >
            An engineer submits an estimate from its reservoir’s page; it then stands here until a
            reviewer decides.
          </EmptyState>
        )}
        {returned.length > 0 && (
          <Section
            title={
              returned.length === 1
                ? "One went back to its engineer"
                : `${countWord(returned.length)} went back to their engineers`
            }
            note={`Condensate to the tank, ${unit}. They come back here when they are submitted again.`}
          >
            <ReviewTable items={returned} unit={data.unit} now={now} />
          </Section>
        )}
      </Stack>
    </Page>
  );
}
