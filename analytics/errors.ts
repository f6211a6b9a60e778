/** A value that no reservoir, fluid or distribution can have. Carries the numbers, so the message can name them. */
export class DomainError extends Error {
  override readonly name = "DomainError";

  /**
   * @param message  what is impossible and why, in words a reservoir engineer would use
   * @param details  the name of the argument (a path such as `stages.0.gasGravity` for a nested one) and its value
   */
  constructor(
    message: string,
    readonly details: { input?: string; value?: number; [key: string]: unknown } = {},
  ) {
    super(message);
  }
}

/**
 * Runs a check of a part; the errors it throws name their input from the whole's point of view: `minimum` of the part
 * `uncertain.porosity` becomes `uncertain.porosity.minimum`.
 */
export function underPath<Result>(path: string, check: () => Result): Result {
  try {
    return check();
  } catch (error) {
    if (!(error instanceof DomainError)) throw error;
    const { input } = error.details;
    throw new DomainError(error.message, {
      ...error.details,
      input: input ? `${path}.${input}` : path,
    });
  }
}

/** An iteration that did not reach its tolerance. The caller never receives the last iterate as if it were an answer. */
export class ConvergenceError extends Error {
  override readonly name = "ConvergenceError";

  constructor(
    message: string,
    readonly details: Record<string, unknown> = {},
  ) {
    super(message);
  }
}
