import { createHash } from "node:crypto";
import fs from "node:fs";
import path from "node:path";
import { fileURLToPath } from "node:url";

/** The folder of this clone. */
export const root = path.resolve(path.dirname(fileURLToPath(import.meta.url)), "..", "..");

/** Everything this installation keeps outside the database: secrets, records, local fakes. */
export const dataDirectory = path.join(root, ".data");

/** A path inside `.data`; the folder is made when missing, readable by its owner alone. */
export function dataPath(...parts) {
  fs.mkdirSync(dataDirectory, { recursive: true, mode: 0o700 });
  return path.join(dataDirectory, ...parts);
}

/** A short checksum of a clone's path, which tells two clones on one machine apart. */
export function cloneChecksum(directory = root) {
  return createHash("sha256").update(directory).digest("hex").slice(0, 12);
}

/** Write a file whole or not at all: a reader, or a crash, never sees half of it. */
export function writeFileAtomically(file, text, mode = 0o600) {
  const temporary = `${file}.${process.pid}.new`;
  fs.writeFileSync(temporary, text, { mode });
  fs.chmodSync(temporary, mode);
  fs.renameSync(temporary, file);
}

/** The text of a file, or null when there is none. */
export function readTextIfAny(file) {
  try {
    return fs.readFileSync(file, "utf8");
  } catch (error) {
    if (error.code === "ENOENT") return null;
    throw error;
  }
}

/** A JSON file's value, or null when it is missing or was cut short. */
export function readJsonIfAny(file) {
  const text = readTextIfAny(file);
  if (text === null) return null;
  try {
    return JSON.parse(text);
  } catch {
    return null;
  }
}
