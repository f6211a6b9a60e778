import type { Browser, Page } from "playwright-core";
import { afterAll, beforeAll, describe, expect, it } from "vitest";
import type { EstimateView } from "@/app/api/v1/estimates/schema";
import { comparisonHref } from "@/components/compare/sides";
import type { Role } from "@/services/policy";
import { buildApproved, buildDraft, buildPriceDeck, buildSubmitted } from "../factories";
import { axeViolations, launchBrowser, openPage } from "../support/browser";

let browser: Browser;
let draft: EstimateView;
let submitted: EstimateView;
let approved: EstimateView;
let deckId: string;

beforeAll(async () => {
  browser = await launchBrowser();
  draft = await buildDraft();
  submitted = await buildSubmitted();
  approved = await buildApproved();
  deckId = (await buildPriceDeck()).id;
});

afterAll(async () => {
  await browser?.close();
});

const fieldOf = ({ place }: EstimateView) => `/fields/${place.field.slug}`;
const reservoirOf = (estimate: EstimateView) =>
  `${fieldOf(estimate)}/${estimate.place.reservoir.slug}`;

/** Every page there is, by a role that sees most of it. A new page gets its line here. */
const pages: Partial<Record<Role | "visitor", () => string[]>> = {
  visitor: () => ["/sign-in"],
  engineer: () => [
    fieldOf(submitted),
    reservoirOf(draft),
    `${reservoirOf(draft)}/fluid`,
    `${reservoirOf(draft)}/results`,
    `${reservoirOf(draft)}/compare`,
    `${reservoirOf(submitted)}/history`,
    comparisonHref({
      left: { kind: "estimate", estimateId: approved.id },
      right: { kind: "field", fieldId: approved.place.field.id },
    }),
    "/fields/new",
    "/import",
    "/methods",
    "/api-guide",
  ],
  planner: () => [
    "/fields",
    "/portfolio/dependence",
    "/portfolio/dependence?set=new",
    "/prices",
    `/prices/${deckId}`,
    "/review",
    "/runs",
  ],
  executive: () => ["/portfolio"],
  administrator: () => ["/people", "/audit", "/profile"],
};

/** An ordinary desk in both themes, and the narrowest phone: layout follows the width, contrast the theme. */
const views = [
  { width: 1440, theme: "light" },
  { width: 1440, theme: "dark" },
  { width: 360, theme: "dark" },
] as const;

async function findingsOf(page: Page) {
  const findings: unknown[] = [];
  for (const { width, theme } of views) {
    await page.setViewportSize({ width, height: 900 });
    await page.evaluate((name) => {
      document.documentElement.dataset.theme = name;
    }, theme);
    const violations = await axeViolations(page);
    const tooWide = await page.evaluate(
      () => document.documentElement.scrollWidth - document.documentElement.clientWidth,
    );
    if (violations.length > 0 || tooWide > 0) findings.push({ width, theme, violations, tooWide });
  }
  return findings;
}

describe.each(Object.keys(pages) as (keyof typeof pages)[])("every page for a %s", (role) => {
  it("breaks no accessibility rule in either theme, and never scrolls sideways", async () => {
    const opened = await openPage(browser, { as: role === "visitor" ? undefined : role });
    const { page, context, problems } = opened;
    const found: Record<string, unknown> = {};
    for (const path of pages[role]?.() ?? []) {
      await page.setViewportSize({ width: views[0].width, height: 900 });
      await page.goto(path);
      await page.getByRole("heading", { level: 1 }).waitFor();
      await page.waitForLoadState("networkidle");
      await page.locator(".skeleton").first().waitFor({ state: "detached" });
      const findings = await findingsOf(page);
      if (findings.length > 0) found[path] = findings;
    }
    expect(found).toEqual({});
    expect(problems).toEqual([]);
    await context.close();
  });
});
