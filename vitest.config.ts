import path from "node:path";
import { defineConfig } from "vitest/config";

const alias = {
  "@": path.resolve(import.meta.dirname),
  // Outside Next there is no client bundle to protect, so the guard module is empty.
  "server-only": path.resolve(import.meta.dirname, "tests/support/server-only.ts"),
};

export default defineConfig({
  test: {
    reporters: ["default", "./tests/support/summary-reporter.ts"],
    projects: [
      {
        resolve: { alias },
        test: {
          name: "unit",
          setupFiles: ["tests/support/property-seed.ts"],
          include: ["tests/{analytics,components,policy,scripts}/**/*.test.{ts,tsx}"],
          environment: "node",
          // Pure functions: loading everything anew for each file took longer than the tests.
          isolate: false,
        },
      },
      {
        resolve: { alias },
        test: {
          name: "services",
          setupFiles: ["tests/support/property-seed.ts"],
          include: ["tests/services/**/*.test.ts"],
          environment: "node",
        },
      },
      {
        resolve: { alias },
        test: {
          name: "api",
          include: ["tests/api/**/*.test.ts"],
          environment: "node",
          fileParallelism: false,
          testTimeout: 30_000,
          hookTimeout: 120_000,
        },
      },
      {
        resolve: { alias },
        test: {
          name: "e2e",
          include: ["tests/e2e/**/*.test.ts"],
          environment: "node",
          fileParallelism: false,
          testTimeout: 120_000,
          hookTimeout: 300_000,
        },
      },
    ],
  },
});
