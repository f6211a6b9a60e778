import type { Browser, Page } from "playwright-core";
import { afterAll, beforeAll, describe, expect, it } from "vitest";
import type { EstimateView } from "@/app/api/v1/estimates/schema";
import {
  as,
  buildDraft,
  buildReservoir,
  estimateInputs,
  ifMatch,
  made,
  withConstant,
} from "../factories";
import { axeViolations, launchBrowser, openPage } from "../support/browser";

let browser: Browser;

beforeAll(async () => {
  browser = await launchBrowser();
});

afterAll(async () => {
  await browser?.close();
});

const addressOf = ({ place }: EstimateView) =>
  `/fields/${place.field.slug}/${place.reservoir.slug}`;

const field = (page: Page, label: string) => page.getByLabel(label, { exact: true });

/** The P50 of condensate to the tank in the live table. */
async function toTheTank(page: Page): Promise<string> {
  const row = page
    .getByRole("table", { name: "Results" })
    .getByRole("row", { name: /To the tank/ });
  return (await row.getByRole("cell").nth(1).textContent()) ?? "";
}

async function shape(page: Page, input: string, name: string) {
  await page.getByRole("button", { name: new RegExp(`^Shape of ${input}:`) }).click();
  await page.getByRole("menuitem", { name: new RegExp(`^${name}`) }).waitFor();
  // By its first letters, as from a keyboard: the menu moves while the rows above it find their height.
  await page.keyboard.type(name);
  await page.keyboard.press("Enter");
}

async function choose(page: Page, option: RegExp) {
  await page.getByRole("button", { name: /^Which case is true is decided/ }).click();
  await page.getByRole("option", { name: option }).click();
}

const saved = (page: Page) => page.getByText("Saved", { exact: true }).waitFor();

describe("the inputs of a draft", () => {
  it("move the results soon after a range is typed, read arithmetic, and save themselves", async () => {
    const draft = await buildDraft();
    const { page, context, problems } = await openPage(browser, { as: "engineer" });
    await page.goto(addressOf(draft));
    await page.getByRole("table", { name: "Results" }).waitFor();
    const before = await toTheTank(page);

    const answered = page.waitForResponse((response) =>
      response.url().endsWith("/api/v1/calculations/simulation"),
    );
    const typedAt = Date.now();
    await field(page, "Area, P10").fill("20*640");
    await page.getByText("= 12,800 acre").waitFor();
    expect((await answered).status()).toBe(200);
    await expect.poll(() => toTheTank(page)).not.toBe(before);
    // A second is the aim; the rest is room for a machine that runs the whole suite.
    expect(Date.now() - typedAt).toBeLessThan(5_000);

    await saved(page);
    await page.reload();
    await field(page, "Area, P10").waitFor();
    expect(await field(page, "Area, P10").inputValue()).toBe("12,800");
    expect(problems).toEqual([]);
    await context.close();
  });

  it("refuse what cannot be, beside the field and in words, and keep it through a reload", async () => {
    const draft = await buildDraft();
    const { page, context, problems } = await openPage(browser, { as: "engineer" });
    await page.goto(addressOf(draft));
    await field(page, "Porosity, P10").fill("0.05");
    await page.getByText(/P10 \(the high case\), 0.05, must be greater/).waitFor();
    expect(await field(page, "Porosity, P10").getAttribute("aria-invalid")).toBe("true");
    await page.getByText("Kept in this browser until it can be saved").waitFor();

    await page.waitForTimeout(500);
    page.on("dialog", (dialog) => void dialog.accept());
    await page.reload();
    await page.getByText(/was kept in this browser and is back/).waitFor();
    expect(await field(page, "Porosity, P10").inputValue()).toBe("0.05");
    await page.getByRole("button", { name: "Drop it" }).click();
    expect(await field(page, "Porosity, P10").inputValue()).toBe("0.16");
    expect(problems).toEqual([]);
    await context.close();
  });

  it("ask whether a figure out of line is in metres, and take it in feet", async () => {
    const draft = await buildDraft();
    const { page, context } = await openPage(browser, { as: "engineer" });
    await page.goto(addressOf(draft));
    await field(page, "Net thickness, Lowest").fill("9");
    await page.getByText("Is 9 in metres?").waitFor();
    await page.getByRole("button", { name: "Use 29.5 ft" }).click();
    expect(await field(page, "Net thickness, Lowest").inputValue()).toBe("29.5");
    await context.close();
  });

  it("take percentiles, pasted values, a case that two inputs share, and correlations that can be", async () => {
    const draft = await buildDraft();
    const { page, context, problems } = await openPage(browser, { as: "engineer" });
    await page.goto(addressOf(draft));
    await shape(page, "Porosity", "Percentiles");
    await field(page, "Porosity, percentile 2, value").fill("0.15");
    await page.getByText(/curve misses P50 by/).waitFor();
    await shape(page, "Water saturation", "Pasted data");
    await page.getByLabel(/^Values/).fill("Sw\n0.21\n0.24\n0.19\n0.31\n0.27");
    await page.getByText("Cell 1, “Sw” is no number and is left out.").waitFor();

    await shape(page, "Area", "Cases");
    await field(page, "Area, case Low, chance").fill("20");
    await page.getByText("The chances add up to 90.00 %, not 100 %.").waitFor();
    await page.getByRole("button", { name: "Scale to 100 %" }).click();
    await choose(page, /that you name$/);
    await field(page, "Name of the set of cases of Area").fill("Gas-water contact");
    await page.getByRole("button", { name: "Close the cases of Area" }).click();
    await shape(page, "Net thickness", "Cases");
    await choose(page, /^once for “Gas-water contact”/);
    await page.getByText("Takes the same case as area in every trial.").waitFor();

    await field(page, "Porosity with Gas recovery").fill("0.9");
    await field(page, "Gas recovery with Condensate recovery").fill("0.9");
    await field(page, "Porosity with Condensate recovery").fill("-0.9");
    await page.getByRole("heading", { name: "These correlations cannot all hold" }).waitFor();
    await page.getByRole("button", { name: "Nearest possible matrix" }).click();
    await page.getByRole("button", { name: "Take these correlations" }).click();
    await page.getByText("These correlations are possible together.").waitFor();
    expect(await axeViolations(page)).toEqual([]);
    await saved(page);

    const { inputs } = made(
      await (await as("engineer")).get<EstimateView>(`/api/v1/estimates/${draft.id}`),
    );
    expect(inputs.uncertain.netThicknessFt.distribution).toMatchObject({
      kind: "scenarios",
      caseSet: "Gas-water contact",
    });
    expect(inputs.uncertain.waterSaturation.distribution).toMatchObject({ kind: "data" });
    expect(problems).toEqual([]);
    await context.close();
  });

  it("show both versions when somebody else saved first, and lose neither", async () => {
    const draft = await buildDraft();
    const { page, context } = await openPage(browser, { as: "engineer" });
    await page.goto(addressOf(draft));
    await field(page, "Water saturation, Most likely").waitFor();

    const colleague = await as("engineer");
    const inputs = withConstant(estimateInputs(), "temperatureDegF", 251);
    made(await colleague.patch(`/api/v1/estimates/${draft.id}`, { inputs }, ifMatch(draft)));
    await field(page, "Water saturation, Most likely").fill("0.27");

    const dialog = page.getByRole("dialog", { name: "Somebody else saved this draft first" });
    await dialog.getByRole("table").waitFor();
    const temperature = dialog.getByRole("row", { name: /^Temperature/ });
    expect(await temperature.textContent()).toContain("251");
    await temperature.getByRole("radio", { name: "Theirs" }).click();
    await dialog.getByRole("button", { name: "Go on as chosen" }).click();
    await saved(page);

    const path = `/api/v1/estimates/${draft.id}`;
    const { uncertain } = made(await colleague.get<EstimateView>(path)).inputs;
    expect(uncertain.temperatureDegF.distribution).toEqual({ kind: "constant", value: 251 });
    expect(uncertain.waterSaturation.distribution).toMatchObject({ mode: 0.27 });
    await context.close();
  });
});

describe("the recoveries of a draft", () => {
  it("are worked out by a concept of the fluid, typed on, marked, and taken back by hand", async () => {
    const draft = await buildDraft();
    const { page, context, problems } = await openPage(browser, { as: "engineer" });
    await page.goto(`${addressOf(draft)}/fluid`);
    // No composition: the correlation screens the fluid, and every figure of it is marked.
    await page
      .getByRole("heading", { name: /^By correlation, cycling brings .* more to the tank/ })
      .waitFor();
    await page.getByRole("button", { name: "Use in the draft: depletion", exact: true }).click();
    const dialog = page.getByRole("dialog");
    await dialog.getByText("Recovery from a correlation").waitFor();
    await dialog.getByRole("button", { name: "Use this concept" }).click();

    await page.getByText("Recoveries are worked out: depletion").waitFor();
    await saved(page);
    const patched = () =>
      page.waitForResponse((response) => response.request().method() === "PATCH");
    const typed = patched();
    await field(page, "Abandonment pressure, Most likely").fill("70 bar");
    await page.getByText("= 1,015 psia").waitFor();
    expect(await field(page, "Gas recovery, Most likely").count()).toBe(0);
    await typed;
    await saved(page);
    const engineer = await as("engineer");
    const path = `/api/v1/estimates/${draft.id}`;
    const planned = made(await engineer.get<EstimateView>(path)).inputs;
    expect(planned.recoveryPlan).toMatchObject({
      concept: "depletion",
      curve: { route: "correlation" },
      abandonmentPressurePsia: { distribution: { kind: "pert" } },
    });

    await page.goto(`${addressOf(draft)}/compare`);
    await page.getByRole("heading", { name: "How recoveries come about" }).waitFor();
    expect(await axeViolations(page)).toEqual([]);

    await page.goto(addressOf(draft));
    const taken = patched();
    await page.getByRole("button", { name: "Enter recoveries by hand instead" }).click();
    expect(await field(page, "Gas recovery, Most likely").inputValue()).toBe("0.7");
    await taken;
    expect(made(await engineer.get<EstimateView>(path)).inputs.recoveryPlan).toBeNull();
    expect(problems).toEqual([]);
    await context.close();
  });
});

describe("an estimate on its way", () => {
  it("is submitted by an engineer, who is offered no decision, and approved by a reviewer", async () => {
    const draft = await buildDraft();
    const address = addressOf(draft);
    const engineer = await openPage(browser, { as: "engineer" });
    await engineer.page.goto(address);
    await engineer.page.getByRole("button", { name: "Submit for review" }).click();
    await engineer.page.getByLabel("What is new, and why").fill("First estimate, from two wells.");
    await engineer.page.getByRole("button", { name: "Submit", exact: true }).click();
    await engineer.page.getByText("r1 is with the reviewers").waitFor();
    expect(await engineer.page.getByRole("button", { name: /^Approve/ }).count()).toBe(0);

    const reviewer = await openPage(browser, { as: "reviewer" });
    await reviewer.page.goto(`${address}/compare`);
    await reviewer.page.getByText("First estimate, from two wells.").waitFor();
    await reviewer.page.getByRole("button", { name: "Return with note" }).click();
    await reviewer.page.getByText(/^Say what .* should change/).waitFor();
    await reviewer.page.getByRole("button", { name: "Approve r1" }).click();
    await reviewer.page.getByText("r1 is approved").waitFor();

    expect([...engineer.problems, ...reviewer.problems]).toEqual([]);
    await Promise.all([engineer.context.close(), reviewer.context.close()]);
  });

  it("begins with ranges and a separator test that nobody has proposed", async () => {
    const reservoir = await buildReservoir();
    const { page, context, problems } = await openPage(browser, { as: "engineer" });
    await page.goto(`/fields/${reservoir.field.slug}/${reservoir.slug}`);
    await page.getByRole("button", { name: "Begin the first estimate" }).first().click();
    await page.getByText("Ten of ten inputs to fill in").waitFor();
    expect(await field(page, "Area, P90").inputValue()).toBe("");
    await page.getByText("A fluid sample is needed before anything can be computed.").waitFor();

    await page.getByRole("link", { name: "Enter a separator test" }).click();
    await field(page, "First separator, pressure").fill("35 bar");
    await field(page, "First separator, temperature").fill("80");
    await field(page, "First separator, gas per barrel").fill("12,000");
    await field(page, "First separator, gas gravity").fill("0.68");
    await field(page, "Condensate gravity").fill("56");
    await page
      .getByRole("heading", { name: /^Surface gas is 9\d\.\d.% of the wellstream/ })
      .waitFor();
    await field(page, "First separator, gas gravity").fill("0.4");
    await page.getByText(/separator gas gravity cannot be 0.4/).waitFor();
    expect(problems.filter((problem) => !problem.includes("422"))).toEqual([]);
    await context.close();
  });
});

describe("a reservoir on a phone", () => {
  it("keeps the result at the foot", async () => {
    const draft = await buildDraft();
    const { page, context } = await openPage(browser, { as: "engineer", width: 360, height: 740 });
    await page.goto(addressOf(draft));
    await page.getByText("To the tank, live").waitFor();
    await context.close();
  });
});
