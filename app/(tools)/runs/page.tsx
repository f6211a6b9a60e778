import type { Metadata } from "next";
import { requireActor } from "@/app/_server/session";
import { RunsPage } from "./_components/runs-page";

import "./runs.css";

export const metadata: Metadata = { title: "Runs" };

export default async function RunsRoute() {
  await requireActor("run.read");
  return <RunsPage />;
}
