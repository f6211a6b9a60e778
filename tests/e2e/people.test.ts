import type { Browser, Page } from "playwright-core";
import { afterAll, beforeAll, describe, expect, it } from "vitest";
import { uniqueName } from "../factories";
import { signInWith } from "../support/api";
import { launchBrowser, openPage } from "../support/browser";

let browser: Browser;

beforeAll(async () => {
  browser = await launchBrowser();
});

afterAll(async () => {
  await browser.close();
});

interface Added {
  name: string;
  email: string;
  password: string;
}

/** Adds a person on the page, in the role that the form offers first, and reads the password that is shown once. */
async function addPerson(page: Page): Promise<Added> {
  const name = uniqueName("Person");
  const email = `${name.toLowerCase().replace(" ", ".")}@quillmere.example`;
  await page.goto("/people");
  await page.getByRole("button", { name: "Add a person" }).first().click();
  await page.getByLabel("Name", { exact: true }).fill(name);
  await page.getByLabel("Work e-mail").fill(email);
  await page.getByRole("button", { name: "Add them" }).click();
  await page.getByRole("heading", { name: `${name} can sign in` }).waitFor();
  const password = (await page.locator(".secret code").textContent()) ?? "";
  await page.getByRole("button", { name: "Done" }).click();
  return { name, email, password };
}

async function choose(page: Page, name: string, entry: string): Promise<void> {
  await page.getByRole("button", { name: `Change ${name}` }).click();
  await page.getByRole("menuitem", { name: entry }).click();
}

/** A page of the person's own, beside the administrator's. */
async function openAs({ email, password }: Added): Promise<Page> {
  const { page, context } = await openPage(browser);
  await context.addCookies((await signInWith(email, password)).cookies());
  return page;
}

describe("the people page", () => {
  it("adds a person whose password, shown once, opens the book", async () => {
    const { page, problems } = await openPage(browser, { as: "administrator" });
    const added = await addPerson(page);
    expect(added.password).toMatch(/^\w{4}(-\w{4}){3}$/);
    const theirs = await openAs(added);
    await theirs.goto("/profile");
    await theirs.getByRole("heading", { name: added.name }).waitFor();
    expect(problems).toEqual([]);
  });

  it("changes a role, which counts from the person's next click", async () => {
    const { page } = await openPage(browser, { as: "administrator" });
    const added = await addPerson(page);
    const theirs = await openAs(added);
    await theirs.goto("/prices");
    await theirs.getByText("Every version").waitFor();
    expect(await theirs.getByRole("button", { name: "New version" }).count()).toBe(0);

    await choose(page, added.name, "Name and role");
    await page.getByRole("button", { name: "Role Engineer" }).click();
    await page.getByRole("option", { name: /Planner/ }).click();
    await page.getByRole("button", { name: "Save" }).click();
    await page.getByText(`${added.name} is planner.`).waitFor();

    await theirs.reload();
    await theirs.getByRole("button", { name: "New version" }).waitFor();
  });

  it("makes a person inactive, who is out with their next click and cannot come back", async () => {
    const { page } = await openPage(browser, { as: "administrator" });
    const added = await addPerson(page);
    const theirs = await openAs(added);
    await theirs.goto("/profile");
    await choose(page, added.name, "Make inactive");
    await page.getByRole("button", { name: "Make inactive" }).click();
    await page.getByText(`${added.name} is inactive.`).waitFor();

    await theirs.getByRole("link", { name: "Prices" }).click();
    await theirs.waitForURL(/\/sign-in/);
    await expect(signInWith(added.email, added.password)).rejects.toThrow("could not sign in");
  });

  it("keeps the last administrator in words", async () => {
    const { page } = await openPage(browser, { as: "administrator" });
    await page.goto("/people");
    await choose(page, "Joss Pemberlea", "Make inactive");
    await page.getByRole("button", { name: "Make inactive" }).click();
    await page.getByText("This is the last active administrator.").waitFor();
  });

  it("answers 403 to everybody else, and says whom to ask", async () => {
    for (const as of ["engineer", "executive"] as const) {
      for (const path of ["/people", "/audit"]) {
        const { page } = await openPage(browser, { as });
        expect((await page.goto(path))?.status()).toBe(403);
        await page.getByRole("heading", { name: "This page is not for your role" }).waitFor();
      }
    }
  });
});

describe("the audit page", () => {
  it("narrows to a kind of record, with the choice in its address", async () => {
    const { page, problems } = await openPage(browser, { as: "administrator" });
    await page.goto("/audit");
    await page.getByRole("button", { name: "What Everything" }).click();
    await page.getByRole("option", { name: "Price deck" }).click();
    await page.waitForURL(/\/audit\?entity=priceDeck$/);
    await page.getByRole("heading", { name: /fit this filter/ }).waitFor();
    const actions = await page.locator("tbody th").allTextContents();
    expect(actions.length).toBeGreaterThan(0);
    expect(actions.every((action) => action.startsWith("Price deck"))).toBe(true);
    expect(problems).toEqual([]);
  });
});
