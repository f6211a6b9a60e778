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
const MOST_LAST_WORDS = 100_000;

/** @typedef {{ pid: number, startTime: string | null }} ProcessRecord */
/** @typedef {{ command: string, address: string, supervisor: ProcessRecord,
 *   ownsCluster: boolean, children: (ProcessRecord & { name: string })[] }} RunRecord */

export class ProcessGroup {
  #recordFile;
  #logFolder;
  #children = [];
  #stop = new AbortController();
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

  /** Aborted as soon as the group stops: from then on nothing is started any more. */
  get stopped() {
    return this.#stop.signal;
  }

  /** Where a process of this group writes what it prints. */
  logFile(name) {
    return `${this.#logFolder}/${name}.log`;
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
   * @param {(name: string, end: { how: string, said: string }) => void} options.onUnexpectedEnd
   *   how: its exit code or signal in words; said: its last words
   * @returns {{ ready: Promise<void> }} ready: it said so over its channel
   */
  start(name, args, { env, show = false, onUnexpectedEnd }) {
    const logFile = this.logFile(name);
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
    const ready = new Promise((resolve, reject) => {
      // Node's own messages, when it watches files, come over the same channel as objects.
      child.on("message", (message) => {
        if (typeof message === "string") resolve();
      });
      const ended = (how) => {
        this.#forgetChild(child);
        const said = wordsSince(logFile, began);
        reject(failureFromOutput(`The ${name} process`, said, `Its log is ${logFile}.`));
        if (!this.stopped.aborted) onUnexpectedEnd(name, { how, said });
      };
      child.once("exit", (code, signal) => {
        // A process that it started goes with it.
        signalGroup(child.pid, "SIGTERM");
        ended(signal === null ? `exit code ${code}` : `killed by ${signal}`);
      });
      child.once("error", (error) => {
        if (child.pid === undefined) ended(error.message);
      });
    });
    // Whoever waits sees the failure; a process that nobody waits for reports through the callback.
    ready.catch(() => undefined);
    if (child.pid !== undefined) this.#rememberChild(name, child);
    return { ready };
  }

  /** Stop every process, last started first. */
  async stop() {
    this.#stop.abort();
    for (const { child } of [...this.#children].reverse()) {
      if (child.exitCode === null && child.signalCode === null) await stopGroup(child.pid);
    }
  }

  /** Remove the record, when nothing of this run is left. */
  forget() {
    observeRuns(() => undefined);
    if (this.#recordFile !== null) fs.rmSync(this.#recordFile, { force: true });
    // News of an end that comes late does not bring it back.
    this.#recordFile = null;
  }

  #rememberChild(name, child) {
    this.#children.push({ name, child });
    this.#record.children.push({ name, ...identify(child.pid) });
    try {
      this.#write();
    } catch (error) {
      // Nothing runs that the next command could not find.
      child.removeAllListeners("exit");
      signalGroup(child.pid, "SIGKILL");
      this.#forgetChild(child);
      throw error;
    }
  }

  #forgetChild(child) {
    this.#children = this.#children.filter((other) => other.child !== child);
    this.#record.children = this.#record.children.filter(({ pid }) => pid !== child.pid);
    try {
      this.#write();
    } catch {
      // On a full disk the record still names it, but a process that is gone is never mistaken.
    }
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

/** The end of what a log file has gained since it was `began` bytes long. */
function wordsSince(file, began) {
  try {
    const log = fs.openSync(file, "r");
    try {
      const { size } = fs.fstatSync(log);
      const from = Math.max(began, size - MOST_LAST_WORDS);
      const words = Buffer.alloc(Math.max(0, size - from));
      fs.readSync(log, words, 0, words.length, from);
      return words.toString("utf8");
    } finally {
      fs.closeSync(log);
    }
  } catch {
    return "";
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
