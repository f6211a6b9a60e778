import { createHash } from "node:crypto";
import {
  countSignInFailure,
  forgetSignInFailures,
  listSignInFailures,
} from "@/models/queries/sign-in-failures";
import { now } from "./clock";
import { TooManyRequestsError } from "./errors";

interface Attempt {
  /** in lower case */
  email: string;
  networkAddress: string;
}

const windowMilliseconds = 15 * 60_000;

/**
 * Failures allowed in a window. One person mistyping meets the first; guessing one account from many addresses the
 * second; trying many accounts from one address the third.
 */
const limits = { pair: 10, email: 50, network: 100 } as const;

function digest(kind: keyof typeof limits, value: string): string {
  return `${kind}:${createHash("sha256").update(value).digest("hex")}`;
}

function subjectsOf({ email, networkAddress }: Attempt): Record<keyof typeof limits, string> {
  return {
    pair: digest("pair", `${email}\n${networkAddress}`),
    email: digest("email", email),
    network: digest("network", networkAddress),
  };
}

function windowFrom(): Date {
  return new Date(now().getTime() - windowMilliseconds);
}

/** @throws {TooManyRequestsError} when a limit is reached */
export async function assertMayTry(attempt: Attempt): Promise<void> {
  const subjects = subjectsOf(attempt);
  for (const found of await listSignInFailures(Object.values(subjects), windowFrom())) {
    const kind = found.subject.split(":")[0] as keyof typeof limits;
    if (found.failures >= limits[kind]) {
      const elapsed = now().getTime() - found.windowStartedAt.getTime();
      throw new TooManyRequestsError(Math.ceil((windowMilliseconds - elapsed) / 1000));
    }
  }
}

export async function countFailure(attempt: Attempt): Promise<void> {
  for (const subject of Object.values(subjectsOf(attempt))) {
    await countSignInFailure(subject, now(), windowFrom());
  }
}

/** A success clears the person's own count; the address's count stands, or one good account would hide many bad tries. */
export async function clearFailures(attempt: Attempt): Promise<void> {
  const { pair, email } = subjectsOf(attempt);
  await forgetSignInFailures([pair, email], windowFrom());
}
