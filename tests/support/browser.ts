import fs from "node:fs";
import path from "node:path";
import { type Browser, type BrowserContext, chromium, type Page } from "playwright-core";
import type { Role } from "@/services/policy";
import { signIn } from "./api";
import { testEnvironment } from "./environment";

/** Debian's Chromium; one per test file, closed in `afterAll`. */
export function launchBrowser(): Promise<Browser> {
  return chromium.launch({
    executablePath: testEnvironment.chromium,
    args: [
      "--no-sandbox",
      "--disable-gpu",
      "--disable-quic",
      "--no-first-run",
      "--disable-background-networking",
      "--disable-component-update",
      "--disable-sync",
      // /dev/shm is small in containers.
      "--disable-dev-shm-usage",
    ],
  });
}

export interface PageOptions {
  /** Sign in as this person of the demo; left out: nobody. */
  as?: Role;
  width?: number;
  height?: number;
  theme?: "light" | "dark";
}

/** A page of its own context, with cookies, size and theme set before anything loads. */
export async function openPage(
  browser: Browser,
  { as, width = 1440, height = 900, theme = "light" }: PageOptions = {},
): Promise<{ page: Page; context: BrowserContext; problems: string[] }> {
  const context = await browser.newContext({
    baseURL: testEnvironment.baseUrl,
    viewport: { width, height },
    colorScheme: theme,
    locale: "en-GB",
    timezoneId: "UTC",
    reducedMotion: "reduce",
  });
  if (as !== undefined) await context.addCookies((await signIn(as)).cookies());
  const page = await context.newPage();
  const problems: string[] = [];
  page.on("pageerror", (error) => problems.push(`uncaught: ${error.message}`));
  page.on("console", (message) => {
    if (message.type() === "error") problems.push(`console: ${message.text()}`);
  });
  return { page, context, problems };
}

let axeSource: string | undefined;

/** One accessibility rule that a page breaks, and where. */
export interface AxeViolation {
  id: string;
  help: string;
  targets: string[];
}

/** What axe finds wrong on a page, under WCAG 2.2 A and AA; empty is what we want. */
export async function axeViolations(page: Page): Promise<AxeViolation[]> {
  axeSource ??= fs.readFileSync(path.resolve("node_modules/axe-core/axe.min.js"), "utf8");
  await page.evaluate(axeSource);
  return page.evaluate(async () => {
    const { axe } = window as unknown as {
      axe: {
        run: (
          root: Document,
          options: object,
        ) => Promise<{ violations: { id: string; help: string; nodes: { target: string[] }[] }[] }>;
      };
    };
    const tags = ["wcag2a", "wcag2aa", "wcag21a", "wcag21aa", "wcag22aa"];
    const { violations } = await axe.run(document, { runOnly: { type: "tag", values: tags } });
    return violations.map(({ id, help, nodes }) => ({
      id,
      help,
      targets: nodes.map(({ target }) => target.join(" ")),
    }));
  });
}
