import { redirect } from "next/navigation";

/** The book opens at the portfolio. */
export default function FrontPage() {
  redirect("/portfolio");
}
