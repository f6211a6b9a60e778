import { getToken } from "next-auth/jwt";
import { NextResponse, type NextRequest } from "next/server";

/**
 * Send visitors without a cookie to the sign-in page. A courtesy, never the lock: whether the cookie still stands for
 * somebody, and what they may do, is decided on every request by app/_server.
 */
export async function proxy(request: NextRequest): Promise<NextResponse> {
  const wanted = request.nextUrl.pathname + request.nextUrl.search;
  if (await getToken({ req: request })) {
    // A page cannot read its own address on the server; session.ts needs it when the cookie stands for nobody any more.
    const headers = new Headers(request.headers);
    headers.set("x-dewledger-page", wanted);
    return NextResponse.next({ request: { headers } });
  }
  const signIn = new URL("/sign-in", request.nextUrl);
  if (wanted !== "/") signIn.searchParams.set("callbackUrl", wanted);
  return NextResponse.redirect(signIn);
}

export const config = {
  /** pages only: not the API, the public pages, Next's own files, or anything with a file extension */
  matcher: ["/((?!api/|sign-in|setup|_next/|.*\\.[\\w]+$).*)"],
};
