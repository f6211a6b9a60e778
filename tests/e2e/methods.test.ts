import type { Browser } from "playwright-core";
import { afterAll, beforeAll, describe, expect, it } from "vitest";
import { launchBrowser, openPage } from "../support/browser";

let browser: Browser;
beforeAll(async () => {
  browser = await launchBrowser();
});
afterAll(async () => {
  await browser.close();
});

describe("the page of methods", () => {
  it("is one link away from any page, for every role", async () => {
    for (const as of ["executive", "administrator"] as const) {
      const { page, context, problems } = await openPage(browser, { as });
      await page.goto("/profile");
      await page.getByRole("link", { name: "Methods and sources" }).click();
      await page
        .getByRole("heading", { level: 1, name: "What every figure is worked out with" })
        .waitFor();
      await page.getByRole("heading", { name: "Peng–Robinson" }).waitFor();
      expect(problems).toEqual([]);
      await context.close();
    }
  });
});
