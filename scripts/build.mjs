/** `npm run build`: install what is missing and build the product when its sources changed. */
import "./lib/node-version.mjs";
import process from "node:process";
import { build } from "./lib/build.mjs";
import { say, sayFailure } from "./lib/console-output.mjs";
import { installDependencies } from "./lib/dependencies.mjs";
import { loadDotenv } from "./lib/dotenv.mjs";

try {
  loadDotenv();
  await installDependencies();
  if (!(await build())) say("The build is up to date");
} catch (error) {
  sayFailure(error);
  process.exitCode = 1;
}
