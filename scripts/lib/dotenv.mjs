import path from "node:path";
import process from "node:process";
import { dataPath, readTextIfAny, root } from "./paths.mjs";

/**
 * Read the text of a .env file: NAME=value a line, `#` comments, optional quotes. A value in double
 * quotes may hold \n.
 *
 * @param {string} text
 * @returns {Record<string, string>}
 */
export function parseDotenv(text) {
  const values = {};
  for (const line of text.split(/\r?\n/)) {
    const match = /^\s*(?:export\s+)?([A-Za-z_][A-Za-z0-9_]*)\s*=\s*(.*?)\s*$/.exec(line);
    if (match === null) continue;
    const [, name, raw] = match;
    const quoted = /^(["'])(.*)\1(?:\s+#.*)?$/.exec(raw);
    if (quoted === null) values[name] = raw.replace(/(^|\s+)#.*$/, "").trim();
    else values[name] = quoted[1] === '"' ? quoted[2].replaceAll("\\n", "\n") : quoted[2];
  }
  return values;
}

/** Take what .env sets into this process. A variable that is already set wins. */
export function loadDotenv() {
  const values = parseDotenv(readTextIfAny(path.join(root, ".env")) ?? "");
  for (const [name, value] of Object.entries(values)) process.env[name] ??= value;
}

/**
 * For programs that run by hand beside `npm start`: .env, and this clone's private database when
 * no other is named.
 */
export function loadSettings() {
  loadDotenv();
  if (process.env.DATABASE_URL) return;
  const remembered = readTextIfAny(dataPath("database-url"));
  if (remembered !== null) process.env.DATABASE_URL = remembered.trim();
}
