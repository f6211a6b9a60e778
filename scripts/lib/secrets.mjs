import { randomBytes } from "node:crypto";
import { dataPath, readTextIfAny, writeFileAtomically } from "./paths.mjs";

/** A secret of this installation: made on first use, kept readable by its owner alone. */
export function rememberedSecret(name) {
  const file = dataPath(name);
  const kept = readTextIfAny(file)?.trim() ?? "";
  if (kept.length >= 32) return kept;
  const made = randomBytes(48).toString("base64url");
  writeFileAtomically(file, `${made}\n`);
  return made;
}
