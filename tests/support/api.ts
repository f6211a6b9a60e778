import { demoPassword, demoPeople } from "@/seeders/demo/people";
import type { Role } from "@/services/policy";
import { testEnvironment } from "./environment";

export { demoPassword };

/** The e-mail addresses of the demo's people, by role: one of each. */
export const people = Object.fromEntries(
  demoPeople.map(({ role, email }) => [role, email]),
) as Record<Role, string>;

/** An answer of the API. `body` is the parsed JSON, or the text when it is something else. */
export interface ApiAnswer<Body> {
  status: number;
  headers: Headers;
  body: Body;
}

interface RequestOptions {
  headers?: Record<string, string>;
}

/**
 * A caller of the HTTP API with a cookie jar of its own. Paths are taken from the product's root,
 * as in `/api/v1/fields`; bodies are sent as JSON unless they are text, a form or bytes.
 */
export class ApiClient {
  readonly #cookies = new Map<string, string>();

  get<Body = unknown>(path: string, options?: RequestOptions): Promise<ApiAnswer<Body>> {
    return this.send("GET", path, undefined, options);
  }

  post<Body = unknown>(
    path: string,
    body?: unknown,
    options?: RequestOptions,
  ): Promise<ApiAnswer<Body>> {
    return this.send("POST", path, body, options);
  }

  put<Body = unknown>(
    path: string,
    body?: unknown,
    options?: RequestOptions,
  ): Promise<ApiAnswer<Body>> {
    return this.send("PUT", path, body, options);
  }

  patch<Body = unknown>(
    path: string,
    body?: unknown,
    options?: RequestOptions,
  ): Promise<ApiAnswer<Body>> {
    return this.send("PATCH", path, body, options);
  }

  delete<Body = unknown>(path: string, options?: RequestOptions): Promise<ApiAnswer<Body>> {
    return this.send("DELETE", path, undefined, options);
  }

  /** Send a request as it is; redirects are answers, not followed. */
  async send<Body = unknown>(
    method: string,
    path: string,
    body?: unknown,
    { headers = {} }: RequestOptions = {},
  ): Promise<ApiAnswer<Body>> {
    const asIs =
      typeof body === "string" ||
      body instanceof FormData ||
      body instanceof URLSearchParams ||
      body instanceof Uint8Array;
    const cookie = [...this.#cookies].map(([name, value]) => `${name}=${value}`).join("; ");
    const response = await fetch(`${testEnvironment.baseUrl}${path}`, {
      method,
      redirect: "manual",
      headers: {
        Accept: "application/json",
        // A browser sends it with every request that changes something.
        Origin: testEnvironment.baseUrl,
        ...(body === undefined || asIs ? {} : { "Content-Type": "application/json" }),
        ...(cookie === "" ? {} : { Cookie: cookie }),
        ...headers,
      },
      ...(body === undefined ? {} : { body: asIs ? (body as BodyInit) : JSON.stringify(body) }),
    });
    this.#keepCookies(response.headers);
    const text = await response.text();
    const isJson = /[/+]json/.test(response.headers.get("content-type") ?? "");
    return {
      status: response.status,
      headers: response.headers,
      body: (isJson && text !== "" ? JSON.parse(text) : text) as Body,
    };
  }

  /** The cookies of this caller, as a browser context takes them. */
  cookies(): { name: string; value: string; url: string }[] {
    return [...this.#cookies].map(([name, value]) => ({
      name,
      value,
      url: testEnvironment.baseUrl,
    }));
  }

  #keepCookies(headers: Headers): void {
    for (const line of headers.getSetCookie()) {
      const [pair, ...attributes] = line.split(";");
      const name = pair.slice(0, pair.indexOf("=")).trim();
      const expires = attributes
        .map((attribute) => /^\s*expires=(.*)$/i.exec(attribute)?.[1])
        .find((value) => value !== undefined);
      const isGone = expires !== undefined && Date.parse(expires) < Date.now();
      if (isGone) this.#cookies.delete(name);
      else this.#cookies.set(name, pair.slice(pair.indexOf("=") + 1));
    }
  }
}

/** A caller who is nobody. */
export function visitor(): ApiClient {
  return new ApiClient();
}

/**
 * Sign in with an e-mail address and a password, as the sign-in form does.
 *
 * @throws when the product refuses
 */
export async function signInWith(email: string, password: string): Promise<ApiClient> {
  const client = new ApiClient();
  const { body } = await client.get<{ csrfToken: string }>("/api/auth/csrf");
  const form = new URLSearchParams({
    csrfToken: body.csrfToken,
    email,
    password,
    callbackUrl: testEnvironment.baseUrl,
    json: "true",
  });
  const answer = await client.post("/api/auth/callback/credentials", form);
  const session = await client.get<{ user?: unknown }>("/api/auth/session");
  if (session.body?.user === undefined) {
    throw new Error(
      `${email} could not sign in: ${answer.status} ${JSON.stringify(answer.body)} ${answer.headers.get("location") ?? ""}`,
    );
  }
  return client;
}

/** Sign in as the demo's person of a role. */
export function signIn(role: Role): Promise<ApiClient> {
  return signInWith(people[role], demoPassword);
}
