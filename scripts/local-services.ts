/**
 * The local stand-ins for a mail relay and an object store, for an installation that was not given
 * real ones. Ports come as arguments; 0 lets the system choose:
 *
 *     local-services --data=DIR [--smtp=PORT --mail-page=PORT] [--storage=PORT]
 */
import path from "node:path";
import process from "node:process";
import { parseArgs } from "node:util";
import { startMailFake } from "../services/mail/fake/server";
import { startStorageFake } from "../services/storage/fake/server";

const { values } = parseArgs({
  options: {
    data: { type: "string", default: ".data" },
    smtp: { type: "string" },
    "mail-page": { type: "string", default: "0" },
    storage: { type: "string" },
  },
});

const closers: (() => Promise<void>)[] = [];
if (values.smtp !== undefined) {
  const ports = { smtp: Number(values.smtp), http: Number(values["mail-page"]) };
  const mail = await startMailFake(path.join(values.data, "mail"), ports);
  closers.push(mail.close);
}
if (values.storage !== undefined) {
  const storage = await startStorageFake(path.join(values.data, "storage"), Number(values.storage));
  closers.push(storage.close);
}
process.send?.("ready");

// "disconnect": the program that started this one is gone, killed perhaps.
for (const event of ["SIGTERM", "SIGINT", "disconnect"] as const) {
  process.on(event, () => {
    Promise.all(closers.map((close) => close())).then(() => process.exit(0));
  });
}
