import { hash, verify } from "@node-rs/argon2";
import { InvalidInputError } from "./errors";

/** argon2id with 19 MiB, two passes and one lane: the parameters OWASP's Password Storage Cheat Sheet gives. */
const parameters = { algorithm: 2, memoryCost: 19_456, timeCost: 2, parallelism: 1 } as const;

const shortestPassword = 12;
const longestPassword = 200;

/** @throws {InvalidInputError} when the password is shorter than 12 characters or longer than 200 */
export async function hashPassword(password: string): Promise<string> {
  if (password.length < shortestPassword || password.length > longestPassword) {
    throw new InvalidInputError([
      {
        pointer: "#/password",
        detail: `must have between ${shortestPassword} and ${longestPassword} characters`,
      },
    ]);
  }
  return hash(password, parameters);
}

let decoy: Promise<string> | undefined;

/**
 * Whether the password is the one behind the hash. With no hash (no such person) a decoy is checked all the same, so
 * that the time taken does not tell who has an account.
 */
export async function verifyPassword(
  password: string,
  passwordHash: string | null,
): Promise<boolean> {
  decoy ??= hash("there is nobody here", parameters);
  const matches = await verify(passwordHash ?? (await decoy), password.slice(0, longestPassword));
  return matches && passwordHash !== null;
}
