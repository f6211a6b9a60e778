"use client";

import { ProblemError } from "@/app/_client/request";
import { Button, LinkButton } from "@/components/ui/button";
import { Page, PageHead } from "@/components/ui/section";
import { Notice } from "@/components/ui/status";

export interface PageFailureProps {
  error: Error & { digest?: string };
  /** renders the page again */
  onRetry: () => void;
}

/** What stands in place of a page that could not be shown. */
export function PageFailure({ error, onRetry }: PageFailureProps) {
  const reference = error instanceof ProblemError ? error.requestId : error.digest;
  return (
    <Page>
      <PageHead title="This page could not be shown" />
      <Notice
        tone="error"
        title={error instanceof ProblemError ? error.message : "Something went wrong here."}
        actions={
          <>
            <Button size="small" onClick={onRetry}>
              Try again
            </Button>
            <LinkButton size="small" href="/portfolio">
              Go to the portfolio
            </LinkButton>
          </>
        }
      >
        What you had saved is kept.
        {reference && ` If it happens again, tell your administrator the number ${reference}.`}
      </Notice>
    </Page>
  );
}
