import { dataPath, readJsonIfAny, root, writeFileAtomically } from "./paths.mjs";
import { choosePort, isPortFree } from "./ports.mjs";

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
  const chosen = await portsApart(names, { kept, key: root });
  writeFileAtomically(file, JSON.stringify({ ...kept, ...chosen }));
  return chosen;
}

/**
 * A free port for every name, no two of them the same: a port given to one name is free for the
 * system still, but not for the next name.
 *
 * @param {string[]} names
 * @param {object} options
 * @param {Record<string, number>} options.kept ports of the last time, kept while they are free
 * @param {string} options.key any text; the same key and name start at the same port
 * @param {(port: number) => Promise<boolean>} [options.isFree]
 * @returns {Promise<Record<string, number>>}
 */
export async function portsApart(names, { kept, key, isFree = isPortFree }) {
  const chosen = {};
  for (const name of names) {
    const taken = Object.values(chosen);
    chosen[name] = await choosePort({
      remembered: kept[name] ?? null,
      first: FIRST_PORT,
      count: PORTS,
      key: `${key}#${name}`,
      isFree: async (port) => !taken.includes(port) && (await isFree(port)),
    });
  }
  return chosen;
}
