import fs from "node:fs";
import os from "node:os";
import path from "node:path";
import { afterAll, beforeAll, describe, expect, it, vi } from "vitest";
import { startStorageFake } from "@/services/storage/fake/server";
import { deleteObject, describeObject, findObject, putObject } from "@/services/storage/storage";

let folder: string;
let stop: () => Promise<void>;

beforeAll(async () => {
  folder = fs.mkdtempSync(path.join(os.tmpdir(), "dewledger-storage-"));
  const { port, close } = await startStorageFake(path.join(folder, "store"), 0);
  stop = close;
  vi.stubEnv("DATABASE_URL", "postgresql://127.0.0.1/none");
  vi.stubEnv("NEXTAUTH_URL", "http://127.0.0.1:3000");
  vi.stubEnv("NEXTAUTH_SECRET", "0123456789abcdef0123456789abcdef");
  vi.stubEnv("SMTP_URL", "smtp://127.0.0.1:2525");
  vi.stubEnv("S3_ENDPOINT", `http://127.0.0.1:${port}`);
  vi.stubEnv("S3_ACCESS_KEY_ID", "local");
  vi.stubEnv("S3_SECRET_ACCESS_KEY", "secret");
});

afterAll(async () => {
  vi.unstubAllEnvs();
  await stop();
  fs.rmSync(folder, { recursive: true });
});

describe("storage", () => {
  // Every byte value, so that a changed encoding or a chunk header in the body would show.
  const bytes = Uint8Array.from({ length: 70_000 }, (_value, index) => index % 256);

  it("gives back the bytes it was given, with their type", async () => {
    await putObject("reports/Lab report 7 (final).pdf", bytes, "application/pdf");
    const found = await findObject("reports/Lab report 7 (final).pdf");
    expect(found).toMatchObject({ sizeBytes: 70_000, contentType: "application/pdf" });
    expect(Buffer.compare(found?.body ?? new Uint8Array(), bytes)).toBe(0);
  });

  it("describes an object without reading it", async () => {
    await putObject("a.csv", Buffer.from("a,b\n"), "text/csv");
    expect(await describeObject("a.csv")).toEqual({ sizeBytes: 4, contentType: "text/csv" });
  });

  it("replaces what was under the key", async () => {
    await putObject("b.txt", Buffer.from("first"), "text/plain");
    await putObject("b.txt", Buffer.from("second"), "text/plain");
    expect(Buffer.from((await findObject("b.txt"))?.body ?? []).toString()).toBe("second");
  });

  it("says null for what is not there, and deletes it without complaint", async () => {
    expect(await findObject("nothing")).toBeNull();
    expect(await describeObject("nothing")).toBeNull();
    await expect(deleteObject("nothing")).resolves.toBeUndefined();
  });

  it("forgets what was deleted", async () => {
    await putObject("c.txt", Buffer.from("x"), "text/plain");
    await deleteObject("c.txt");
    expect(await findObject("c.txt")).toBeNull();
  });

  it("keeps a key that looks like a path inside its folder", async () => {
    const address = `${process.env.S3_ENDPOINT}/dewledger/..%2F..%2Foutside.txt`;
    expect((await fetch(address, { method: "PUT", body: "x" })).status).toBe(200);
    expect(fs.readdirSync(folder)).toEqual(["store"]);
  });
});
