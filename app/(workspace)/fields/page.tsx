import type { Metadata } from "next";
import { RankingPage } from "./_components/ranking-page";
import "./ranking.css";

export const metadata: Metadata = { title: "Fields" };

export default function FieldsPage() {
  return <RankingPage />;
}
