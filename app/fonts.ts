import localFont from "next/font/local";

/** Page titles, headline figures and editorial notes. */
export const serif = localFont({
  variable: "--font-serif",
  display: "swap",
  fallback: ["Georgia", "serif"],
  src: [
    {
      path: "../fonts/source-serif-4-latin-opsz-normal.woff2",
      weight: "200 900",
      style: "normal",
    },
    {
      path: "../fonts/source-serif-4-latin-wght-italic.woff2",
      weight: "200 900",
      style: "italic",
    },
  ],
});

/** Everything else. */
export const sans = localFont({
  variable: "--font-sans",
  display: "swap",
  fallback: ["Segoe UI", "sans-serif"],
  src: [
    { path: "../fonts/source-sans-3-latin-wght-normal.woff2", weight: "200 900", style: "normal" },
    { path: "../fonts/source-sans-3-latin-wght-italic.woff2", weight: "200 900", style: "italic" },
  ],
});
