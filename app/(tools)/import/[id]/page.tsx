import type { Metadata } from "next";
import { notFound } from "next/navigation";
import { requireActor } from "@/app/_server/session";
import { idParams } from "@/app/api/v1/common-schema";
import { ImportFile } from "../_components/import-file";

export const metadata: Metadata = { title: "Import" };

export default async function ImportFilePage({ params }: { params: Promise<{ id: string }> }) {
  await requireActor("import.read");
  const parsed = idParams.safeParse(await params);
  if (!parsed.success) notFound();
  return <ImportFile id={parsed.data.id} />;
}
