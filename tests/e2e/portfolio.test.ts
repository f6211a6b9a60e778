import type { Browser } from "playwright-core";
import { afterAll, beforeAll, describe, expect, it } from "vitest";
import type { Statement } from "@/app/api/v1/portfolio/schema";
import { formatFigure } from "@/components/ui/format";
import { as, made } from "../factories";
import { launchBrowser, openPage, type PageOptions } from "../support/browser";

let browser: Browser;

beforeAll(async () => {
  browser = await launchBrowser();
});

afterAll(async () => {
  await browser.close();
});

async function openStatement(options: PageOptions & { search?: string } = {}) {
  const { search = "", ...rest } = options;
  const opened = await openPage(browser, { as: "executive", ...rest });
  await opened.page.goto(`/portfolio${search}`);
  await opened.page.getByRole("heading", { name: "What needs attention" }).waitFor();
  return opened;
}

async function readStatement(search = "") {
  const client = await as("executive");
  return made(await client.get<Statement>(`/api/v1/portfolio${search}`));
}

describe("the statement in an executive's hands", () => {
  it("opens as the home page, with the totals that the API gives", async () => {
    const { page, problems } = await openPage(browser, { as: "executive" });
    await page.goto("/");
    await page.waitForURL(/\/portfolio$/);
    const { totals, counted, leftOut } = await readStatement();
    const value = totals!.trialByTrial.liquidValue!;
    const headline = page.getByRole("region", { name: "Totals" });
    await headline.waitFor();
    const text = await headline.innerText();
    for (const amount of [value.p90, value.p50, value.p10, value.mean]) {
      expect(text).toContain(formatFigure(amount / 1e6));
    }
    expect(await page.locator("main").innerText()).toContain(
      `${counted} of ${counted + leftOut.length} fields`,
    );
    expect(problems).toEqual([]);
  });

  it("states in its headings what it found, with the figures in them", async () => {
    const { page } = await openStatement();
    const headings = await page.getByRole("heading", { level: 2 }).allTextContents();
    const text = headings.join("\n");
    expect(text).toMatch(/Adding up the fields’ P90s would hide \$[\d.]+ billion of the low case/);
    expect(text).toMatch(/Five fields carry \d+\s% of the liquid value/);
    expect(text).toMatch(/(Up|Down) \$[\d.]+ (million|billion) on the estimates of a year ago/);
  });

  it("leads from a revision that waits to the reservoir it is about", async () => {
    const { page } = await openStatement();
    await page.getByRole("link", { name: "Pellow North, revision 4" }).click();
    await page.waitForURL(/\/fields\/pellow-north\/marrow-sand-main/);
  });

  it("says on the risked basis what its ranges leave out", async () => {
    const { page } = await openStatement({ search: "?risk=risked" });
    await page.getByText("ranges leave out the chance of nothing").waitFor();
  });

  it("shows the exceedance curve as a table too", async () => {
    const { page } = await openStatement();
    const figure = page.getByRole("figure").filter({ hasText: "Adding up the fields" });
    await figure.getByRole("button", { name: "Table" }).click();
    expect(await figure.getByRole("row").count()).toBe(102);
  });
});
