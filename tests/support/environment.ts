/**
 * What `npm test` has set up for the tests that need more than the code: the product on loopback,
 * built and started as in production, on a database of its own that holds the demo.
 */
function given(name: string): string {
  const value = process.env[name];
  if (value === undefined || value === "") {
    throw new Error(
      `${name} is not set. Run the test with: npm test -- <file>, which starts what it needs.`,
    );
  }
  return value;
}

export const testEnvironment = {
  /** The product's address, without a slash at the end. */
  get baseUrl(): string {
    return given("TEST_BASE_URL");
  },
  /** The database behind it, for setting up what the API cannot and for looking at what it wrote. */
  get databaseUrl(): string {
    return given("TEST_DATABASE_URL");
  },
  /** The mail stand-in's page; `/messages.json` lists what was sent. */
  get mailUrl(): string {
    return given("TEST_MAIL_URL");
  },
  /** The browser's program. */
  get chromium(): string {
    return given("TEST_CHROMIUM");
  },
};
