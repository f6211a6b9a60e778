/** What the tests that were asked for need besides the code. No argument means all tests. */

/** Projects of tests that need nothing but the code. */
export const UNIT_PROJECTS = ["unit", "services"];
const UNIT = /(^|\/)tests\/(analytics|components|policy|services|scripts)(\/|$)/;
const BROWSER = /(^|\/)tests\/e2e(\/|$)/;

/** Whether the product has to run. */
export function needsProduct(args) {
  const projects = projectsOf(args);
  const files = filesOf(args);
  if (projects.length > 0) return projects.some((project) => !UNIT_PROJECTS.includes(project));
  return files.length === 0 || files.some((file) => !UNIT.test(file));
}

/** Whether the browser has to be there. */
export function needsBrowser(args) {
  const projects = projectsOf(args);
  const files = filesOf(args);
  if (projects.length > 0) return projects.includes("e2e");
  return files.length === 0 || files.some((file) => BROWSER.test(file));
}

/** Whether tests are chosen by their names, so that the others of a file count as skipped. */
export function selectsByName(args) {
  return args.some((argument) => /^(-t|--testNamePattern)(=|$)/.test(argument));
}

function projectsOf(args) {
  return args.flatMap((argument, at) => {
    if (argument.startsWith("--project=")) return [argument.slice("--project=".length)];
    return argument === "--project" && at + 1 < args.length ? [args[at + 1]] : [];
  });
}

/** Arguments that name files; the value of an option such as -t is none. */
function filesOf(args) {
  return args.filter((argument) => argument.includes("tests/"));
}
