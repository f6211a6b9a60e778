import process from "node:process";
import { say } from "./console-output.mjs";
import { dataDirectory, root } from "./paths.mjs";
import { failureFromOutput, Failure } from "./failure.mjs";
import { rememberedPorts } from "./remembered-ports.mjs";
import { rememberedSecret } from "./secrets.mjs";
import { run } from "./run.mjs";

const PRIVATE_DATABASE = "postgresql://127.0.0.1/private";

/**
 * The arguments with which Node runs a TypeScript program of ours. The condition `react-server`
 * makes the package `server-only` an empty module, as it is inside Next's own server.
 */
export const typescript = (...args) => ["--conditions=react-server", "--import", "tsx", ...args];

/**
 * The settings of the product's processes: what the person set, and for the rest this
 * installation's own secret, address and stand-ins.
 *
 * @param {object} options
 * @param {string} options.address as in http://127.0.0.1:3000
 * @param {NodeJS.ProcessEnv} [options.given] what the person set
 * @returns {Promise<{ env: NodeJS.ProcessEnv, standIns: string[], mailPage: string | null }>}
 *   standIns: arguments for local-services, empty when none is needed
 */
export async function settings({ address, given = process.env }) {
  const needsMail = !given.SMTP_URL;
  const needsStorage = !given.S3_ENDPOINT;
  const ports = await rememberedPorts([
    ...(needsMail ? ["smtp", "mailPage"] : []),
    ...(needsStorage ? ["storage"] : []),
  ]);
  const env = {
    ...given,
    NEXTAUTH_URL: given.NEXTAUTH_URL || address,
    NEXTAUTH_SECRET: given.NEXTAUTH_SECRET || rememberedSecret("session-secret"),
    NEXT_TELEMETRY_DISABLED: "1",
    ...(needsMail ? { SMTP_URL: `smtp://127.0.0.1:${ports.smtp}` } : {}),
    ...(needsStorage
      ? {
          S3_ENDPOINT: `http://127.0.0.1:${ports.storage}`,
          S3_ACCESS_KEY_ID: "local",
          S3_SECRET_ACCESS_KEY: "local-stand-in",
        }
      : {}),
  };
  const standIns = [
    ...(needsMail ? [`--smtp=${ports.smtp}`, `--mail-page=${ports.mailPage}`] : []),
    ...(needsStorage ? [`--storage=${ports.storage}`] : []),
  ];
  return {
    env,
    standIns: standIns.length === 0 ? [] : [`--data=${dataDirectory}`, ...standIns],
    mailPage: needsMail ? `http://127.0.0.1:${ports.mailPage}` : null,
  };
}

/**
 * Check every setting and stop with the whole list of what is wrong. A database that is not named
 * will be the private one, which needs no check.
 */
export async function checkSettings(env) {
  const { tsImport } = await import("tsx/esm/api");
  const { parseEnvironment, EnvironmentError } = await tsImport(
    "../../services/env.ts",
    import.meta.url,
  );
  try {
    return parseEnvironment({ ...env, DATABASE_URL: env.DATABASE_URL || PRIVATE_DATABASE });
  } catch (error) {
    if (error instanceof EnvironmentError) throw new Failure(error.message);
    throw error;
  }
}

/** Bring the database to the present layout. */
export async function migrate(env) {
  await program("Migrating the database", ["scripts/migrate.ts", "up"], env);
}

/** Rows that the product needs and, if wanted and the database is empty, the demo scenario. */
export async function seed(env, { demo }) {
  const args = demo ? ["scripts/seed.ts", "--demo"] : ["scripts/seed.ts"];
  await program("Filling the database", args, env);
}

async function program(what, args, env) {
  const { code, output } = await run(process.execPath, typescript(...args), { cwd: root, env });
  if (code !== 0) {
    // The programs explain themselves; their words are better than ours.
    const said = output.trim().replaceAll(/^ {2}/gm, "");
    const failure = failureFromOutput(what, said);
    throw failure.detail === "" ? failure : new Failure(said);
  }
  for (const line of output.split("\n")) if (line.trim() !== "") say(line.trim());
}
