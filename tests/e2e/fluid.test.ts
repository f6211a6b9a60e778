import type { Browser, Page } from "playwright-core";
import { afterAll, beforeAll, describe, expect, it } from "vitest";
import type { EstimateView } from "@/app/api/v1/estimates/schema";
import { labSheetTemplate } from "@/services/lab-sheets/template";
import { buildDraft } from "../factories";
import { axeViolations, launchBrowser, openPage } from "../support/browser";

let browser: Browser;

beforeAll(async () => {
  browser = await launchBrowser();
});

afterAll(async () => {
  await browser?.close();
});

const addressOf = ({ place }: EstimateView) =>
  `/fields/${place.field.slug}/${place.reservoir.slug}/fluid`;

const field = (page: Page, label: string) => page.getByLabel(label, { exact: true });

const button = (page: Page, name: string) => page.getByRole("button", { name, exact: true });

/** The template with one figure that a laboratory misspelt; the step's pressure is its second. */
const study = () => {
  const text = labSheetTemplate();
  const methane = /^C1,([\d.]+)/m.exec(text)?.[1];
  if (!methane) throw new Error("the template has no methane");
  return { methane, text: text.replace(/^C1,[\d.]+/m, `C1,${methane}o`) };
};

describe("a fluid sample", () => {
  it("is read from a laboratory's file, put right, tuned, kept, and used in the draft", async () => {
    const draft = await buildDraft();
    const { page, context, problems } = await openPage(browser, { as: "engineer" });
    await page.goto(addressOf(draft));

    const { methane, text } = study();
    await page.locator('input[type="file"]').setInputFiles({
      name: "study.csv",
      mimeType: "text/csv",
      buffer: Buffer.from(text),
    });
    await page.getByText("One place was not read as it stands.").waitFor();
    await button(page, "Take it over").click();

    // The misspelt figure stands in its cell with the reason, and nothing that needs it is shown.
    expect(await field(page, "Methane").inputValue()).toBe(`${methane}o`);
    expect(await field(page, "Methane").getAttribute("aria-invalid")).toBe("true");
    expect(await page.getByText(/Appears when the composition is known/).count()).toBe(1);
    await field(page, "Methane").fill(methane);

    const slider = page.getByRole("slider", { name: "Abandonment pressure" });
    await slider.waitFor();
    await page.getByRole("heading", { name: /Liquid takes up to / }).waitFor();
    await page
      .getByRole("heading", { name: /Liquid starts to drop out|below the dew point/ })
      .waitFor();
    await page.getByText("Untuned", { exact: true }).first().waitFor();
    const before = Number(await slider.getAttribute("aria-valuenow"));
    await slider.focus();
    await page.keyboard.press("PageUp");
    expect(Number(await slider.getAttribute("aria-valuenow"))).toBe(before + 100);
    expect(await slider.getAttribute("aria-valuetext")).toMatch(
      /of the condensate reaches the tank/,
    );

    await button(page, "Tune to the laboratory’s table").click();
    await button(page, "Run").click();
    await page.getByRole("heading", { name: /Dropout misses the laboratory by/ }).waitFor();
    await button(page, "Take it over").click();
    await page.getByRole("heading", { name: "Peng–Robinson, tuned" }).waitFor();

    await field(page, "Name").fill("HD-9/01");
    await field(page, "Sampled on").fill("2026-11-02");
    // What is typed is still there after a look at another tab.
    await page.getByRole("link", { name: "Inputs", exact: true }).click();
    await page.getByRole("link", { name: /^Fluid sample/ }).click();
    expect(await field(page, "Name").inputValue()).toBe("HD-9/01");
    await button(page, "Save the sample").click();
    await page.getByText("Sample HD-9/01 is saved").waitFor();
    await page.getByRole("heading", { name: "Sample HD-9/01" }).waitFor();
    expect(await axeViolations(page)).toEqual([]);

    await button(page, "Use in the draft").first().click();
    await button(page, "Use it").click();
    await page.waitForURL((url) => !url.pathname.endsWith("/fluid"));
    await page.getByText("Saved", { exact: true }).waitFor();
    expect(problems).toEqual([]);
    await context.close();
  });

  it("is shown whole, without a field to type in, to those who only read", async () => {
    const draft = await buildDraft();
    const { page, context, problems } = await openPage(browser, { as: "executive", width: 390 });
    await page.goto(addressOf(draft));
    await page.getByText("Condensate yield", { exact: true }).waitFor();
    await page.getByRole("table", { name: "Separator test" }).waitFor();
    expect(await field(page, "First separator, pressure").count()).toBe(0);
    expect(await page.locator('input[type="file"], form').count()).toBe(0);
    expect(await page.evaluate(() => document.documentElement.scrollWidth - innerWidth)).toBe(0);
    expect(problems).toEqual([]);
    await context.close();
  });
});
