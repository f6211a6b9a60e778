import "server-only";
import { randomUUID } from "node:crypto";
import type { NextRequest } from "next/server";
import type { Logger } from "pino";
import type { z } from "zod";
import { NotFoundError } from "@/services/errors";
import { once, type Answer } from "@/services/idempotency";
import { log } from "@/services/log";
import { authorise, type Action, type Actor } from "@/services/policy";
import { problemResponse } from "./problem";
import { RequestError } from "./request-errors";
import { assertSameSite, expectedVersionOf, parsed, readJson, searchOf } from "./request-parts";
import { actorOfRequest } from "./session";

interface RouteContext {
  params: Promise<Record<string, string | string[] | undefined>>;
}

type Access = Action | "public";
type Nothing = z.ZodType<undefined>;

export interface RouteInput<
  May extends Access,
  Params extends z.ZodType,
  Query extends z.ZodType,
  Body extends z.ZodType,
  Versioned extends boolean,
> {
  /** who asks, as the database has them now; null is possible on a public route only */
  actor: May extends "public" ? Actor | null : Actor;
  params: z.output<Params>;
  query: z.output<Query>;
  body: z.output<Body>;
  /** the version of If-Match, on a versioned route */
  expectedVersion: Versioned extends true ? number : undefined;
  /** the request itself, for uploads and streams */
  request: NextRequest;
  log: Logger;
}

export interface Route<
  May extends Access,
  Params extends z.ZodType,
  Query extends z.ZodType,
  Body extends z.ZodType,
  Versioned extends boolean,
  Result,
> {
  /** the action of services/policy.ts that this is; `public` for the few routes that need nobody */
  may: May;
  params?: Params;
  query?: Query;
  /** a JSON body; a route without it may read the request itself */
  body?: Body;
  /** the request must say with If-Match which version it is about */
  versioned?: Versioned;
  /** the answer holds a secret that must not be kept to answer a repetition with: Idempotency-Key is refused */
  answersOnce?: true;
  /** of success; 200 unless something was created (201) or queued (202) */
  status?: 200 | 201 | 202;
  /** returns a row or a plain value; a `Response` (a file, a stream) goes out as it is; `undefined` answers 204 */
  handler: (input: RouteInput<May, Params, Query, Body, Versioned>) => Promise<Result>;
  /** row -> JSON; also used to show the current row when somebody else saved first */
  present?: (result: Exclude<Result, Response>, actor: Actor) => unknown;
}

const safeMethods = ["GET", "HEAD", "OPTIONS"];

/**
 * Wrap a use case as a route handler. Everything that all routes owe their callers happens here, in this order:
 * request id and log line, authentication, cross-site check, authorisation, parsing, idempotency, the work, the entity
 * tag, and problem details for whatever went wrong.
 */
export function withRoute<
  const May extends Access,
  Result,
  Params extends z.ZodType = Nothing,
  Query extends z.ZodType = Nothing,
  Body extends z.ZodType = Nothing,
  const Versioned extends boolean = false,
>(
  route: Route<May, Params, Query, Body, Versioned, Result>,
): (request: NextRequest, context: RouteContext) => Promise<Response> {
  return async (request, context) => {
    const requestId = requestIdOf(request);
    const instance = request.nextUrl.pathname;
    const requestLog = log.child({ requestId, method: request.method, path: instance });
    const started = performance.now();
    let actor: Actor | null = null;
    const present = (result: unknown): unknown =>
      route.present && actor ? route.present(result as Exclude<Result, Response>, actor) : result;

    async function respond(): Promise<Response> {
      actor = await actorOfRequest(request);
      if (actor) actor.requestId = requestId;
      if (!safeMethods.includes(request.method)) assertSameSite(request);
      if (route.may !== "public") {
        if (!actor) throw new RequestError("unauthenticated", "Sign in first.");
        authorise(actor, route.may);
      }
      const input = {
        actor,
        params: await parseParams(route.params, context),
        query: route.query ? parsed(route.query, searchOf(request), "query") : undefined,
        body: undefined as unknown,
        expectedVersion: route.versioned ? expectedVersionOf(request) : undefined,
        request,
        log: requestLog,
      };
      const rawBody = route.body ? await readJson(request) : undefined;
      if (route.body) input.body = parsed(route.body, rawBody, "body");

      const work = async (): Promise<Answer | Response> => {
        const result = await route.handler(
          input as RouteInput<May, Params, Query, Body, Versioned>,
        );
        if (result instanceof Response) return result;
        if (result === undefined) return { status: 204, response: null, etag: null };
        const response = present(result);
        return { status: route.status ?? 200, response, etag: entityTagOf(response) };
      };

      const key = request.headers.get("idempotency-key");
      if (request.method !== "POST" || key === null || !actor) return finish(await work());
      if (route.answersOnce) {
        throw new RequestError(
          "no_idempotency",
          "This answer is given once; send no Idempotency-Key.",
        );
      }
      const whole = JSON.stringify([instance, request.nextUrl.search, rawBody]);
      return finish(await once(actor, key, whole, async () => remembered(await work())));
    }

    function finish(answer: Answer | Response): Response {
      if (answer instanceof Response) {
        answer.headers.set("x-request-id", requestId);
        return answer;
      }
      const headers = new Headers({ "cache-control": "no-store", "x-request-id": requestId });
      if (answer.etag !== null) headers.set("etag", answer.etag);
      return answer.status === 204
        ? new Response(null, { status: 204, headers })
        : Response.json(answer.response, { status: answer.status, headers });
    }

    let response: Response;
    try {
      response = await respond();
    } catch (error) {
      response = problemResponse(error, { instance, requestId, present });
      // Work that ends because its caller went away is no failure, and nobody reads the answer.
      if (response.status >= 500 && !request.signal.aborted)
        requestLog.error({ err: error }, "request failed");
    }
    requestLog.info(
      {
        status: response.status,
        ms: Math.round(performance.now() - started),
        actorId: (actor as Actor | null)?.id,
      },
      "request",
    );
    return response;
  };
}

/** The caller's own number if it is a sensible one, so that a request can be followed through a proxy's log as well. */
function requestIdOf(request: NextRequest): string {
  const given = request.headers.get("x-request-id");
  return given !== null && /^[\w-]{8,64}$/.test(given) ? given : randomUUID();
}

/** An address that cannot be one (an id that is no id) is an address where nothing is. */
async function parseParams(schema: z.ZodType | undefined, context: RouteContext): Promise<unknown> {
  if (!schema) return undefined;
  const result = schema.safeParse(await context.params);
  if (!result.success) throw new NotFoundError("address");
  return result.data;
}

function entityTagOf(response: unknown): string | null {
  return typeof response === "object" &&
    response !== null &&
    "version" in response &&
    typeof response.version === "number"
    ? `"${response.version}"`
    : null;
}

function remembered(answer: Answer | Response): Answer {
  if (answer instanceof Response) {
    throw new Error("A route that answers with a file cannot be made idempotent by a key.");
  }
  return answer;
}
