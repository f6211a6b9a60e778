import fs from "node:fs";
import path from "node:path";
import { aptInstall, preventDefaultCluster } from "./apt.mjs";
import { Failure } from "./failure.mjs";
import { run } from "./run.mjs";

const PROGRAMS = ["initdb", "pg_ctl", "postgres", "psql"];
const OLDEST = 13;

/**
 * Folders that hold a whole PostgreSQL server. PATH is followed through links, since a lone
 * `pg_ctl` there is of no use without the programs it lives beside.
 *
 * @param {object} [options]
 * @param {string} [options.searchPath] as PATH
 * @param {string} [options.debianRoot] where Debian keeps one folder per version
 * @returns {string[]} newest Debian version last resort, PATH first
 */
export function candidateFolders({
  searchPath = process.env.PATH ?? "",
  debianRoot = "/usr/lib/postgresql",
} = {}) {
  const fromPath = searchPath
    .split(":")
    .filter((directory) => directory !== "")
    .flatMap((directory) => {
      try {
        return [path.dirname(fs.realpathSync(path.join(directory, "pg_ctl")))];
      } catch {
        return [];
      }
    });
  let versions = [];
  try {
    versions = fs.readdirSync(debianRoot);
  } catch {
    // Debian's package is not installed.
  }
  const fromDebian = versions
    .filter((version) => /^\d+$/.test(version))
    .sort((a, b) => Number(b) - Number(a))
    .map((version) => path.join(debianRoot, version, "bin"));
  const complete = (folder) => PROGRAMS.every((name) => fs.existsSync(path.join(folder, name)));
  return [...new Set([...fromPath, ...fromDebian])].filter(complete);
}

/** The major version in "postgres (PostgreSQL) 15.18 (Debian …)", or null. */
export function majorVersion(text) {
  const match = /PostgreSQL\)\s+(\d+)/.exec(text);
  return match === null ? null : Number(match[1]);
}

/**
 * PostgreSQL's server programs: those of PATH, else Debian's, else installed now.
 *
 * @param {object} [options]
 * @param {number} [options.version] only this major version, because a cluster was made with it
 * @returns {Promise<{ folder: string, version: number }>}
 */
export async function findPostgres({ version } = {}) {
  const found = await search(version);
  if (found !== null) return found;
  if (version !== undefined) {
    throw new Failure(
      `The database of this folder was made with PostgreSQL ${version}, which is not installed here.`,
      `Install it (apt-get install postgresql-${version}) and run the same command again.`,
    );
  }
  await aptInstall(["postgresql"], {
    purpose: "PostgreSQL's server",
    otherwise: "Or point DATABASE_URL at a PostgreSQL database of your own (see .env.example).",
    before: preventDefaultCluster,
  });
  const installed = await search();
  if (installed === null) {
    throw new Failure(
      "PostgreSQL was installed, but its server programs were not found under /usr/lib/postgresql.",
      "Put the folder that holds initdb and pg_ctl on PATH, or set DATABASE_URL (see .env.example).",
    );
  }
  return installed;
}

async function search(wanted) {
  for (const folder of candidateFolders()) {
    const { code, stdout } = await run(path.join(folder, "postgres"), ["--version"]);
    const version = code === 0 ? majorVersion(stdout) : null;
    if (version === null || version < OLDEST) continue;
    if (wanted === undefined || version === wanted) return { folder, version };
  }
  return null;
}
