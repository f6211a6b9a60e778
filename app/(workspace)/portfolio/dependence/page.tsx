import type { Metadata } from "next";
import { Suspense } from "react";
import { requireActor } from "@/app/_server/session";
import { DependencePage } from "./_components/dependence-page";
import "./dependence.css";

export const metadata: Metadata = { title: "How fields move together" };

export default async function DependenceRoute() {
  await requireActor("dependenceSet.read");
  return (
    <Suspense>
      <DependencePage />
    </Suspense>
  );
}
