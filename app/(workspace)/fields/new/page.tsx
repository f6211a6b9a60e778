import type { Metadata } from "next";
import { NewField } from "../[field]/_components/new-field";

export const metadata: Metadata = { title: "New field" };

export default function NewFieldPage() {
  return <NewField />;
}
