import type { Browser } from "playwright-core";
import { afterAll, beforeAll, describe, expect, it } from "vitest";
import { demoPassword, people } from "../support/api";
import { launchBrowser, openPage } from "../support/browser";

let browser: Browser;

beforeAll(async () => {
  browser = await launchBrowser();
});

afterAll(async () => {
  await browser.close();
});

describe("the sign-in page", () => {
  it("leads a visitor in, and on to the page that was asked for, with its basis", async () => {
    const { page, problems } = await openPage(browser);
    await page.goto("/prices?case=high");
    await page.waitForURL(/\/sign-in\?callbackUrl=/);
    await page.getByLabel("Work e-mail").fill(people.planner);
    await page.getByLabel("Password").fill(demoPassword);
    await page.getByRole("button", { name: "Sign in", exact: true }).click();
    await page.waitForURL(/\/prices\?case=high$/);
    await page.getByText("in the high case").waitFor();
    expect(problems).toEqual([]);
  });

  it("says in words that the two do not belong together, and keeps the address typed", async () => {
    const { page } = await openPage(browser);
    await page.goto("/sign-in");
    await page.getByLabel("Work e-mail").fill(people.planner);
    await page.getByLabel("Password").fill("not-the-password");
    await page.getByRole("button", { name: "Sign in", exact: true }).click();
    await page.getByText("do not belong together").waitFor();
    expect(await page.getByLabel("Work e-mail").inputValue()).toBe(people.planner);
    expect(page.url()).not.toContain("not-the-password");
  });

  it("asks for what is missing at its field", async () => {
    const { page } = await openPage(browser);
    await page.goto("/sign-in");
    await page.getByRole("button", { name: "Sign in", exact: true }).click();
    await page.getByText("Give your e-mail address.").waitFor();
    await page.getByText("Give your password.").waitFor();
  });

  it("offers the accounts of the demo, each a click away", async () => {
    const { page } = await openPage(browser);
    await page.goto("/sign-in");
    await page.getByRole("button", { name: "Executive Ruth Calderwyn" }).click();
    await page.waitForURL(/\/portfolio$/);
    await page.getByRole("button", { name: /Ruth Calderwyn/ }).waitFor();
  });

  it("never leads to another site", async () => {
    const { page } = await openPage(browser, { as: "engineer" });
    await page.goto("/sign-in?callbackUrl=https%3A%2F%2Felsewhere.example%2F");
    await page.waitForURL(/\/portfolio$/);
  });
});

describe("signing out", () => {
  it("ends the session on this device", async () => {
    const { page } = await openPage(browser, { as: "reviewer" });
    await page.goto("/review");
    await page.getByRole("button", { name: /Tobias Falkmere/ }).click();
    await page.getByRole("menuitem", { name: "Sign out" }).click();
    await page.waitForURL(/\/sign-in/);
    await page.goto("/review");
    await page.waitForURL(/\/sign-in\?callbackUrl=%2Freview$/);
  });
});
