"use client";

import "./globals.css";

/** Takes the place of the whole document when even the layout fails, so it leans on nothing but the colours. */
export default function GlobalError({
  error,
  reset,
}: {
  error: Error & { digest?: string };
  reset: () => void;
}) {
  return (
    <html lang="en" data-theme="light">
      <body>
        <main className="mx-auto max-w-xl px-4 py-16">
          <title>Dewledger</title>
          <h1>Dewledger could not be shown</h1>
          <p className="mt-4">
            Something went wrong before the page could begin. What you had saved is kept.
            {error.digest &&
              ` If it happens again, tell your administrator the number ${error.digest}.`}
          </p>
          <button
            type="button"
            className="mt-4 border border-rule-strong bg-sheet px-4 py-2 font-semibold"
            onClick={reset}
          >
            Try again
          </button>
        </main>
      </body>
    </html>
  );
}
