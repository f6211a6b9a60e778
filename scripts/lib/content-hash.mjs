import { createHash } from "node:crypto";
import fs from "node:fs";
import path from "node:path";

/**
 * One hash of the names and contents of files and folders. Times are left out, so a fresh checkout
 * of the same sources has the same hash.
 *
 * @param {string} base paths are taken and hashed relative to it
 * @param {string[]} entries files and folders; missing ones count as missing
 * @param {string[]} [salt] anything else the result depends on
 */
export function contentHash(base, entries, salt = []) {
  const hash = createHash("sha256");
  for (const text of salt) hash.update(`${text}\0`);
  for (const entry of [...entries].sort()) {
    for (const file of listFiles(path.join(base, entry))) {
      const content = createHash("sha256").update(fs.readFileSync(file)).digest("hex");
      hash.update(`${path.relative(base, file)}\0${content}\0`);
    }
  }
  return hash.digest("hex");
}

function listFiles(entry) {
  const stat = fs.statSync(entry, { throwIfNoEntry: false });
  if (stat === undefined) return [];
  if (stat.isFile()) return [entry];
  return fs
    .readdirSync(entry)
    .sort()
    .flatMap((name) => listFiles(path.join(entry, name)));
}
