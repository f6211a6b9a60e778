import type { Metadata } from "next";
import { notFound } from "next/navigation";
import { requireActor } from "@/app/_server/session";
import { idParams } from "@/app/api/v1/common-schema";
import { RunPage } from "../_components/run-page";

import "../runs.css";

export const metadata: Metadata = { title: "Run" };

export default async function RunRoute({ params }: { params: Promise<{ id: string }> }) {
  await requireActor("run.read");
  const parsed = idParams.safeParse(await params);
  if (!parsed.success) notFound();
  return <RunPage id={parsed.data.id} />;
}
