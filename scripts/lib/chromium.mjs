import { aptInstall } from "./apt.mjs";
import { Failure } from "./failure.mjs";
import { findOnPath } from "./run.mjs";

/** Debian's Chromium, installed when it is missing. TEST_CHROMIUM names another program. */
export async function findChromium() {
  const search = () => process.env.TEST_CHROMIUM || findOnPath("chromium");
  const found = search();
  if (found) return found;
  await aptInstall(["chromium"], {
    purpose: "the browser of the tests",
    otherwise: "Or point TEST_CHROMIUM at a Chromium of your own.",
  });
  const installed = search();
  if (!installed) throw new Failure("Chromium was installed, but it is not on PATH.");
  return installed;
}
