import fs from "node:fs";
import { setTimeout as sleep } from "node:timers/promises";
import { Failure } from "./failure.mjs";
import { readJsonIfAny } from "./paths.mjs";
import { identify, isSameProcess } from "./process-identity.mjs";

/**
 * Run `work` while holding a lock file, so that two commands of one clone do not create the same
 * database or build at once. A lock whose holder no longer runs is taken over.
 *
 * @template T
 * @param {string} file
 * @param {string} what for the message when the wait is too long
 * @param {() => Promise<T>} work
 * @param {number} [patience] how long to wait [ms]
 * @returns {Promise<T>}
 */
export async function withLock(file, what, work, patience = 600_000) {
  const deadline = Date.now() + patience;
  while (!tryLock(file)) {
    if (Date.now() > deadline) {
      throw new Failure(
        `${what} is held by another command that runs from this folder.`,
        `Wait for it to end. If none runs, delete ${file} and try again.`,
      );
    }
    await sleep(200);
  }
  try {
    return await work();
  } finally {
    fs.rmSync(file, { force: true });
  }
}

function tryLock(file) {
  // Linking a complete file into place is atomic: nobody ever reads a lock without its holder.
  const mine = `${file}.${process.pid}`;
  fs.writeFileSync(mine, JSON.stringify(identify(process.pid)), { mode: 0o600 });
  try {
    fs.linkSync(mine, file);
    return true;
  } catch (error) {
    if (error.code !== "EEXIST") throw error;
    if (!isSameProcess(readJsonIfAny(file))) fs.rmSync(file, { force: true });
    return false;
  } finally {
    fs.rmSync(mine, { force: true });
  }
}
