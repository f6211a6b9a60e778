import "server-only";
import { getToken } from "next-auth/jwt";
import { cookies, headers } from "next/headers";
import { NextRequest } from "next/server";
import { forbidden, redirect } from "next/navigation";
import { cache } from "react";
import { env } from "@/services/env";
import { can, type Action, type Actor } from "@/services/policy";
import { findActor, findActorByToken } from "@/services/sessions";
import { RequestError } from "./request-errors";

async function actorOfCookie(request: NextRequest): Promise<Actor | null> {
  const token = await getToken({ req: request, secret: env().NEXTAUTH_SECRET });
  if (!token?.sub || token.sessionEpoch === undefined) return null;
  return findActor({ userId: token.sub, sessionEpoch: token.sessionEpoch });
}

/**
 * Who sent this request, read from the database.
 *
 * @returns null when the request carries neither a cookie nor a token that stands for an active person
 * @throws {RequestError} when it carries a bearer token that is not good: a program should hear about it
 */
export async function actorOfRequest(request: NextRequest): Promise<Actor | null> {
  const authorization = request.headers.get("authorization");
  if (authorization === null) return actorOfCookie(request);
  const token = /^Bearer (dwl_[\w-]+)$/.exec(authorization)?.[1];
  const actor = token ? await findActorByToken(token) : null;
  if (!actor) throw new RequestError("unauthenticated", "This API token is not valid.");
  return actor;
}

/** Who is looking at the page that is being rendered, or null. */
export const currentActor = cache(async (): Promise<Actor | null> => {
  const cookie = (await cookies()).toString();
  return actorOfCookie(new NextRequest(env().NEXTAUTH_URL, { headers: { cookie } }));
});

/** Where proxy.ts says which page was asked for, so that signing in can lead back to it. */
export const pageHeader = "x-dewledger-page";

/**
 * The same for a page that takes a signed-in person; others are sent to sign in, and come back here afterwards.
 *
 * @param action  what the page is for; a person whose role lacks it is answered 403
 */
export async function requireActor(action?: Action): Promise<Actor> {
  const actor = await currentActor();
  if (!actor) {
    const page = (await headers()).get(pageHeader);
    redirect(page ? `/sign-in?callbackUrl=${encodeURIComponent(page)}` : "/sign-in");
  }
  if (action && !can(actor, action)) forbidden();
  return actor;
}
