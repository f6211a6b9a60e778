import { spawn } from "node:child_process";
import fs from "node:fs";
import path from "node:path";
import process from "node:process";
import { setTimeout as sleep } from "node:timers/promises";
import { say } from "./console-output.mjs";
import { failureFromOutput } from "./failure.mjs";
import { dataPath, readJsonIfAny, root, writeFileAtomically } from "./paths.mjs";
import { identify, isSameProcess } from "./process-identity.mjs";
import { observeRuns } from "./run.mjs";

/**
 * The processes that one command started. Each runs in a process group of its own, so that Ctrl-C
 * reaches only this program and it decides the order in which they stop. They are recorded with
 * their start times: after a kill -9 the next command finds those that were left behind, and stops
 * a process only if it is still the very one that was recorded.
 */

const LARGEST_LOG = 10_000_000;

/** @typedef {{ pid: number, startTime: string | null }} ProcessRecord */
/** @typedef {{ command: string, address: string, supervisor: ProcessRecord,
 *   ownsCluster: boolean, children: (ProcessRecord & { name: string })[] }} RunRecord */

export class ProcessGroup {
  #recordFile;
  #logFolder;
  #children = [];
  #stopping = false;
  /** @type {RunRecord} */
  #record;

  /**
   * @param {object} options
   * @param {string | null} options.recordFile where the run is recorded; null keeps no record
   * @param {string} options.logFolder one log file per process
   * @param {string} options.command as in "npm start"
   * @param {string} options.address where the product will answer
   */
  constructor({ recordFile, logFolder, command, address }) {
    this.#recordFile = recordFile;
    this.#logFolder = logFolder;
    this.#record = {
      command,
      address,
      supervisor: identify(process.pid),
      ownsCluster: false,
      children: [],
    };
    fs.mkdirSync(logFolder, { recursive: true, mode: 0o700 });
    this.#write();
    observeRuns((event, program, pid) => {
      this.#record.children = this.#record.children.filter((child) => child.pid !== pid);
      if (event === "started") {
        this.#record.children.push({ name: path.basename(program), ...identify(pid) });
      }
      this.#write();
    });
  }

  /** Remember that this run started the database cluster, and so has to stop it. */
  ownCluster() {
    this.#record.ownsCluster = true;
    this.#write();
  }

  /**
   * Start a Node program and leave it running.
   *
   * @param {string} name its name in messages and its log file
   * @param {string[]} args what follows `node`
   * @param {object} options
   * @param {NodeJS.ProcessEnv} options.env
   * @param {boolean} [options.show] copy what it prints to this terminal too
   * @param {(name: string, lastWords: string) => void} options.onUnexpectedEnd
   * @returns {{ ready: Promise<void>, logFile: string }} ready: it said so over its channel
   */
  start(name, args, { env, show = false, onUnexpectedEnd }) {
    const logFile = `${this.#logFolder}/${name}.log`;
    keepSmall(logFile);
    const began = fs.statSync(logFile, { throwIfNoEntry: false })?.size ?? 0;
    const log = fs.openSync(logFile, "a", 0o600);
    const child = spawn(process.execPath, args, {
      cwd: root,
      env,
      detached: true,
      stdio: ["ignore", show ? "pipe" : log, show ? "pipe" : log, "ipc"],
    });
    if (show) {
      for (const stream of [child.stdout, child.stderr]) {
        stream.on("data", (chunk) => {
          fs.writeSync(log, chunk);
          process.stdout.write(chunk);
        });
      }
    } else {
      fs.closeSync(log);
    }
    this.#children.push({ name, child });
    this.#record.children.push({ name, ...identify(child.pid) });
    this.#write();
    const ready = new Promise((resolve, reject) => {
      child.once("message", resolve);
      child.once("exit", () => {
        const said = fs.readFileSync(logFile).subarray(began).toString("utf8");
        reject(failureFromOutput(`The ${name} process`, said, `Its log is ${logFile}.`));
        if (!this.#stopping) onUnexpectedEnd(name, said);
      });
    });
    // Whoever waits sees the failure; a process that nobody waits for reports through the callback.
    ready.catch(() => undefined);
    return { ready, logFile };
  }

  /** Stop every process, last started first. */
  async stop() {
    this.#stopping = true;
    for (const { child } of [...this.#children].reverse()) {
      if (child.exitCode === null && child.signalCode === null) await stopGroup(child.pid);
    }
  }

  /** Remove the record, when nothing of this run is left. */
  forget() {
    observeRuns(() => undefined);
    if (this.#recordFile !== null) fs.rmSync(this.#recordFile, { force: true });
  }

  #write() {
    if (this.#recordFile === null) return;
    writeFileAtomically(this.#recordFile, JSON.stringify(this.#record, null, 2));
  }
}

export const runRecordFile = () => dataPath("processes.json");

/**
 * The run that is recorded for this clone.
 *
 * @returns {{ state: "none" | "running" | "left-behind", record: RunRecord | null }}
 */
export function recordedRun(file = runRecordFile()) {
  const record = readJsonIfAny(file);
  if (record === null) return { state: "none", record: null };
  return { state: isSameProcess(record.supervisor) ? "running" : "left-behind", record };
}

/**
 * Stop what a run that was killed has left behind.
 *
 * @param {RunRecord} record
 * @returns {Promise<string[]>} the names of what was stopped
 */
export async function stopLeftBehind(record, file = runRecordFile()) {
  const left = record.children.filter((child) => isSameProcess(child));
  for (const { pid } of left) await stopGroup(pid);
  fs.rmSync(file, { force: true });
  return left.map(({ name }) => name);
}

/** Ask a process group to end, and end it when it does not within `patience` ms. */
async function stopGroup(pid, patience = 25_000) {
  const before = identify(pid);
  if (!signalGroup(pid, "SIGTERM")) return;
  const deadline = Date.now() + patience;
  while (isSameProcess(before) && Date.now() < deadline) await sleep(50);
  // What the process itself has left in its group goes too.
  signalGroup(pid, "SIGKILL");
}

function signalGroup(pid, signal) {
  try {
    process.kill(-pid, signal);
    return true;
  } catch {
    return false;
  }
}

function keepSmall(file) {
  const size = fs.statSync(file, { throwIfNoEntry: false })?.size ?? 0;
  if (size > LARGEST_LOG) fs.renameSync(file, `${file}.1`);
}

/**
 * Call `stop` once when the person or the system ends this program, then end it.
 *
 * @param {() => Promise<void>} stop
 */
export function stopOnSignal(stop) {
  let stopping = false;
  for (const signal of ["SIGINT", "SIGTERM", "SIGHUP"]) {
    process.on(signal, () => {
      if (stopping) return;
      stopping = true;
      say();
      say("Stopping …");
      stop().then(
        () => {
          say("Stopped");
          process.exit(0);
        },
        (error) => {
          console.error(error);
          process.exit(1);
        },
      );
    });
  }
}
