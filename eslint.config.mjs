import { defineConfig, globalIgnores } from "eslint/config";
import nextVitals from "eslint-config-next/core-web-vitals";
import nextTs from "eslint-config-next/typescript";

/** Imports point one way: app -> components | services -> models, analytics (DEVELOPERS.md). */
const forbid = (files, patterns) => ({
  files,
  rules: { "no-restricted-imports": ["error", { patterns }] },
});

const ours = (names, message) => ({
  group: names.flatMap((name) => [`@/${name}`, `@/${name}/**`, `**/../${name}/**`]),
  message,
});

const oursExceptTypes = (names, message) => ({ ...ours(names, message), allowTypeImports: true });

export default defineConfig([
  ...nextVitals,
  ...nextTs,
  {
    rules: {
      "@typescript-eslint/no-explicit-any": "error",
      "@typescript-eslint/no-unused-vars": ["error", { argsIgnorePattern: "^_" }],
    },
  },
  forbid(
    ["analytics/**/*.ts"],
    [ours(["app", "components", "services", "models", "seeders", "scripts"], "analytics is pure.")],
  ),
  forbid(
    ["models/**/*.ts"],
    [ours(["app", "components", "services", "seeders", "scripts"], "models stand alone.")],
  ),
  forbid(
    ["services/**/*.ts"],
    [ours(["components", "seeders", "scripts"], "services know nothing of screens.")],
  ),
  {
    files: ["components/**/*.{ts,tsx}"],
    rules: {
      "@typescript-eslint/no-restricted-imports": [
        "error",
        {
          patterns: [
            oursExceptTypes(
              ["models", "services"],
              "components fetch through /api/v1, never models or services.",
            ),
          ],
        },
      ],
    },
  },
  globalIgnores([".next/**", "dist/**", "next-env.d.ts", ".data/**", "coverage/**"]),
]);
