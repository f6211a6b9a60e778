import type { Browser, Page } from "playwright-core";
import { afterAll, beforeAll, describe, expect, it } from "vitest";
import { axeViolations, launchBrowser, openPage } from "../support/browser";
import { goodRow, sheet } from "../support/import-sheet";

let browser: Browser;
const run = Date.now().toString(36);
const field = `Brought in ${run}`;
const rows = [
  goodRow({ basin: `Basin ${run}`, field }),
  goodRow({ basin: `Basin ${run}`, field, reservoir: "Per cent", porosity_low: "15" }),
  goodRow({ basin: `Basin ${run}`, field, reservoir: "Comma", net_thickness_low: "86,5" }),
];
const file = { name: "round.csv", mimeType: "text/csv", buffer: Buffer.from(sheet(rows)) };

beforeAll(async () => {
  browser = await launchBrowser();
});

afterAll(async () => {
  await browser?.close();
});

async function chooseFile(page: Page): Promise<void> {
  await page.goto("/import");
  await page.getByRole("button", { name: "Choose a file" }).waitFor();
  await page.getByLabel("CSV file of reservoirs").setInputFiles(file);
  await page.waitForURL(/\/import\/[0-9a-f-]{36}/);
}

const heading = (page: Page, name: string | RegExp) =>
  page.getByRole("heading", { level: 1, name }).waitFor({ timeout: 60_000 });

describe("an engineer brings a sheet in", () => {
  it("sees what is wrong, takes the good row, sees its results, and changes nothing the second time", async () => {
    const { page, context, problems } = await openPage(browser, { as: "engineer" });

    await chooseFile(page);
    await heading(page, "2 of 3 rows need repair");
    const table = page.getByRole("table", { name: "Rows of the sheet" });
    const comma = table.getByRole("row").filter({ hasText: "86,5" });
    await comma.getByText("net_thickness_low").waitFor();
    expect(await comma.textContent()).toContain("86.5");
    expect(await axeViolations(page)).toEqual([]);

    await page.getByRole("button", { name: "Take 1 row without the refused" }).click();
    await heading(page, "1 reservoir is in the book");
    expect(await axeViolations(page)).toEqual([]);
    await table.getByRole("link", { name: "Main sand" }).click();
    await heading(page, /Main sand/);

    await chooseFile(page);
    await page.getByText("This very file was taken into the book before").waitFor();
    await table.getByText("unchanged").first().waitFor();
    expect(await page.getByRole("button", { name: /^Take/ }).count()).toBe(0);

    expect(problems).toEqual([]);
    await context.close();
  });

  it("can paste cells, and hears what makes a sheet unreadable", async () => {
    const { page, context } = await openPage(browser, {
      as: "engineer",
      width: 390,
      theme: "dark",
    });
    await page.goto("/import");
    await page.getByRole("button", { name: "Paste cells instead" }).click();
    await page
      .getByLabel("Cells, with the header and the units row")
      .fill("basin\tfield\treservor");
    expect(await axeViolations(page)).toEqual([]);
    await page.getByRole("button", { name: "Check these cells" }).click();
    await heading(page, "This file cannot be read");
    await page.getByText("Did you mean reservoir?").waitFor();
    const overflow = await page.evaluate(
      () => document.documentElement.scrollWidth - document.documentElement.clientWidth,
    );
    expect(overflow).toBe(0);
    await context.close();
  });
});

describe("a reviewer", () => {
  it("reads what was brought in and is offered no file to choose", async () => {
    const { page, context } = await openPage(browser, { as: "reviewer" });
    await page.goto("/import");
    await page.getByRole("heading", { name: "Earlier imports" }).waitFor();
    expect(await page.getByRole("button", { name: "Choose a file" }).count()).toBe(0);
    await context.close();
  });
});

describe("the API guide", () => {
  it("makes a token that works as it says, shows it once, and revokes it", async () => {
    const { page, context, problems } = await openPage(browser, { as: "planner" });
    await page.goto("/api-guide");
    await page.getByLabel("Name of the script or machine").fill(`Budget ${run}`);
    await page.getByRole("button", { name: "Make a token" }).click();
    const token = await page.locator("code").textContent();
    expect(token).toMatch(/^dwl_/);
    const ask = () =>
      fetch(new URL("/api/v1/session", page.url()), {
        headers: { authorization: `Bearer ${token}` },
      });
    expect((await ask()).status).toBe(200);
    expect(await axeViolations(page)).toEqual([]);

    await page.reload();
    await page.getByRole("button", { name: `Revoke Budget ${run}` }).click();
    expect(await page.locator("code").count()).toBe(0);
    await page.getByRole("dialog").getByRole("button", { name: "Revoke" }).click();
    // The page behind an open dialog is hidden from roles, so the dialog has to be gone first.
    await page.getByRole("dialog").waitFor({ state: "detached" });
    await page.getByRole("button", { name: `Revoke Budget ${run}` }).waitFor({ state: "detached" });
    expect((await ask()).status).toBe(401);
    expect(problems).toEqual([]);
    await context.close();
  });
});
