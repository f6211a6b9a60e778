import type { Metadata } from "next";
import { Suspense } from "react";
import { requireActor } from "@/app/_server/session";
import { ReviewInbox } from "./_components/review-inbox";

export const metadata: Metadata = { title: "Review" };

export default async function ReviewPage() {
  await requireActor("estimate.read");
  return (
    <Suspense>
      <ReviewInbox />
    </Suspense>
  );
}
