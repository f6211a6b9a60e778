/**
 * Bundle the programs that run beside Next into dist/. Packages stay outside the bundle.
 *
 * `server-only` throws unless a React Server bundler resolved it. These programs are on the server
 * by nature, so here it is an empty module; vitest has the same alias, and tsx is given the
 * condition `react-server`, which picks the package's own empty module.
 */
import path from "node:path";
import { build } from "esbuild";
import { root } from "./lib/paths.mjs";

// esbuild prints its errors itself, with the line at fault.
await build({
  absWorkingDir: root,
  entryPoints: ["scripts/worker.ts", "scripts/local-services.ts"],
  outdir: "dist",
  outExtension: { ".js": ".mjs" },
  bundle: true,
  packages: "external",
  alias: { "server-only": path.join(root, "scripts", "lib", "empty.mjs") },
  platform: "node",
  format: "esm",
  target: "node20",
  sourcemap: true,
  logLevel: "error",
}).catch(() => process.exit(1));
