/**
 * Imported first by every command, so that an old Node ends with a sentence instead of a syntax
 * error or a missing function somewhere later. It uses nothing that an old Node lacks.
 */
export const OLDEST_NODE = [20, 9];

/** Whether a version such as "20.11.1" is at least OLDEST_NODE. */
export function isSupported(version) {
  const [major, minor] = version.split(".").map(Number);
  return major > OLDEST_NODE[0] || (major === OLDEST_NODE[0] && minor >= OLDEST_NODE[1]);
}

if (!isSupported(process.versions.node)) {
  console.error(
    `\n  Dewledger needs Node ${OLDEST_NODE.join(".")} or newer; this is Node ${process.versions.node}.\n\n` +
      "  Install a newer one (https://nodejs.org, or nvm install 20) and run the same command again.\n",
  );
  process.exit(1);
}
