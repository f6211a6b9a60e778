import { DomainError } from "@/analytics/errors";

/** Where an input is wrong: a JSON pointer into the request body (RFC 6901, `#/path/0/name`) and what to do about it. */
export interface InputProblem {
  pointer: string;
  detail: string;
}

/** What was asked for does not exist, or not for this person. */
export class NotFoundError extends Error {
  override readonly name = "NotFoundError";

  /** @param what  the thing in the words of the screen: "field", "estimate" */
  constructor(readonly what: string) {
    super(`There is no such ${what}.`);
  }
}

/** The request is sound, but not in the state things are in: a taken name, a decided estimate. */
export class ConflictError extends Error {
  override readonly name = "ConflictError";

  /**
   * @param code  stable, for programs; the message is for people
   * @param existingId  of what is in the way, when it has an address
   */
  constructor(
    message: string,
    readonly code: string = "conflict",
    readonly existingId?: string,
  ) {
    super(message);
  }
}

/** A known person asked for something that is not theirs to do. */
export class ForbiddenError extends Error {
  override readonly name = "ForbiddenError";

  constructor(
    message: string,
    readonly code: string = "forbidden",
  ) {
    super(message);
  }
}

/** Input that reads well but cannot be: says which part and why. */
export class InvalidInputError extends Error {
  override readonly name = "InvalidInputError";

  constructor(readonly problems: InputProblem[]) {
    super(
      problems.length === 1
        ? "One field needs attention."
        : `${problems.length} fields need attention.`,
    );
  }
}

/** Somebody else saved first. Carries the row as it is now, so that nothing has to be lost. */
export class StaleVersionError extends Error {
  override readonly name = "StaleVersionError";

  constructor(
    readonly expectedVersion: number,
    readonly current: { version: number },
  ) {
    super("Somebody else changed this after you opened it.");
  }
}

/** Too many attempts; the person may try again after `retryAfterSeconds`. */
export class TooManyRequestsError extends Error {
  override readonly name = "TooManyRequestsError";

  constructor(readonly retryAfterSeconds: number) {
    super("Too many attempts. Wait a few minutes and try again.");
  }
}

/** More is being calculated than there is room for; it passes, and the same request may be sent again. */
export class ServiceBusyError extends Error {
  override readonly name = "ServiceBusyError";
  readonly retryAfterSeconds = 5;

  constructor() {
    super("Too many calculations are waiting. Try again in a few seconds.");
  }
}

/** `uncertain.porosity` of an engine message -> `#/inputs/uncertain/porosity` of the request it came in. */
export function toPointer(path: string | undefined, under = ""): string {
  const parts = [under, path ?? ""].filter((part) => part !== "").join(".");
  return parts === "" ? "#" : `#/${parts.split(".").join("/")}`;
}

/**
 * Run a piece of analytics on what a person sent; if it is impossible, say where in the request.
 *
 * @param under  the property of the request body that was handed to the engine
 */
export function refuseImpossible<Result>(under: string, calculate: () => Result): Result {
  try {
    return calculate();
  } catch (error) {
    if (!(error instanceof DomainError)) throw error;
    throw new InvalidInputError([
      { pointer: toPointer(error.details.input, under), detail: error.message },
    ]);
  }
}
