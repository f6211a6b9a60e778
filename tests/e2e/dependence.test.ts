import type { Browser } from "playwright-core";
import { afterAll, beforeAll, describe, expect, it } from "vitest";
import type { DependenceSetView } from "@/app/api/v1/dependence-sets/schema";
import type { Statement } from "@/app/api/v1/portfolio/schema";
import { formatFigure } from "@/components/ui/format";
import { as, made, uniqueName } from "../factories";
import { launchBrowser, openPage } from "../support/browser";

let browser: Browser;

beforeAll(async () => {
  browser = await launchBrowser();
});

afterAll(async () => {
  await browser?.close();
});

describe("a dependence set in a planner's hands", () => {
  it("is refused above the most there is to share, then saved, and moves the total it is chosen for", async () => {
    const name = uniqueName("Sceptic");
    const { page, problems } = await openPage(browser, { as: "planner" });
    await page.goto("/portfolio/dependence?set=new");
    await page.getByLabel("Name").fill(name);
    await page.getByLabel("Both in Corrith").fill("1.2");
    await page.getByText("At most 0.99").waitFor();
    expect(await page.getByRole("button", { name: "Save as a new set" }).isDisabled()).toBe(true);
    await page.getByLabel("Both in Corrith").fill("0.9");
    await page.getByText("Upper half together: 86 in 100 instead of 50").waitFor();
    await page.getByRole("button", { name: "Save as a new set" }).click();
    await page.getByRole("heading", { name: `What “${name}” says` }).waitFor();

    const client = await as("planner");
    const { items } = made(
      await client.get<{ items: DependenceSetView[] }>("/api/v1/dependence-sets"),
    );
    const set = items.find((item) => item.name === name);
    expect(set).toBeDefined();
    const p90Of = async (search: string) => {
      const statement = made(await client.get<Statement>(`/api/v1/portfolio${search}`));
      return statement.totals!.trialByTrial.liquidValue!.p90 / 1e6;
    };
    const [standing, moved] = [await p90Of(""), await p90Of(`?dependence=${set!.id}`)];
    expect(moved).toBeLessThan(standing);

    await page.getByRole("button", { name: /^Dependence/ }).click();
    await page.getByRole("menuitem", { name }).click();
    await page.waitForURL(new RegExp(`dependence=${set!.id}`));
    await page.getByRole("link", { name: "Portfolio", exact: true }).first().click();
    await page.getByText(`fields moving together by “${name}”`).waitFor();
    const headline = await page.getByRole("region", { name: "Totals" }).innerText();
    expect(headline).toContain(formatFigure(moved));
    expect(headline).not.toContain(formatFigure(standing));
    expect(problems).toEqual([]);
  });
});
