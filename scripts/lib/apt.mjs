import fs from "node:fs";
import { task } from "./console-output.mjs";
import { Failure, failureFromOutput } from "./failure.mjs";
import { findOnPath, isRoot, run } from "./run.mjs";

const QUIET = { DEBIAN_FRONTEND: "noninteractive", LC_ALL: "C.UTF-8" };

/**
 * The words to put before a command that needs root: none when we are root, `sudo -n` when sudo
 * works without asking, null when neither.
 */
export async function rootPrefix() {
  if (isRoot) return [];
  if (findOnPath("sudo") === null) return null;
  const { code } = await run("sudo", ["-n", "true"]);
  return code === 0 ? ["sudo", "-n"] : null;
}

/**
 * Install Debian packages.
 *
 * @param {string[]} packages
 * @param {object} options
 * @param {string} options.purpose as in "PostgreSQL's server"
 * @param {string} options.otherwise what else the person can do, one line
 * @param {(prefix: string[]) => Promise<void>} [options.before] runs as root before apt
 */
export async function aptInstall(packages, { purpose, otherwise, before }) {
  const command = `apt-get install -y --no-install-recommends ${packages.join(" ")}`;
  if (findOnPath("apt-get") === null) {
    throw new Failure(
      `${purpose} is not installed, and this machine has no apt to install it with.`,
      `Install it in your system's way, then run the same command again.\n${otherwise}`,
    );
  }
  const prefix = await rootPrefix();
  if (prefix === null) {
    throw new Failure(
      `${purpose} is not installed, and installing it needs root.`,
      `Run this once, then the same command again:\n\n  sudo ${command}\n\n${otherwise}`,
    );
  }
  await before?.(prefix);
  await task(`Installing ${purpose} with apt (${packages.join(", ")})`, async (note) => {
    const env = Object.entries(QUIET).map(([name, value]) => `${name}=${value}`);
    const apt = (args) => {
      const [program, ...rest] = [...prefix, "env", ...env, "apt-get", "-q", ...args];
      return run(program, rest, { onLine: note });
    };
    const install = ["install", "-y", "--no-install-recommends", ...packages];
    if ((await apt(install)).code === 0) return;
    // A fresh machine has no package lists, or old ones.
    await apt(["update"]);
    const { code, output } = await apt(install);
    if (code !== 0) {
      throw failureFromOutput(
        `Installing ${purpose}`,
        output,
        `Try it by hand:  ${prefix.join(" ")} ${command}`.replace(":   ", ":  ") + `\n${otherwise}`,
      );
    }
  });
}

/**
 * Keep Debian's package from creating and starting a cluster of its own: this project brings its
 * own, and nobody asked for a server on port 5432.
 */
export async function preventDefaultCluster(prefix) {
  const folder = "/etc/postgresql-common/createcluster.d";
  const file = `${folder}/90-no-main.conf`;
  if (fs.existsSync(file)) return;
  const script = `mkdir -p ${folder} && echo 'create_main_cluster = false' > ${file}`;
  const [program, ...rest] = [...prefix, "sh", "-c", script];
  await run(program, rest);
}
