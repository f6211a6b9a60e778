/** What can be wrong with a request before any use case sees it. problem.ts gives each its status. */
export type RequestFault =
  | "unauthenticated"
  | "cross_site"
  | "version_required"
  | "not_json"
  | "malformed_json"
  | "too_large"
  | "invalid_query"
  | "malformed_form"
  | "unsupported_media_type"
  | "no_idempotency";

export class RequestError extends Error {
  override readonly name = "RequestError";

  constructor(
    readonly fault: RequestFault,
    message: string,
    readonly problems: { pointer: string; detail: string }[] = [],
  ) {
    super(message);
  }
}
