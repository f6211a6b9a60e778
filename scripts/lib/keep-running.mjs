import path from "node:path";
import { performance } from "node:perf_hooks";
import { setTimeout as sleep } from "node:timers/promises";
import { say } from "./console-output.mjs";
import { root } from "./paths.mjs";

/**
 * A process whose end is no reason for the rest to stop: it is started again, sooner at first and
 * at longer intervals when it keeps ending.
 */

/** How soon, and for how long, a process is started again. Durations in ms. */
const usualPace = {
  firstWait: 1_000,
  longestWait: 30_000,
  /** A process that lived this long was well: its next end counts as the first. */
  steadyAfter: 60_000,
  /** So many short lives in a row are said to be trouble; from then on only the longest wait. */
  troubleAfter: 5,
};

/**
 * How long to wait before a process is started again.
 *
 * @param {number} shortLives how many times in a row it has ended early, at least 1
 * @param {typeof usualPace} [pace]
 * @returns {number} ms: doubled each time, the longest from `troubleAfter` on
 */
export function waitBeforeRestart(shortLives, pace = usualPace) {
  if (shortLives >= pace.troubleAfter) return pace.longestWait;
  return Math.min(pace.firstWait * 2 ** (shortLives - 1), pace.longestWait);
}

/**
 * Start a worker and start it again whenever it ends, until its group stops. One that ends before
 * it was ever ready is not started again: then something is wrong with the installation.
 *
 * @param {import("./processes.mjs").ProcessGroup} group
 * @param {string} name its name in messages and its log file
 * @param {string[]} args what follows `node`
 * @param {object} options
 * @param {NodeJS.ProcessEnv} options.env
 * @param {(name: string) => void} options.onNeverReady it ended before it was ever ready
 * @param {(line: string) => void} [options.tell] takes what a person should read
 * @param {typeof usualPace} [options.pace]
 * @returns {{ ready: Promise<void> }} ready: it said so for the first time
 */
export function keepRunning(
  group,
  name,
  args,
  { env, onNeverReady, tell = say, pace = usualPace },
) {
  let shortLives = 0;
  let wasReady = false;

  function start() {
    const began = performance.now();
    const onUnexpectedEnd = (_name, { how }) => {
      if (!wasReady) onNeverReady(name);
      else ended(how, performance.now() - began);
    };
    const { ready } = group.start(name, args, { env, onUnexpectedEnd });
    ready.then(
      () => {
        if (wasReady) tell(`The ${name} process runs again.`);
        wasReady = true;
      },
      // Its end is told by onUnexpectedEnd.
      () => undefined,
    );
    return ready;
  }

  function ended(how, lived) {
    shortLives = lived >= pace.steadyAfter ? 1 : shortLives + 1;
    const wait = waitBeforeRestart(shortLives, pace);
    const soon = `${wait / 1000} s`;
    tell(`The ${name} process ended unexpectedly (${how}); it starts again in ${soon}.`);
    if (shortLives === pace.troubleAfter) {
      const log = path.relative(root, group.logFile(name));
      tell(`It has ended ${shortLives} times in a row, each time soon after its start.`);
      tell(
        "Without a worker queued work (imports, re-runs, mail) does not run. None of it is lost.",
      );
      tell(`The end of ${log} says why. Put that right and leave this running:`);
      tell(`the worker is tried again every ${soon}. Everything else goes on.`);
    }
    sleep(wait, undefined, { signal: group.stopped }).then(startAgain, () => undefined);
  }

  function startAgain() {
    try {
      start();
    } catch (error) {
      // The disk is full, say: no different from a process that ends at once.
      ended(error.message, 0);
    }
  }

  return { ready: start() };
}
