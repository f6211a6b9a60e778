import fs from "node:fs";
import path from "node:path";
import { task } from "./console-output.mjs";
import { contentHash } from "./content-hash.mjs";
import { requireSpace } from "./disk-space.mjs";
import { Failure, failureFromOutput } from "./failure.mjs";
import { readTextIfAny, root, writeFileAtomically } from "./paths.mjs";
import { run } from "./run.mjs";

const STAMP = path.join(root, "node_modules", ".dewledger-lock");

/**
 * Install the packages when the lockfile changed since they were installed. The stamp lies inside
 * node_modules and is written last, so a removed folder or an interrupted install counts as none.
 *
 * @returns {Promise<boolean>} whether anything was installed
 */
export async function installDependencies() {
  const wanted = contentHash(root, ["package-lock.json"], [process.versions.modules]);
  if (readTextIfAny(STAMP) === wanted) return false;
  if (npmAlreadyDidIt()) {
    writeFileAtomically(STAMP, wanted, 0o644);
    return false;
  }
  await requireSpace(root, 1500, "the packages");
  await task("Installing packages (about a minute, once)", async (note) => {
    fs.rmSync(STAMP, { force: true });
    // Production would leave out what builds and tests the product.
    const env = { ...process.env, NODE_ENV: "development" };
    const args = ["ci", "--no-audit", "--no-fund", "--loglevel=http"];
    let fetched = 0;
    const onLine = (line) => {
      if (!/^npm http fetch GET 200 .*\.tgz/.test(line)) return;
      fetched += 1;
      note(`${fetched} packages fetched`);
    };
    const { code, output } = await run("npm", args, { cwd: root, env, onLine });
    if (code === 127) {
      throw new Failure("npm was not found on PATH.", "Install npm, which comes with Node.");
    }
    if (code !== 0) {
      throw failureFromOutput(
        "Installing packages",
        output
          .split("\n")
          .filter((line) => !line.startsWith("npm http"))
          .join("\n"),
        "Check the connection to the package registry (npm config get registry), then run the\n" +
          "same command again.",
      );
    }
    writeFileAtomically(STAMP, wanted, 0o644);
  });
  return true;
}

/**
 * Whether a person has run `npm ci` or `npm install` since the lockfile last changed. npm writes
 * its hidden lockfile after a complete install only.
 */
function npmAlreadyDidIt() {
  if (fs.existsSync(STAMP)) return false;
  const installed = fs.statSync(path.join(root, "node_modules", ".package-lock.json"), {
    throwIfNoEntry: false,
  });
  const lock = fs.statSync(path.join(root, "package-lock.json"));
  return installed !== undefined && installed.mtimeMs >= lock.mtimeMs;
}
