import "server-only";
import type { NextAuthOptions } from "next-auth";
import CredentialsProvider from "next-auth/providers/credentials";
import { z } from "zod";
import { env } from "@/services/env";
import { TooManyRequestsError } from "@/services/errors";
import { log } from "@/services/log";
import { signIn } from "@/services/sessions";
import { networkAddressOf } from "./network-address";

const credentialsSchema = z.object({
  email: z.string().min(1).max(320),
  password: z.string().min(1).max(1000),
});

/** A function, because settings are read when the first request needs them and not when the build loads this file. */
export function authOptions(): NextAuthOptions {
  return {
    secret: env().NEXTAUTH_SECRET,
    session: { strategy: "jwt", maxAge: 12 * 3600 },
    pages: { signIn: "/sign-in", error: "/sign-in" },
    providers: [
      CredentialsProvider({
        name: "E-mail and password",
        credentials: {
          email: { label: "E-mail", type: "email" },
          password: { label: "Password", type: "password" },
        },
        async authorize(given, request) {
          const credentials = credentialsSchema.safeParse(given);
          if (!credentials.success) return null;
          try {
            const { email, password } = credentials.data;
            const claim = await signIn(
              email,
              password,
              networkAddressOf(request.headers?.["x-forwarded-for"]),
            );
            return claim && { id: claim.userId, ...claim };
          } catch (error) {
            // next-auth hands the message of an error to the sign-in page as `?error=`.
            if (error instanceof TooManyRequestsError) throw new Error("TooManyAttempts");
            log.error({ err: error }, "sign-in failed");
            throw new Error("Unavailable");
          }
        },
      }),
    ],
    callbacks: {
      /** The cookie names a person and an epoch, nothing that could go stale. */
      jwt({ token, user }) {
        return user ? { sub: user.id, sessionEpoch: user.sessionEpoch } : token;
      },
      session({ session, token }) {
        return { expires: session.expires, user: { id: token.sub ?? "" } };
      },
    },
  };
}
