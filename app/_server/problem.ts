import "server-only";
import { ConvergenceError, DomainError } from "@/analytics/errors";
import {
  ConflictError,
  ForbiddenError,
  InvalidInputError,
  NotFoundError,
  ServiceBusyError,
  StaleVersionError,
  TooManyRequestsError,
  toPointer,
} from "@/services/errors";
import type { InputProblem } from "@/services/errors";
import { RequestError, type RequestFault } from "./request-errors";

/** Problem details as RFC 9457 has them, with a stable code, and pointers for a form to put messages at its fields. */
export interface Problem {
  type: "about:blank";
  title: string;
  status: number;
  detail: string;
  instance: string;
  code: string;
  requestId: string;
  errors?: InputProblem[];
  /** of a stale write: the version the request was about, and the row as it is now */
  expectedVersion?: number;
  current?: unknown;
  /** of a conflict: what is in the way already */
  existingId?: string;
}

interface Origin {
  instance: string;
  requestId: string;
  /** turns a row into what the route would answer with */
  present: (row: { version: number }) => unknown;
}

const titles: Record<number, string> = {
  400: "Bad Request",
  401: "Unauthorized",
  403: "Forbidden",
  404: "Not Found",
  409: "Conflict",
  412: "Precondition Failed",
  413: "Content Too Large",
  415: "Unsupported Media Type",
  422: "Unprocessable Content",
  428: "Precondition Required",
  429: "Too Many Requests",
  500: "Internal Server Error",
  503: "Service Unavailable",
};

const faultStatus: Record<RequestFault, number> = {
  unauthenticated: 401,
  cross_site: 403,
  version_required: 428,
  not_json: 415,
  malformed_json: 400,
  too_large: 413,
  invalid_query: 400,
  malformed_form: 400,
  unsupported_media_type: 415,
  no_idempotency: 400,
};

type Description = Pick<
  Problem,
  "status" | "code" | "detail" | "errors" | "expectedVersion" | "current" | "existingId"
>;

function describe(error: unknown, origin: Origin): Description {
  if (error instanceof RequestError) {
    return {
      status: faultStatus[error.fault],
      code: error.fault,
      detail: error.message,
      ...(error.problems.length > 0 && { errors: error.problems }),
    };
  }
  if (error instanceof InvalidInputError) {
    return { status: 422, code: "invalid_input", detail: error.message, errors: error.problems };
  }
  if (error instanceof DomainError) {
    const pointer = toPointer(error.details.input);
    return {
      status: 422,
      code: "impossible_value",
      detail: error.message,
      errors: [{ pointer, detail: error.message }],
    };
  }
  if (error instanceof ConvergenceError) {
    return { status: 422, code: "no_convergence", detail: error.message };
  }
  if (error instanceof NotFoundError) {
    return { status: 404, code: "not_found", detail: error.message };
  }
  if (error instanceof ForbiddenError) {
    return { status: 403, code: error.code, detail: error.message };
  }
  if (error instanceof ConflictError) {
    const { code, message, existingId } = error;
    return { status: 409, code, detail: message, ...(existingId && { existingId }) };
  }
  if (error instanceof StaleVersionError) {
    return {
      status: 412,
      code: "stale_version",
      detail: error.message,
      expectedVersion: error.expectedVersion,
      current: origin.present(error.current),
    };
  }
  if (error instanceof TooManyRequestsError) {
    return { status: 429, code: "too_many_requests", detail: error.message };
  }
  if (error instanceof ServiceBusyError) {
    return { status: 503, code: "busy", detail: error.message };
  }
  return {
    status: 500,
    code: "internal",
    detail: "Something went wrong here. The request number helps us find out what.",
  };
}

/** The one place where an error becomes a status. What nobody foresaw becomes a plain 500 without its message. */
export function problemResponse(error: unknown, origin: Origin): Response {
  const description = describe(error, origin);
  const problem: Problem = {
    type: "about:blank",
    title: titles[description.status],
    instance: origin.instance,
    requestId: origin.requestId,
    ...description,
  };
  const headers = new Headers({
    "content-type": "application/problem+json",
    "cache-control": "no-store",
    "x-request-id": origin.requestId,
  });
  if (description.status === 401) headers.set("www-authenticate", 'Bearer realm="Dewledger"');
  if (error instanceof TooManyRequestsError || error instanceof ServiceBusyError) {
    headers.set("retry-after", String(error.retryAfterSeconds));
  }
  return new Response(JSON.stringify(problem), { status: description.status, headers });
}
