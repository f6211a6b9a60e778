import { spawn, type ChildProcess } from "node:child_process";
import { randomBytes } from "node:crypto";
import { once } from "node:events";
import fs from "node:fs";
import net from "node:net";
import process from "node:process";
import { setTimeout as sleep } from "node:timers/promises";
import pg from "pg";
import { testEnvironment } from "./environment";

/** The product on a database that nobody has used yet, beside the one with the demo. */
export interface EmptyProduct {
  baseUrl: string;
  stop: () => Promise<void>;
}

/**
 * Start the built product a second time, on a new database of the same server.
 *
 * @throws when there is no build: hot reload allows one product only
 */
export async function startEmptyProduct(): Promise<EmptyProduct> {
  if (!fs.existsSync(".next/BUILD_ID")) {
    throw new Error("This test needs the built product. Run it without --dev.");
  }
  const name = `dewledger_empty_test_${process.pid}`;
  await administer(`drop database if exists ${name} with (force)`, `create database ${name}`);
  const database = new URL(testEnvironment.databaseUrl);
  database.pathname = `/${name}`;
  const port = await freePort();
  const baseUrl = `http://127.0.0.1:${port}`;
  const env = {
    ...process.env,
    DATABASE_URL: database.href,
    NEXTAUTH_URL: baseUrl,
    NEXTAUTH_SECRET: randomBytes(48).toString("base64url"),
    SMTP_URL: "smtp://127.0.0.1:9",
    S3_ENDPOINT: "http://127.0.0.1:9",
    S3_ACCESS_KEY_ID: "test",
    S3_SECRET_ACCESS_KEY: "test",
    NODE_ENV: "production" as const,
    NEXT_TELEMETRY_DISABLED: "1",
  };
  await migrate(env);
  const next = ["node_modules/next/dist/bin/next", "start", "-H", "127.0.0.1", "-p", String(port)];
  const web = spawn(process.execPath, next, { env, stdio: "ignore" });
  const stop = async () => {
    await end(web);
    await administer(`drop database if exists ${name} with (force)`);
  };
  try {
    await untilHealthy(baseUrl, web);
  } catch (error) {
    await stop();
    throw error;
  }
  return { baseUrl, stop };
}

async function administer(...statements: string[]): Promise<void> {
  const client = new pg.Client({ connectionString: testEnvironment.databaseUrl });
  await client.connect();
  try {
    for (const statement of statements) await client.query(statement);
  } finally {
    await client.end();
  }
}

async function migrate(env: NodeJS.ProcessEnv): Promise<void> {
  const args = ["--conditions=react-server", "--import", "tsx", "scripts/migrate.ts", "up"];
  const program = spawn(process.execPath, args, { env, stdio: ["ignore", "ignore", "inherit"] });
  const [code] = (await once(program, "exit")) as [number | null];
  if (code !== 0) throw new Error(`The migrations of the empty database ended with ${code}`);
}

async function untilHealthy(baseUrl: string, web: ChildProcess): Promise<void> {
  const deadline = Date.now() + 120_000;
  while (Date.now() < deadline) {
    if (web.exitCode !== null) throw new Error(`The second product ended with ${web.exitCode}`);
    try {
      if ((await fetch(`${baseUrl}/api/v1/health`)).ok) return;
    } catch {
      // Nothing listens yet.
    }
    await sleep(200);
  }
  throw new Error("The second product did not become healthy within two minutes");
}

async function end(program: ChildProcess): Promise<void> {
  if (program.exitCode !== null) return;
  const ended = once(program, "exit");
  program.kill("SIGTERM");
  await Promise.race([ended, sleep(10_000).then(() => program.kill("SIGKILL"))]);
}

function freePort(): Promise<number> {
  return new Promise((resolve, reject) => {
    const server = net.createServer();
    server.once("error", reject);
    server.listen({ port: 0, host: "127.0.0.1" }, () => {
      const address = server.address();
      const port = typeof address === "object" && address ? address.port : 0;
      server.close(() => resolve(port));
    });
  });
}
