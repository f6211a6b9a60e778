import { spawn } from "node:child_process";
import fs from "node:fs";

/** Programs that run at this moment, so that a signal to us reaches them too. */
const running = new Set();

/** End every program that `run` waits for. */
export function stopRunning() {
  for (const child of running) child.kill("SIGTERM");
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
 * @param {AbortSignal} [options.signal] ends the program when aborted
 * @returns {Promise<{ code: number, output: string, stdout: string }>} code 127: no such program
 */
export function run(command, args, { cwd, env, onLine, inherit = false, signal } = {}) {
  return new Promise((resolve, reject) => {
    const child = spawn(command, args, {
      cwd,
      env: env ?? process.env,
      stdio: inherit ? ["ignore", "inherit", "inherit"] : ["ignore", "pipe", "pipe"],
      signal,
    });
    running.add(child);
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
