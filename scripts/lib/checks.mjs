import process from "node:process";
import { failureText, say, seconds, task } from "./console-output.mjs";

/** What a whole run of checks comes to. */
export class Checks {
  passed = 0;
  failed = 0;

  /**
   * One check that is not a test of its own, such as the formatting: it passes when `work` does not
   * throw.
   */
  async check(name, work) {
    try {
      await task(name, work);
      this.passed += 1;
      return true;
    } catch (error) {
      process.stdout.write(`\n${failureText(error)}\n\n`);
      this.failed += 1;
      return false;
    }
  }

  /**
   * The results of a project of tests. A run that failed without a failed test (a file that does
   * not load, no file at all) counts as one failure, and so does each test that was skipped.
   *
   * @param {string} name
   * @param {number} exitCode of vitest
   * @param {{ passed: number, failed: number, skipped: number } | null} summary
   * @param {number} milliseconds
   */
  addTests(name, exitCode, summary, milliseconds) {
    const { passed, failed, skipped } = summary ?? { passed: 0, failed: 0, skipped: 0 };
    const failures = failed + skipped;
    this.passed += passed;
    this.failed += failures === 0 && (exitCode !== 0 || passed === 0) ? 1 : failures;
    const notRun = skipped > 0 ? `, ${skipped} skipped, which counts as failed` : "";
    say(`${name}: ${passed} passed, ${failed} failed${notRun}, in ${seconds(milliseconds)}`);
  }

  /** The line that a run of the checks ends with. */
  closingLine() {
    return `${this.passed} passed, ${this.failed} failed`;
  }
}
