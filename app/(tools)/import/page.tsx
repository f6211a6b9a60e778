import type { Metadata } from "next";
import { requireActor } from "@/app/_server/session";
import { ColumnGuide } from "./_components/column-guide";
import { ImportStart } from "./_components/import-start";

export const metadata: Metadata = { title: "Import" };

export default async function ImportPage() {
  await requireActor("import.read");
  return <ImportStart guide={<ColumnGuide />} />;
}
