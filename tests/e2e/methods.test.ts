import type { Browser } from "playwright-core";
import { afterAll, beforeAll, describe, expect, it } from "vitest";
import { axeViolations, launchBrowser, openPage } from "../support/browser";

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

  it.each([
    ["light", 1440],
    ["dark", 390],
  ] as const)("passes axe and fits in %s at %i px", async (theme, width) => {
    const { page, context } = await openPage(browser, { as: "executive", theme, width });
    await page.goto("/methods");
    await page.getByRole("heading", { name: "z factor", exact: true }).waitFor();
    expect(await axeViolations(page)).toEqual([]);
    const overflow = await page.evaluate(
      () => document.documentElement.scrollWidth - window.innerWidth,
    );
    expect(overflow).toBeLessThanOrEqual(0);
    await context.close();
  });
});
