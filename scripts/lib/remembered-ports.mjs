import { dataPath, readJsonIfAny, root, writeFileAtomically } from "./paths.mjs";
import { choosePort } from "./ports.mjs";

const FIRST_PORT = 5700;
const PORTS = 200;

/**
 * Ports of the local stand-ins, the same from one start to the next while they are free.
 *
 * @param {string[]} names
 * @returns {Promise<Record<string, number>>}
 */
export async function rememberedPorts(names) {
  const file = dataPath("ports.json");
  const kept = readJsonIfAny(file) ?? {};
  const chosen = {};
  for (const name of names) {
    const taken = Object.values(chosen);
    chosen[name] = await choosePort({
      remembered: taken.includes(kept[name]) ? null : (kept[name] ?? null),
      first: FIRST_PORT,
      count: PORTS,
      key: `${root}#${name}#${taken.join()}`,
    });
  }
  writeFileAtomically(file, JSON.stringify({ ...kept, ...chosen }));
  return chosen;
}
