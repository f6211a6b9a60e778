import type { Browser, Page } from "playwright-core";
import { afterAll, beforeAll, describe, expect, it } from "vitest";
import { axeViolations, launchBrowser } from "../support/browser";
import { startEmptyProduct, type EmptyProduct } from "../support/empty-product";

let browser: Browser;
let product: EmptyProduct;
let page: Page;

beforeAll(async () => {
  product = await startEmptyProduct();
  browser = await launchBrowser();
  const context = await browser.newContext({ baseURL: product.baseUrl, reducedMotion: "reduce" });
  page = await context.newPage();
});

afterAll(async () => {
  await browser?.close();
  await product?.stop();
});

describe("an installation that nobody has used", () => {
  it("opens at its setup, whatever page is asked for", async () => {
    await page.goto("/fields");
    await page.waitForURL(/\/setup$/);
    await page.getByText("Nobody has an account here yet").waitFor();
    expect(await axeViolations(page)).toEqual([]);
  });

  it("refuses a short password at its field, and makes nobody", async () => {
    await page.getByLabel("Your name").fill("Amara Lindqvist");
    await page.getByLabel("Work e-mail").fill("amara.lindqvist@quillmere.example");
    await page.getByLabel("Password").fill("short");
    await page.getByRole("button", { name: "Make my account" }).click();
    await page.getByText("Must have at least 12 characters.").waitFor();
    const answer = await fetch(`${product.baseUrl}/api/v1/setup`);
    expect(await answer.json()).toEqual({ needsSetup: true });
  });

  it("walks its first administrator to a first field in three steps", async () => {
    await page.getByLabel("Password").fill("a-long-enough-secret");
    await page.getByRole("button", { name: "Make my account" }).click();
    await page.getByLabel("Name of the organisation").fill("Harrowgate Gas");
    await page.getByRole("button", { name: "Save and go on" }).click();
    expect(await page.getByLabel("Operator").inputValue()).toBe("Harrowgate Gas");
    await page.getByLabel("Basin").fill("Northmere");
    await page.getByLabel("Field", { exact: true }).fill("Wrenfold");
    await page.getByRole("button", { name: "Add the field and open it" }).click();
    await page.waitForURL(/\/fields\/wrenfold$/);
  });

  it("has lists that start their first action", async () => {
    await page.goto("/people");
    await page.getByText("You are the only one here").waitFor();
    await page.goto("/review");
    await page.getByText("Nothing waits for a decision").waitFor();
    await page.goto("/prices");
    await page.getByText("There is no price deck yet").waitFor();
  });

  it("cannot be set up a second time", async () => {
    const visitor = await browser.newPage({ baseURL: product.baseUrl });
    await visitor.goto("/setup");
    await visitor.waitForURL(/\/sign-in/);
    expect(await visitor.getByText("This installation shows the demo").count()).toBe(0);
    const body = { name: "Second", email: "second@quillmere.example", password: "a-long-secret-2" };
    const answer = await fetch(`${product.baseUrl}/api/v1/setup`, {
      method: "POST",
      headers: { "content-type": "application/json", origin: product.baseUrl },
      body: JSON.stringify(body),
    });
    expect(answer.status).toBe(409);
  });
});
