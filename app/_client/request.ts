import type { z } from "zod";

/** Where an input is wrong (a JSON pointer into the request's body) and what to do about it. */
export interface ProblemAt {
  pointer: string;
  detail: string;
}

/** An answer that is no success, as RFC 9457 problem details describe it. */
export class ProblemError extends Error {
  override readonly name = "ProblemError";

  constructor(
    readonly status: number,
    readonly code: string,
    detail: string,
    readonly errors: ProblemAt[] = [],
    /** the row as it is now, when somebody else saved first (412) */
    readonly current: unknown = undefined,
    readonly requestId: string | undefined = undefined,
    /** of what is in the way already, when it has an address (409) */
    readonly existingId: string | undefined = undefined,
  ) {
    super(detail);
  }
}

/** The row as it is now, when somebody else saved first; null for any other error. */
export function currentRow<Row>(error: unknown, schema: z.ZodType<Row>): Row | null {
  if (!(error instanceof ProblemError) || error.status !== 412) return null;
  const parsed = schema.safeParse(error.current);
  return parsed.success ? parsed.data : null;
}

export interface RequestOptions<Schema extends z.ZodType> {
  method?: "GET" | "POST" | "PATCH" | "PUT" | "DELETE";
  /** sent as JSON, or as it is when it is a form */
  body?: unknown;
  /** version of the row that is being changed, sent as If-Match */
  version?: number;
  /** makes a repeated POST harmless */
  idempotencyKey?: string;
  signal?: AbortSignal;
  /** what the answer is; without it the answer is ignored */
  schema: Schema;
}

/**
 * Calls our API and checks that it answers what it says.
 *
 * @throws {ProblemError} with the server's own words, or with code `unreachable` when there was no answer
 */
export async function request<Schema extends z.ZodType>(
  path: string,
  { method = "GET", body, version, idempotencyKey, signal, schema }: RequestOptions<Schema>,
): Promise<z.output<Schema>> {
  // The browser names a form's type itself, with the boundary it chose.
  const isForm = body instanceof FormData;
  let response: Response;
  try {
    response = await fetch(path, {
      method,
      signal,
      headers: {
        accept: "application/json",
        ...(body !== undefined && !isForm && { "content-type": "application/json" }),
        ...(version !== undefined && { "if-match": `"${version}"` }),
        ...(idempotencyKey !== undefined && { "idempotency-key": idempotencyKey }),
      },
      body: body === undefined || isForm ? body : JSON.stringify(body),
    });
  } catch (error) {
    if (signal?.aborted) throw error;
    throw new ProblemError(0, "unreachable", "The server did not answer. Check the connection.");
  }
  if (!response.ok) throw await problemOf(response);
  const json: unknown = response.status === 204 ? undefined : await response.json();
  const parsed = schema.safeParse(json);
  if (!parsed.success) {
    throw new ProblemError(
      response.status,
      "unexpected_answer",
      `The server answered ${path} in a form this page does not know. Reload the page.`,
      parsed.error.issues.map((issue) => ({
        pointer: `#/${issue.path.join("/")}`,
        detail: issue.message,
      })),
    );
  }
  return parsed.data;
}

async function problemOf(response: Response): Promise<ProblemError> {
  const requestId = response.headers.get("x-request-id") ?? undefined;
  const text = await response.text();
  if (!/json/.test(response.headers.get("content-type") ?? "")) {
    return new ProblemError(
      response.status,
      "no_details",
      `The server answered ${response.status}.`,
      [],
      undefined,
      requestId,
    );
  }
  const problem = JSON.parse(text) as {
    code?: string;
    detail?: string;
    errors?: ProblemAt[];
    current?: unknown;
    existingId?: string;
  };
  return new ProblemError(
    response.status,
    problem.code ?? "unknown",
    problem.detail ?? `The server answered ${response.status}.`,
    problem.errors ?? [],
    problem.current,
    requestId,
    problem.existingId,
  );
}

/** What to tell a person about any error of a query or a mutation. */
export function errorWords(error: unknown): string {
  if (error instanceof ProblemError) {
    const first = error.errors[0]?.detail;
    return first && error.status === 422 && error.errors.length === 1 ? first : error.message;
  }
  return error instanceof Error ? error.message : "Something went wrong.";
}
