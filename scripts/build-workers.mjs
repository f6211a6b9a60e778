/** Bundle the calculation threads into dist/workers/. Packages stay outside the bundle. Takes well under a second. */
import path from "node:path";
import { fileURLToPath } from "node:url";
import { build } from "esbuild";

const root = path.resolve(path.dirname(fileURLToPath(import.meta.url)), "..");

await build({
  absWorkingDir: root,
  entryPoints: { compute: "services/compute/worker.ts" },
  outdir: "dist/workers",
  outExtension: { ".js": ".mjs" },
  bundle: true,
  packages: "external",
  platform: "node",
  format: "esm",
  target: "node20",
  sourcemap: true,
  logLevel: "error",
});
