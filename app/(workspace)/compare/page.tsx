import type { Metadata } from "next";
import { ComparePage } from "./_components/compare-page";

export const metadata: Metadata = { title: "Compare" };

export default function Page() {
  return <ComparePage />;
}
