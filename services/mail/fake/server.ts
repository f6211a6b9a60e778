import { randomUUID } from "node:crypto";
import fs from "node:fs/promises";
import http from "node:http";
import type { AddressInfo } from "node:net";
import path from "node:path";
import { SMTPServer } from "smtp-server";
import { readMail, type ReceivedMail } from "./parse";
import { listPage, messagePage } from "./pages";

/**
 * A stand-in for a mail relay on a developer's machine: it takes every message over SMTP on
 * loopback, sends none, keeps each as a JSON file and shows them on a plain page.
 */

/**
 * Start the stand-in.
 *
 * @param directory where messages are kept; made when missing
 * @param ports on 127.0.0.1; 0 lets the system choose
 */
export async function startMailFake(
  directory: string,
  ports: { smtp: number; http: number },
): Promise<{ smtpPort: number; httpPort: number; close: () => Promise<void> }> {
  await fs.mkdir(directory, { recursive: true, mode: 0o700 });
  const smtp = new SMTPServer({
    authOptional: true,
    disabledCommands: ["STARTTLS"],
    onAuth: (_auth, _session, done) => done(null, { user: "local" }),
    onData: (stream, session, done) => {
      const chunks: Buffer[] = [];
      stream.on("data", (chunk: Buffer) => chunks.push(chunk));
      stream.on("end", () => {
        const to = session.envelope.rcptTo.map(({ address }) => address);
        keep(directory, readMail(Buffer.concat(chunks).toString("utf8"), to)).then(
          () => done(),
          (error: unknown) => done(error instanceof Error ? error : new Error("not kept")),
        );
      });
    },
  });
  // A client that goes away in the middle of a message is no concern of a stand-in.
  smtp.on("error", () => undefined);
  const web = http.createServer((request, response) => {
    show(directory, request.url ?? "/").then(
      ({ status, type, body }) =>
        response
          .writeHead(status, {
            "Content-Type": `${type}; charset=utf-8`,
            "Content-Security-Policy":
              "default-src 'none'; style-src 'unsafe-inline'; frame-src 'self'",
          })
          .end(body),
      () => response.writeHead(500).end(),
    );
  });
  await new Promise<void>((resolve, reject) => {
    smtp.server.once("error", reject);
    smtp.listen(ports.smtp, "127.0.0.1", resolve);
  });
  await new Promise<void>((resolve, reject) => {
    web.once("error", reject).listen(ports.http, "127.0.0.1", resolve);
  });
  return {
    smtpPort: (smtp.server.address() as AddressInfo).port,
    httpPort: (web.address() as AddressInfo).port,
    close: async () => {
      await new Promise<void>((resolve) => smtp.close(() => resolve()));
      await new Promise<void>((resolve) => {
        web.close(() => resolve());
        web.closeAllConnections();
      });
    },
  };
}

async function keep(
  directory: string,
  mail: Omit<ReceivedMail, "id" | "receivedAt">,
): Promise<void> {
  const receivedAt = new Date().toISOString();
  const id = `${receivedAt.replaceAll(/[:.]/g, "-")}-${randomUUID().slice(0, 8)}`;
  const file = path.join(directory, `${id}.json`);
  await fs.writeFile(`${file}.new`, JSON.stringify({ id, receivedAt, ...mail }, null, 2), {
    mode: 0o600,
  });
  await fs.rename(`${file}.new`, file);
}

async function list(directory: string): Promise<ReceivedMail[]> {
  const names = (await fs.readdir(directory)).filter((name) => name.endsWith(".json"));
  const newestFirst = names.sort().reverse().slice(0, 200);
  return Promise.all(newestFirst.map((name) => load(directory, name)));
}

async function load(directory: string, name: string): Promise<ReceivedMail> {
  return JSON.parse(await fs.readFile(path.join(directory, name), "utf8")) as ReceivedMail;
}

async function show(
  directory: string,
  url: string,
): Promise<{ status: number; type: string; body: string }> {
  const { pathname } = new URL(url, "http://127.0.0.1");
  const page = (body: string) => ({ status: 200, type: "text/html", body });
  if (pathname === "/") return page(listPage(await list(directory)));
  if (pathname === "/messages.json") {
    return { status: 200, type: "application/json", body: JSON.stringify(await list(directory)) };
  }
  const match = /^\/messages\/([0-9A-Za-z-]+)(\/html)?$/.exec(pathname);
  if (match !== null) {
    const mail = await load(directory, `${match[1]}.json`).catch(() => null);
    if (mail !== null) return page(match[2] === undefined ? messagePage(mail) : mail.html);
  }
  return { status: 404, type: "text/plain", body: "Not found" };
}
