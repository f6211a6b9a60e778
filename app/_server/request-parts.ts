import "server-only";
import type { NextRequest } from "next/server";
import type { z } from "zod";
import { env } from "@/services/env";
import { InvalidInputError } from "@/services/errors";
import { inputWords } from "@/services/input-words";
import { RequestError } from "./request-errors";

const largestBodyBytes = 2 * 1024 * 1024;

/**
 * Refuse a write that another site made a browser send with our cookie. A bearer token is never sent by a browser on
 * its own, so those pass.
 *
 * @throws {RequestError}
 */
export function assertSameSite(request: NextRequest): void {
  if (request.headers.get("authorization") !== null) return;
  const site = request.headers.get("sec-fetch-site");
  if (site === "same-origin") return;
  const origin = request.headers.get("origin");
  const ours = [request.headers.get("host"), new URL(env().NEXTAUTH_URL).host];
  if (site === null && origin !== null && URL.canParse(origin)) {
    if (ours.includes(new URL(origin).host)) return;
  }
  throw new RequestError("cross_site", "This request did not come from a page of this site.");
}

/** @throws {RequestError} when If-Match is missing or is not one of our entity tags */
export function expectedVersionOf(request: NextRequest): number {
  const tag = /^(?:W\/)?"(\d{1,9})"$/.exec(request.headers.get("if-match") ?? "");
  if (!tag) {
    throw new RequestError(
      "version_required",
      'Say which version you are changing: If-Match: "<version>", as the ETag had it.',
    );
  }
  return Number(tag[1]);
}

/** The search part of the address; a name given several times becomes a list. */
export function searchOf(request: NextRequest): Record<string, string | string[]> {
  const search = request.nextUrl.searchParams;
  return Object.fromEntries(
    [...new Set(search.keys())].map((name) => {
      const values = search.getAll(name);
      return [name, values.length === 1 ? values[0] : values];
    }),
  );
}

/** @throws {RequestError} when the body is not JSON, or larger than 2 MiB */
export async function readJson(request: NextRequest): Promise<unknown> {
  const type = request.headers.get("content-type") ?? "";
  if (!/^application\/([\w.-]+\+)?json\b/i.test(type)) {
    throw new RequestError("not_json", "Send a JSON body with content-type application/json.");
  }
  const text = await readText(request);
  try {
    return JSON.parse(text);
  } catch (error) {
    if (!(error instanceof SyntaxError)) throw error;
    throw new RequestError("malformed_json", `The body is not valid JSON: ${error.message}.`);
  }
}

/** Read no further than the limit, whatever content-length says. */
async function readText(request: NextRequest): Promise<string> {
  if (!request.body) return "";
  const chunks: Uint8Array[] = [];
  let bytes = 0;
  for await (const chunk of request.body as unknown as AsyncIterable<Uint8Array>) {
    bytes += chunk.byteLength;
    if (bytes > largestBodyBytes) throw new RequestError("too_large", "The body is over 2 MiB.");
    chunks.push(chunk);
  }
  return Buffer.concat(chunks).toString("utf8");
}

/**
 * @throws {InvalidInputError} with a JSON pointer for each thing wrong with a body
 * @throws {RequestError} with `?name` for each thing wrong with a query
 */
export function parsed<Schema extends z.ZodType>(
  schema: Schema,
  value: unknown,
  where: "body" | "query",
): z.output<Schema> {
  const result = schema.safeParse(value, { error: inputWords });
  if (result.success) return result.data;
  const problems = result.error.issues.map((issue) => ({
    pointer: `${where === "body" ? "#" : "?"}${pathOf(issue.path, where)}`,
    detail: issue.message,
  }));
  if (where === "body") throw new InvalidInputError(problems);
  throw new RequestError("invalid_query", "The address has a parameter we cannot use.", problems);
}

function pathOf(path: PropertyKey[], where: "body" | "query"): string {
  const escaped = path.map((part) => String(part).replace(/~/g, "~0").replace(/\//g, "~1"));
  return where === "body" ? escaped.map((part) => `/${part}`).join("") : escaped.join(".");
}
