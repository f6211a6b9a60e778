"use client";

import { PageFailure } from "@/app/_workspace/page-failure";

export default function ErrorPage({
  error,
  reset,
}: {
  error: Error & { digest?: string };
  reset: () => void;
}) {
  return <PageFailure error={error} onRetry={reset} />;
}
