import fs from "node:fs";
import os from "node:os";
import process from "node:process";

/**
 * When a process started, as the kernel counts it, together with the boot it belongs to; null when
 * there is no such process. A process id alone is not enough: after a crash the system may have
 * given it to somebody else, and start time tells the two apart.
 *
 * @param {number} pid
 * @returns {string | null}
 */
export function startTime(pid) {
  if (os.platform() !== "linux") return isAlive(pid) ? "unknown" : null;
  try {
    const stat = fs.readFileSync(`/proc/${pid}/stat`, "utf8");
    // The name in parentheses may hold spaces; fields are counted after it. Field 22 is starttime.
    const fields = stat.slice(stat.lastIndexOf(")") + 2).split(" ");
    if (fields[0] === "Z") return null;
    return `${bootId()}:${fields[19]}`;
  } catch {
    return null;
  }
}

function bootId() {
  try {
    return fs.readFileSync("/proc/sys/kernel/random/boot_id", "utf8").trim();
  } catch {
    return "";
  }
}

function isAlive(pid) {
  try {
    process.kill(pid, 0);
    return true;
  } catch (error) {
    return error.code === "EPERM";
  }
}

/** A record of a running process that can be checked later. */
export function identify(pid) {
  return { pid, startTime: startTime(pid) };
}

/** Whether the recorded process is still the one that runs under that id. */
export function isSameProcess(record) {
  if (record === null || typeof record !== "object") return false;
  const now = startTime(record.pid);
  return now !== null && now === record.startTime;
}
