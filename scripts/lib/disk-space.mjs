import fs from "node:fs/promises";
import path from "node:path";
import { Failure } from "./failure.mjs";

/**
 * Stop before a step that would fill the disk half-way.
 *
 * @param {string} directory where the step writes; it need not exist yet
 * @param {number} megabytes what the step needs [MB]
 * @param {string} purpose as in "the packages"
 */
export async function requireSpace(directory, megabytes, purpose) {
  const free = await freeMegabytes(directory);
  if (free === null || free >= megabytes) return;
  throw new Failure(
    `The disk that holds ${directory} has ${Math.floor(free)} MB free; about ${megabytes} MB are needed for ${purpose}.`,
    "Free some space and run the same command again. Nothing was changed.",
  );
}

/** The space left where a file would be written [MB], or null when the system does not say. */
export async function freeMegabytes(directory) {
  for (let at = path.resolve(directory); ; at = path.dirname(at)) {
    try {
      const { bavail, bsize } = await fs.statfs(at);
      return (bavail * bsize) / 1e6;
    } catch (error) {
      if (error.code !== "ENOENT") return null;
      if (at === path.dirname(at)) return null;
    }
  }
}
