import type { Browser } from "playwright-core";
import { afterAll, beforeAll, describe, expect, it } from "vitest";
import type { PriceDeckView } from "@/app/api/v1/price-decks/schema";
import { as, buildPriceDeck, ifMatch, made } from "../factories";
import { launchBrowser, openPage } from "../support/browser";

let browser: Browser;

beforeAll(async () => {
  browser = await launchBrowser();
});

afterAll(async () => {
  await browser.close();
});

describe("a draft deck in a planner's hands", () => {
  it("is changed, saved, published after a warning, and then stands", async () => {
    const deck = await buildPriceDeck();
    const { page, problems } = await openPage(browser, { as: "planner" });
    await page.goto(`/prices/${deck.id}`);
    const benchmark = page.getByLabel("Condensate, benchmark, mid");
    await benchmark.fill("70.25");
    await page.getByText("Not saved yet").waitFor();
    expect(await page.getByText("67.05").count()).toBeGreaterThan(0);
    await page.getByRole("button", { name: "Save" }).click();
    await page.getByText("is still a draft").waitFor();
    await page.getByRole("button", { name: "Publish", exact: true }).click();
    await page.getByText("cannot be changed or taken back").waitFor();
    await page.getByRole("button", { name: "Publish for good" }).click();
    await page.getByText("Published, for good").waitFor();
    expect(await page.getByLabel("Condensate, benchmark, mid").count()).toBe(0);
    expect(problems).toEqual([]);
  });

  it("names every reason why it cannot be published", async () => {
    const deck = await buildPriceDeck();
    const { page } = await openPage(browser, { as: "planner" });
    await page.goto(`/prices/${deck.id}`);
    await page.getByLabel("Gas, benchmark, high").fill("");
    await page.getByRole("button", { name: "Save" }).click();
    await page.getByText("is still a draft").waitFor();
    await page.getByRole("button", { name: "Publish", exact: true }).click();
    await page.getByRole("button", { name: "Publish for good" }).click();
    await page.getByText("gas has no high price", { exact: false }).waitFor();
  });

  it("loses nobody's work when two save it", async () => {
    const planner = await as("planner");
    const deck = await buildPriceDeck();
    const { page } = await openPage(browser, { as: "planner" });
    await page.goto(`/prices/${deck.id}`);
    await page.getByLabel("Condensate, benchmark, mid").fill("71");
    const path = `/api/v1/price-decks/${deck.id}`;
    made(await planner.patch<PriceDeckView>(path, { note: "Mine first." }, ifMatch(deck)));
    await page.getByRole("button", { name: "Save" }).click();
    await page.getByText("Somebody else saved this draft").waitFor();
    expect(await page.getByLabel("Condensate, benchmark, mid").inputValue()).toBe("71");
    await page.getByRole("button", { name: "Take theirs" }).click();
    expect(await page.getByLabel("Why").inputValue()).toBe("Mine first.");
    expect(await page.getByLabel("Condensate, benchmark, mid").inputValue()).toBe("68.5");
  });

  it("is not there to be changed by anybody else", async () => {
    const deck = await buildPriceDeck();
    const { page } = await openPage(browser, { as: "engineer" });
    await page.goto(`/prices/${deck.id}`);
    await page.getByRole("heading", { level: 1, name: deck.name }).waitFor();
    expect(await page.getByRole("button", { name: "Publish", exact: true }).count()).toBe(0);
  });
});
