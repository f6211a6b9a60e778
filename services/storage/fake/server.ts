import { createHash } from "node:crypto";
import fs from "node:fs/promises";
import http from "node:http";
import path from "node:path";

/**
 * A stand-in for an S3-compatible store on a developer's machine: put, get, head and delete of one
 * object at a time, kept as files. It listens on loopback and checks no signature, so it is no
 * place for anything but local work.
 */

interface Description {
  contentType: string;
  etag: string;
}

/**
 * Start the stand-in.
 *
 * @param directory where objects are kept; made when missing
 * @param port on 127.0.0.1; 0 lets the system choose
 */
export async function startStorageFake(
  directory: string,
  port: number,
): Promise<{ port: number; close: () => Promise<void> }> {
  await fs.mkdir(directory, { recursive: true, mode: 0o700 });
  const server = http.createServer((request, response) => {
    answer(directory, request, response).catch((error: unknown) => {
      refuse(response, 500, "InternalError", error instanceof Error ? error.message : "failed");
    });
  });
  await new Promise<void>((resolve, reject) => {
    server.once("error", reject).listen(port, "127.0.0.1", resolve);
  });
  const address = server.address();
  return {
    port: typeof address === "object" && address !== null ? address.port : port,
    close: () =>
      new Promise((resolve) => {
        server.close(() => resolve());
        server.closeAllConnections();
      }),
  };
}

async function answer(
  directory: string,
  request: http.IncomingMessage,
  response: http.ServerResponse,
): Promise<void> {
  const { pathname } = new URL(request.url ?? "/", "http://127.0.0.1");
  const [bucket, ...rest] = pathname.slice(1).split("/");
  const key = decodeURIComponent(rest.join("/"));
  if (bucket === "" || key === "") return refuse(response, 501, "NotImplemented", "objects only");
  // A key is any text, "../" included, so files are named by its hash.
  const name = createHash("sha256").update(`${bucket}/${key}`).digest("hex");
  const file = path.join(directory, name);

  switch (request.method) {
    case "PUT": {
      const chunks: Buffer[] = [];
      for await (const chunk of request) chunks.push(chunk as Buffer);
      const body = Buffer.concat(chunks);
      const etag = `"${createHash("md5").update(body).digest("hex")}"`;
      const contentType = request.headers["content-type"] ?? "application/octet-stream";
      await writeWhole(file, body);
      const description = { bucket, key, contentType, etag };
      await writeWhole(`${file}.json`, Buffer.from(JSON.stringify(description)));
      response.writeHead(200, { ETag: etag }).end();
      return;
    }
    case "GET":
    case "HEAD": {
      const found = await read(file);
      if (found === null) return refuse(response, 404, "NoSuchKey", "no such object");
      response.writeHead(200, {
        "Content-Type": found.description.contentType,
        "Content-Length": found.body.byteLength,
        ETag: found.description.etag,
      });
      response.end(request.method === "HEAD" ? undefined : found.body);
      return;
    }
    case "DELETE":
      await fs.rm(`${file}.json`, { force: true });
      await fs.rm(file, { force: true });
      response.writeHead(204).end();
      return;
    default:
      return refuse(response, 501, "NotImplemented", `${request.method} is not supported`);
  }
}

async function writeWhole(file: string, body: Buffer): Promise<void> {
  const temporary = `${file}.${process.hrtime.bigint()}.new`;
  await fs.writeFile(temporary, body, { mode: 0o600 });
  await fs.rename(temporary, file);
}

async function read(file: string): Promise<{ body: Buffer; description: Description } | null> {
  try {
    const description = JSON.parse(await fs.readFile(`${file}.json`, "utf8")) as Description;
    return { description, body: await fs.readFile(file) };
  } catch (error) {
    if (error instanceof Error && "code" in error && error.code === "ENOENT") return null;
    throw error;
  }
}

function refuse(
  response: http.ServerResponse,
  status: number,
  code: string,
  message: string,
): void {
  if (response.headersSent) {
    response.destroy();
    return;
  }
  response
    .writeHead(status, { "Content-Type": "application/xml" })
    .end(
      `<?xml version="1.0" encoding="UTF-8"?><Error><Code>${code}</Code><Message>${message}</Message></Error>`,
    );
}
