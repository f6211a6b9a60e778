import Link from "next/link";
import { PublicPage } from "./(public)/_components/public-page";

export default function NotFound() {
  return (
    <PublicPage title="There is no such page in the book.">
      <p>
        It may have been renamed, or the address was cut short on its way here.{" "}
        <Link href="/">Open the book at its front page.</Link>
      </p>
    </PublicPage>
  );
}
