import Link from "next/link";
import type { ReactNode } from "react";

/** The product's caution, where the methods are explained, and what made the numbers: "Engine 1.0.0". */
export function Footer({ provenance }: { provenance?: ReactNode }) {
  return (
    <footer className="footer">
      <p>
        Planning estimate, not a reserves report. Have a qualified reserves evaluator review before
        disclosure.
      </p>
      <p>
        <Link href="/methods">Methods and sources</Link>
        {provenance && <> · {provenance}</>}
      </p>
    </footer>
  );
}
