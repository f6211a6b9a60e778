/**
 * A problem the person at the terminal can act on. `message` says what is wrong in one line,
 * `remedy` what to do about it; anything else that is thrown is a defect and shows its stack.
 */
export class Failure extends Error {
  /**
   * @param {string} message what went wrong
   * @param {string} [remedy] what to do now, possibly several lines
   * @param {string} [detail] the last words of the program that failed
   */
  constructor(message, remedy = "", detail = "") {
    super(message);
    this.name = "Failure";
    this.remedy = remedy;
    this.detail = detail;
  }
}

/** Whether a program's output says that the disk is full. */
export function saysDiskIsFull(output) {
  return /ENOSPC|No space left on device|disk quota exceeded|EDQUOT/i.test(output);
}

/**
 * Turn the output of a program that failed into a Failure. A full disk is named as such, because
 * the same cause speaks differently through npm, PostgreSQL and Next.
 *
 * @param {string} what the step, as in "Installing packages"
 * @param {string} output everything the program printed
 * @param {string} [remedy] what to do when the cause is not the disk
 */
export function failureFromOutput(what, output, remedy = "") {
  if (saysDiskIsFull(output)) {
    return new Failure(
      `${what} stopped because the disk is full.`,
      "Free some space and run the same command again. Nothing was lost: unfinished work is\n" +
        "thrown away and the database is as it was.",
    );
  }
  return new Failure(`${what} failed.`, remedy, lastLines(output, 25));
}

/** The last `count` non-empty lines of a text. */
export function lastLines(text, count) {
  return text
    .split(/\r?\n/)
    .filter((line) => line.trim() !== "")
    .slice(-count)
    .join("\n");
}
