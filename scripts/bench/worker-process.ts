import { spawn } from "node:child_process";
import { once } from "node:events";
import { openSync } from "node:fs";
import process from "node:process";

export interface WorkerProcess {
  /** as it calls itself in runs */
  name: string;
  /** without a word of warning, as by a power cut */
  kill: () => Promise<void>;
  /** as by an operator */
  stop: () => Promise<void>;
  hasEnded: () => boolean;
}

/** Start the worker as the product does, from its sources, and wait until it takes work. */
export async function startWorker(env: NodeJS.ProcessEnv, logFile: string): Promise<WorkerProcess> {
  const args = ["--conditions=react-server", "--import", "tsx", "scripts/worker.ts"];
  const log = openSync(logFile, "a");
  const child = spawn(process.execPath, args, { env, stdio: ["ignore", log, log, "ipc"] });
  const ended = once(child, "exit");
  const [name] = await Promise.race([
    once(child, "message") as Promise<[string]>,
    ended.then(([code]) => {
      throw new Error(`the worker ended with ${code}; see ${logFile}`);
    }),
  ]);
  const end = async (signal: NodeJS.Signals) => {
    if (child.exitCode !== null || child.signalCode !== null) return;
    child.kill(signal);
    await ended;
  };
  return {
    name,
    kill: () => end("SIGKILL"),
    stop: () => end("SIGTERM"),
    hasEnded: () => child.exitCode !== null || child.signalCode !== null,
  };
}
