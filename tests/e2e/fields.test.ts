import { readFile } from "node:fs/promises";
import { parse } from "csv-parse/sync";
import type { Browser, Page } from "playwright-core";
import { afterAll, beforeAll, describe, expect, it } from "vitest";
import { formatFigure } from "@/components/ui/format";
import { launchBrowser, openPage, type PageOptions } from "../support/browser";

let browser: Browser;

beforeAll(async () => {
  browser = await launchBrowser();
});

afterAll(async () => {
  await browser.close();
});

async function openRanking(options: PageOptions & { search?: string } = {}) {
  const { search = "", ...rest } = options;
  const opened = await openPage(browser, { as: "planner", ...rest });
  await opened.page.goto(`/fields${search}`);
  await opened.page.getByRole("row", { name: /Total, added up trial by trial/ }).waitFor();
  return opened;
}

const namesOf = (page: Page) => page.locator("tbody th[scope=row] a").allTextContents();

/** Waits until the rows are those of the present filter and order: the count says so. */
async function waitForCount(page: Page, count: RegExp) {
  await page.getByRole("status").filter({ hasText: count }).waitFor();
}

async function download(page: Page, name: string): Promise<Record<string, string>[]> {
  const [file] = await Promise.all([
    page.waitForEvent("download"),
    page.getByRole("link", { name }).click(),
  ]);
  return parse(await readFile(await file.path()), { columns: true, bom: true });
}

describe("the ranking in a planner's hands", () => {
  it("filters, sorts, and writes a CSV whose rows and total are those on the screen", async () => {
    const { page, problems } = await openRanking();
    await page.getByRole("button", { name: "Class all" }).click();
    await page.getByRole("menuitem", { name: "Reserves" }).click();
    await page.locator("tbody", { hasText: "Contingent" }).waitFor({ state: "detached" });
    await page.getByRole("button", { name: "P90", exact: true }).click();
    await page.waitForURL(/sort=liquidValueP90/);
    await page.locator('th[aria-sort="descending"]', { hasText: "P90" }).waitFor();

    const rows = await download(page, "Export CSV");
    const names = rows.filter((row) => row.row_kind === "field").map((row) => row.field);
    expect(await namesOf(page)).toEqual(names);
    const total = rows.find((row) => row.row_kind === "total_trial_by_trial")!;
    const totalRow = page.getByRole("row", { name: /Total, added up trial by trial/ });
    expect(await totalRow.innerText()).toContain(
      formatFigure(Number(total.liquid_value_p90_million)),
    );
    expect(problems).toEqual([]);
  });

  it("finds a field by part of its name and keeps the search in the address", async () => {
    const { page } = await openRanking();
    await page.getByLabel("Find a field, basin or operator").fill("pellow");
    await page.waitForURL(/search=pellow/);
    await waitForCount(page, /^2 of/);
    await page.reload();
    await waitForCount(page, /^2 of/);
    expect((await namesOf(page)).sort()).toEqual(["Pellow North", "Pellow South"]);
    await page.getByRole("button", { name: "Clear filters" }).click();
    await page.waitForURL((url) => url.search === "");
  });

  it("adds chosen columns and keeps them in the address", async () => {
    const { page } = await openRanking();
    await page.getByRole("button", { name: /^Columns/ }).click();
    await page.getByRole("checkbox", { name: "Operator" }).check();
    await page.waitForURL(/columns=[^&]*operator/);
    await page.getByRole("columnheader", { name: "Operator" }).waitFor();
    await page.getByRole("button", { name: "Reset" }).click();
    await page.getByRole("columnheader", { name: "Operator" }).waitFor({ state: "detached" });
  });

  it("says what selected fields come to together, trial by trial", async () => {
    const { page } = await openRanking();
    await page.getByLabel("Select Hollin Deep").check();
    await page.getByLabel("Select Umberlow").check();
    const bar = page.getByRole("region", { name: "Chosen rows" });
    await bar.getByText(/Together, trial by trial: mean/).waitFor();
    expect(await bar.innerText()).toMatch(/2 fields selected/);
    expect(await bar.innerText()).toMatch(/their P90s add to/);
    await bar.getByRole("button", { name: "Clear selection" }).click();
    await bar.waitFor({ state: "detached" });
  });

  it("follows the basis: the same fields gross, in metric units", async () => {
    const { page } = await openRanking({ search: "?interest=gross&units=metric&base=metric" });
    const heading = page.getByRole("columnheader", { name: /Sales gas/ });
    expect(await heading.innerText()).toContain("10⁹ Sm³");
  });

  it("says so when nothing matches, and offers the way back", async () => {
    const { page } = await openPage(browser, { as: "planner" });
    await page.goto("/fields?search=nowhere+at+all");
    await page.getByText("No field matches these filters").waitFor();
    await page.getByRole("button", { name: "Clear filters" }).last().click();
    await page.getByRole("row", { name: /Total, added up trial by trial/ }).waitFor();
  });
});

describe("the ranking for everybody", () => {
  it("offers no export to an administrator", async () => {
    const { page } = await openRanking({ as: "administrator" });
    await page.waitForLoadState("networkidle");
    expect(await page.getByRole("link", { name: "Export CSV" }).count()).toBe(0);
  });
});
