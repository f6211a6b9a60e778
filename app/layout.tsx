import type { Metadata, Viewport } from "next";
import { Providers } from "@/components/layout/providers";
import { sans, serif } from "./fonts";
// The component classes come first, so that a utility of globals.css always wins over them.
import "./styles/ledger.css";
import "./styles/table.css";
import "./styles/marks.css";
import "./styles/plot.css";
import "./styles/statement.css";
import "./styles/forms.css";
import "./styles/float.css";
import "./styles/shell.css";
import "./styles/sign-in.css";
import "./styles/estimate.css";
import "./styles/inputs.css";
import "./styles/drivers.css";
import "./styles/fluid.css";
import "./styles/lists.css";
import "./styles/recovery.css";
import "./globals.css";

export const metadata: Metadata = {
  title: { default: "Dewledger", template: "%s – Dewledger" },
  description:
    "The shared book of a gas-condensate portfolio: what is in the ground, what reaches the tank, and how sure we are.",
  icons: { icon: "/icon.svg" },
};

export const viewport: Viewport = { width: "device-width", initialScale: 1 };

/** Every page depends on who asks and on what the book holds now, so none is rendered while building. */
export const dynamic = "force-dynamic";

/** Sets the theme before the first paint; a remembered choice beats the system's. */
const setTheme = `try{var t=localStorage.getItem("theme");document.documentElement.dataset.theme=t==="dark"||t==="light"?t:matchMedia("(prefers-color-scheme: dark)").matches?"dark":"light"}catch(e){}`;

export default function RootLayout({ children }: { children: React.ReactNode }) {
  return (
    <html
      lang="en"
      data-theme="light"
      className={`${sans.variable} ${serif.variable}`}
      suppressHydrationWarning
    >
      <head>
        <script dangerouslySetInnerHTML={{ __html: setTheme }} />
      </head>
      <body>
        <Providers>{children}</Providers>
      </body>
    </html>
  );
}
