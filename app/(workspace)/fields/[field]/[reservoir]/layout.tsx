import type { Metadata } from "next";
import type { ReactNode } from "react";
import { titleOfAddress } from "@/app/_client/address-title";
import { ReservoirShell } from "./_components/reservoir-shell";

interface Props {
  params: Promise<{ field: string; reservoir: string }>;
}

export async function generateMetadata({ params }: Props): Promise<Metadata> {
  const { field, reservoir } = await params;
  return { title: `${titleOfAddress(field)}, ${titleOfAddress(reservoir)}` };
}

/** Holds what is being typed, so that changing tabs keeps it. */
export default async function ReservoirLayout({
  params,
  children,
}: Props & { children: ReactNode }) {
  return <ReservoirShell place={await params}>{children}</ReservoirShell>;
}
