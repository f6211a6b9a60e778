import fs from "node:fs";
import type { Reporter, TestModule } from "vitest/node";

/**
 * Counts results for scripts/test.mjs, which adds them to the other checks and prints the closing
 * line. A skipped test counts as failed: a test that does not run proves nothing.
 */
export default class SummaryReporter implements Reporter {
  onTestRunEnd(modules: readonly TestModule[], unhandledErrors: readonly unknown[]): void {
    const summaryFile = process.env.TEST_SUMMARY_FILE;
    if (summaryFile === undefined) return;
    const summary = { passed: 0, failed: unhandledErrors.length, skipped: 0, modules: 0 };
    for (const file of modules) {
      summary.modules += 1;
      // A file that could not be loaded, or a hook that failed, has no test to carry the failure.
      summary.failed += file.errors().length;
      for (const suite of file.children.allSuites()) summary.failed += suite.errors().length;
      for (const test of file.children.allTests()) {
        const { state } = test.result();
        if (state === "passed") summary.passed += 1;
        else if (state === "failed") summary.failed += 1;
        else summary.skipped += 1;
      }
    }
    fs.writeFileSync(summaryFile, JSON.stringify(summary));
  }
}
