import type { Metadata } from "next";
import { Suspense } from "react";
import { requireActor } from "@/app/_server/session";
import { AuditTrail } from "./_components/audit-trail";

export const metadata: Metadata = { title: "Audit" };

export default async function AuditPage() {
  await requireActor("audit.read");
  return (
    <Suspense>
      <AuditTrail />
    </Suspense>
  );
}
