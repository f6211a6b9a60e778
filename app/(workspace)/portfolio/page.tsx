import type { Metadata } from "next";
import { StatementPage } from "./_components/statement-page";
import "./statement-page.css";

export const metadata: Metadata = { title: "Statement of the portfolio" };

export default function PortfolioPage() {
  return <StatementPage />;
}
