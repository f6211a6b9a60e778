import net from "node:net";
import { Failure } from "./failure.mjs";

/** Whether nothing listens on this loopback port. */
export function isPortFree(port, host = "127.0.0.1") {
  return new Promise((resolve) => {
    const server = net.createServer();
    server.once("error", () => resolve(false));
    server.listen({ port, host, exclusive: true }, () => server.close(() => resolve(true)));
  });
}

/** A free loopback port chosen by the system. */
export function anyFreePort() {
  return new Promise((resolve, reject) => {
    const server = net.createServer();
    server.once("error", reject);
    server.listen({ port: 0, host: "127.0.0.1" }, () => {
      const { port } = server.address();
      server.close(() => resolve(port));
    });
  });
}

/**
 * The remembered port while it is free, else the first free one of a range that starts at a place
 * derived from the clone's path, so that two clones on one machine seldom meet.
 *
 * @param {object} options
 * @param {number | null} options.remembered
 * @param {number} options.first first port of the range
 * @param {number} options.count how many ports the range has
 * @param {string} options.key any text; the same key starts at the same port
 * @param {(port: number) => Promise<boolean>} [options.isFree]
 */
export async function choosePort({ remembered, first, count, key, isFree = isPortFree }) {
  if (remembered !== null && (await isFree(remembered))) return remembered;
  const start = [...key].reduce((sum, letter) => (sum * 31 + letter.codePointAt(0)) % count, 7);
  for (let step = 0; step < count; step += 1) {
    const port = first + ((start + step) % count);
    if (await isFree(port)) return port;
  }
  throw new Failure(
    `No free port between ${first} and ${first + count - 1} on this machine.`,
    "Stop a program that listens there, then run the same command again.",
  );
}

/** The complaint when the web port belongs to someone else. */
export function portTakenFailure(port, command = "npm start") {
  return new Failure(
    `Port ${port} is used by another program.`,
    `Stop that program, or choose another port:  PORT=${port + 1} ${command}`,
  );
}
