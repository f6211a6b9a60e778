import type { ReactNode } from "react";

/** The product's caution, and what made the numbers: "Engine 1.0.0, 16,384 trials". */
export function Footer({ provenance }: { provenance?: ReactNode }) {
  return (
    <footer className="footer">
      <p>
        Planning estimate, not a reserves report. Have a qualified reserves evaluator review before
        disclosure.
      </p>
      {provenance && <p>{provenance}</p>}
    </footer>
  );
}
