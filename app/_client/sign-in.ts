import { signIn } from "next-auth/react";

/** Why signing in did not work. */
export type SignInFault = "refused" | "too_many" | "unavailable";

export const signInWords: Record<SignInFault, { title: string; children: string }> = {
  refused: {
    title: "That e-mail address and password do not belong together.",
    children: "Or the account is not active. Check both and try again.",
  },
  too_many: {
    title: "Too many attempts.",
    children:
      "Wait a quarter of an hour and try again, or ask an administrator for a new password.",
  },
  unavailable: {
    title: "We could not check your password just now.",
    children: "Nothing is wrong with your account. Try again in a minute.",
  },
};

/**
 * Signs in on this device.
 *
 * @returns null when it worked
 */
export async function signInHere(email: string, password: string): Promise<SignInFault | null> {
  try {
    const answer = await signIn("credentials", { email, password, redirect: false });
    if (answer?.ok && !answer.error) return null;
    if (answer?.error === "TooManyAttempts") return "too_many";
    return answer?.error === "CredentialsSignin" ? "refused" : "unavailable";
  } catch {
    // The request itself failed: no network, or a server that is starting again.
    return "unavailable";
  }
}
