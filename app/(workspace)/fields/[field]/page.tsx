import type { Metadata } from "next";
import { titleOfAddress } from "@/app/_client/address-title";
import { FieldPage } from "./_components/field-page";

interface Props {
  params: Promise<{ field: string }>;
}

export async function generateMetadata({ params }: Props): Promise<Metadata> {
  return { title: titleOfAddress((await params).field) };
}

export default async function FieldRoute({ params }: Props) {
  return <FieldPage slug={(await params).field} />;
}
