import { spawn } from "node:child_process";
import fs from "node:fs";

/** Programs that run at this moment, so that a signal to us reaches them too. */
const running = new Set();

/** Told of each program that starts or ends, so that it can be found after a kill -9. */
let observer = () => undefined;

/**
 * @param {(event: "started" | "ended", command: string, pid: number) => void} callback
 */
export function observeRuns(callback) {
  observer = callback;
}

/** End every program that `run` waits for, with what it has started. */
export function stopRunning() {
  for (const child of running) {
    try {
      process.kill(-child.pid, "SIGTERM");
    } catch {
      // It has just ended by itself.
    }
  }
}

/**
 * Run a program to its end and collect what it prints. Standard input is closed, so a program
 * that would ask a question fails instead of waiting for ever.
 *
 * @param {string} command
 * @param {string[]} args
 * @param {object} [options]
 * @param {string} [options.cwd]
 * @param {NodeJS.ProcessEnv} [options.env]
 * @param {(line: string) => void} [options.onLine] called with each line as it is printed
 * @param {boolean} [options.inherit] let it print straight to this terminal; nothing is collected
 * @returns {Promise<{ code: number, output: string, stdout: string }>} code 127: no such program
 */
export function run(command, args, { cwd, env, onLine, inherit = false } = {}) {
  return new Promise((resolve, reject) => {
    const child = spawn(command, args, {
      cwd,
      env: env ?? process.env,
      stdio: inherit ? ["ignore", "inherit", "inherit"] : ["ignore", "pipe", "pipe"],
      // A group of its own, so that it ends together with what it has started.
      detached: true,
    });
    running.add(child);
    if (child.pid !== undefined) observer("started", command, child.pid);
    let output = "";
    let stdout = "";
    const take = (chunk) => {
      output += chunk;
      if (onLine === undefined) return;
      for (const line of chunk.split(/[\r\n]+/)) if (line.trim() !== "") onLine(line);
    };
    child.stdout?.setEncoding("utf8").on("data", (chunk) => {
      stdout += chunk;
      take(chunk);
    });
    child.stderr?.setEncoding("utf8").on("data", take);
    child.on("error", (error) => {
      running.delete(child);
      if (error.code === "ENOENT") resolve({ code: 127, output: `${command}: not found`, stdout });
      else reject(error);
    });
    child.on("close", (code) => {
      running.delete(child);
      observer("ended", command, child.pid);
      resolve({ code: code ?? 128, output, stdout });
    });
  });
}

/** The full path of a program on PATH, or null. */
export function findOnPath(name, searchPath = process.env.PATH ?? "") {
  for (const directory of searchPath.split(":")) {
    if (directory === "") continue;
    const candidate = `${directory}/${name}`;
    try {
      fs.accessSync(candidate, fs.constants.X_OK);
      return candidate;
    } catch {
      // Not here; look in the next folder.
    }
  }
  return null;
}

export const isRoot = process.getuid?.() === 0;
