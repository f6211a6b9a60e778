import process from "node:process";
import { Failure } from "./failure.mjs";

/** One line about what is being done. */
export function say(line = "") {
  process.stdout.write(line === "" ? "\n" : `  ${line}\n`);
}

/** How the step that is under way shows a detail; a step within it reports there. */
let noteOfOuter = null;

/**
 * Run a step that may take long: says what it does, shows that it is alive, and says how long it
 * took. On a terminal the line counts seconds in place; elsewhere a line is added every 15 s. A
 * step within a step is a detail of the outer one.
 *
 * @template T
 * @param {string} title what is being done, as in "Installing packages"
 * @param {(note: (text: string) => void) => Promise<T>} work receives a function to show a detail
 * @returns {Promise<T>}
 */
export async function task(title, work) {
  if (noteOfOuter !== null) {
    noteOfOuter(title);
    return work(noteOfOuter);
  }
  const started = Date.now();
  const live = process.stdout.isTTY === true;
  let detail = "";
  const line = () => {
    const room = Math.max(20, (process.stdout.columns ?? 100) - title.length - 16);
    const shown = detail === "" ? "" : `  ${detail.slice(0, room)}`;
    return `  ${title} … ${seconds(Date.now() - started)}${shown}`;
  };
  const draw = () => process.stdout.write(live ? `\r\u001b[2K${line()}` : `${line()}\n`);
  if (!live) say(`${title} …`);
  const timer = setInterval(draw, live ? 250 : 15_000);
  try {
    noteOfOuter = (text) => {
      detail = text.trim();
    };
    const result = await work(noteOfOuter);
    clearInterval(timer);
    if (live) process.stdout.write("\r\u001b[2K");
    say(`${title}: done in ${seconds(Date.now() - started)}`);
    return result;
  } catch (error) {
    clearInterval(timer);
    if (live) process.stdout.write("\r\u001b[2K");
    say(`${title}: failed after ${seconds(Date.now() - started)}`);
    throw error;
  } finally {
    noteOfOuter = null;
  }
}

/** A duration in milliseconds for reading: "0.4 s", "12 s", "2 min 5 s". */
export function seconds(milliseconds) {
  const value = milliseconds / 1000;
  if (value < 10) return `${value.toFixed(1)} s`;
  if (value < 60) return `${Math.round(value)} s`;
  const whole = Math.round(value);
  return `${Math.floor(whole / 60)} min ${whole % 60} s`;
}

/** The text a person reads when a step failed: what, what to do, and the program's last words. */
export function failureText(error) {
  if (!(error instanceof Failure)) {
    const stack = error instanceof Error ? (error.stack ?? error.message) : String(error);
    return `Unexpected problem:\n${stack}`;
  }
  return [error.message, error.remedy, error.detail === "" ? "" : `It said:\n${error.detail}`]
    .filter((part) => part !== "")
    .join("\n\n");
}

/** Print a failure on standard error, set apart so that it is the last thing seen. */
export function sayFailure(error) {
  const text = failureText(error)
    .split("\n")
    .map((line) => `  ${line}`.trimEnd())
    .join("\n");
  process.stderr.write(`\n${text}\n\n`);
}
