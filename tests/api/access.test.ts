import { describe, expect, it } from "vitest";
import type { Problem } from "@/app/_server/problem";
import type { NewApiTokenView } from "@/app/api/v1/api-tokens/schema";
import type { BasinView } from "@/app/api/v1/basins/schema";
import type { SessionView } from "@/app/api/v1/session/schema";
import type { Role } from "@/services/policy";
import type { UserView } from "@/app/api/v1/users/schema";
import { as, ifMatch, made, uniqueName } from "../factories";
import { signIn, signInWith, visitor, type ApiClient } from "../support/api";
import { queryRows } from "../support/database";

const password = "a-long-enough-secret";

async function buildUser(role: Role): Promise<{ user: UserView; client: ApiClient }> {
  const administrator = await as("administrator");
  const email = `${uniqueName("person").replace(" ", "-")}@quillmere.example`;
  const body = { email, name: "Wynne Harrowby", password, role };
  const user = made(await administrator.post<UserView>("/api/v1/users", body));
  return { user, client: await signInWith(email, password) };
}

describe("GET /api/v1/session", () => {
  it("says who is signed in and what their role allows", async () => {
    const { body } = await (await as("planner")).get<SessionView>("/api/v1/session");
    expect(body).toMatchObject({ role: "planner", email: "marit.sundeholt@quillmere.example" });
    expect(body.can).toContain("priceDeck.publish");
    expect(body.can).not.toContain("estimate.approve");
  });

  it("answers 401 with problem details to a visitor", async () => {
    const answer = await visitor().get<Problem>("/api/v1/session");
    expect(answer.status).toBe(401);
    expect(answer.headers.get("content-type")).toBe("application/problem+json");
    expect(answer.headers.get("www-authenticate")).toMatch(/^Bearer/);
    expect(answer.body).toMatchObject({
      type: "about:blank",
      title: "Unauthorized",
      status: 401,
      code: "unauthenticated",
      instance: "/api/v1/session",
      requestId: answer.headers.get("x-request-id"),
    });
  });
});

describe("a session", () => {
  it("has the new role on the next request after a change", async () => {
    const { user, client } = await buildUser("engineer");
    const refused = await client.get("/api/v1/audit-events");
    expect(refused.status).toBe(403);
    const path = `/api/v1/users/${user.id}`;
    const patch = { role: "administrator" };
    made(await (await as("administrator")).patch(path, patch, ifMatch(user)));
    expect((await client.get("/api/v1/audit-events")).status).toBe(200);
  });

  it("ends on the next request after its person is made inactive", async () => {
    const { user, client } = await buildUser("reviewer");
    expect((await client.get("/api/v1/session")).status).toBe(200);
    const path = `/api/v1/users/${user.id}`;
    made(await (await as("administrator")).patch(path, { active: false }, ifMatch(user)));
    expect((await client.get("/api/v1/session")).status).toBe(401);
  });

  it("ends everywhere when its person says so, and stays ended", async () => {
    const { user, client } = await buildUser("executive");
    const elsewhere = await signInWith(user.email, password);
    expect((await elsewhere.delete("/api/v1/session")).status).toBe(204);
    expect((await client.get("/api/v1/session")).status).toBe(401);
    expect((await elsewhere.get("/api/v1/session")).status).toBe(401);
    const again = await signInWith(user.email, password);
    expect((await again.get("/api/v1/session")).status).toBe(200);
  });

  it("ends when the password is replaced", async () => {
    const { user, client } = await buildUser("engineer");
    const patch = { password: "another-long-secret" };
    const path = `/api/v1/users/${user.id}`;
    made(await (await as("administrator")).patch(path, patch, ifMatch(user)));
    expect((await client.get("/api/v1/session")).status).toBe(401);
  });
});

describe("POST /api/auth/callback/credentials", () => {
  async function attempt(email: string, secret: string): Promise<string> {
    const client = visitor();
    const { body } = await client.get<{ csrfToken: string }>("/api/auth/csrf");
    const form = new URLSearchParams({
      csrfToken: body.csrfToken,
      email,
      password: secret,
      json: "true",
    });
    const answer = await client.post<{ url: string }>("/api/auth/callback/credentials", form);
    return new URL(answer.body.url).searchParams.get("error") ?? "";
  }

  it("says the same to a wrong password as to an unknown address", async () => {
    const { user } = await buildUser("executive");
    const unknown = await attempt("nobody@quillmere.example", password);
    expect(await attempt(user.email, "not-the-password")).toBe(unknown);
    expect(unknown).toBe("CredentialsSignin");
  });

  it("takes an address in any capitals", async () => {
    const { user } = await buildUser("executive");
    const client = await signInWith(user.email.toUpperCase(), password);
    expect((await client.get("/api/v1/session")).status).toBe(200);
  });

  it("stops an eleventh try after ten failures, even with the right password", async () => {
    const { user } = await buildUser("executive");
    for (let failure = 0; failure < 10; failure += 1) await attempt(user.email, "not-this-one");
    expect(await attempt(user.email, password)).toBe("TooManyAttempts");
  });
});

describe("an API token", () => {
  async function buildToken(owner: ApiClient): Promise<NewApiTokenView> {
    return made(await owner.post<NewApiTokenView>("/api/v1/api-tokens", { name: "budget script" }));
  }
  const bearing = (token: string) => ({ headers: { Authorization: `Bearer ${token}` } });

  it("acts as its owner, without a cookie and without an Origin", async () => {
    const { token } = await buildToken(await as("planner"));
    const { body } = await visitor().get<SessionView>("/api/v1/session", bearing(token));
    expect(body.role).toBe("planner");
    const name = uniqueName("Basin");
    const headers = { Authorization: `Bearer ${token}`, Origin: "https://elsewhere.example" };
    expect((await visitor().post("/api/v1/basins", { name }, { headers })).status).toBe(201);
  });

  it("is shown once and stored as a digest only", async () => {
    const planner = await as("planner");
    const { id, token } = await buildToken(planner);
    const list = await planner.get("/api/v1/api-tokens");
    expect(JSON.stringify(list.body)).not.toContain(token);
    const rows = await queryRows<{ row: string }>(
      "select to_jsonb(api_tokens)::text as row from api_tokens where id = $1",
      [id],
    );
    expect(rows[0].row).not.toContain(token);
  });

  it("is never kept for a repetition: an Idempotency-Key is refused", async () => {
    const options = { headers: { "Idempotency-Key": uniqueName("key") } };
    const planner = await as("planner");
    const answer = await planner.post("/api/v1/api-tokens", { name: "script" }, options);
    expect(answer).toMatchObject({ status: 400, body: { code: "no_idempotency" } });
  });

  it("answers 401 once revoked, and when it never existed", async () => {
    const planner = await as("planner");
    const { id, token } = await buildToken(planner);
    expect((await planner.delete(`/api/v1/api-tokens/${id}`)).status).toBe(200);
    expect((await visitor().get("/api/v1/session", bearing(token))).status).toBe(401);
    expect((await visitor().get("/api/v1/session", bearing("dwl_made-up"))).status).toBe(401);
  });

  it("is nobody else's to revoke", async () => {
    const { id } = await buildToken(await as("planner"));
    expect((await (await as("engineer")).delete(`/api/v1/api-tokens/${id}`)).status).toBe(404);
  });

  it("loses its power with its owner's account", async () => {
    const { user, client } = await buildUser("planner");
    const { token } = await buildToken(client);
    const path = `/api/v1/users/${user.id}`;
    made(await (await as("administrator")).patch(path, { active: false }, ifMatch(user)));
    expect((await visitor().get("/api/v1/session", bearing(token))).status).toBe(401);
  });
});

describe("an API token of a person whose access is ended", () => {
  async function buildBearer(owner: ApiClient) {
    const body = { name: "budget script" };
    const { token } = made(await owner.post<NewApiTokenView>("/api/v1/api-tokens", body));
    const headers = { Authorization: `Bearer ${token}` };
    return async () => (await visitor().get("/api/v1/session", { headers })).status;
  }

  it("is revoked when they change their password", async () => {
    const { client } = await buildUser("engineer");
    const status = await buildBearer(client);
    expect(await status()).toBe(200);
    const body = { currentPassword: password, password: "another-long-secret" };
    expect((await client.post("/api/v1/session/password", body)).status).toBe(204);
    expect(await status()).toBe(401);
  });

  it("is revoked when an administrator replaces the password or signs them out, and the audit trail says so", async () => {
    for (const patch of [{ password: "another-long-secret" }, { signOutEverywhere: true }]) {
      const { user, client } = await buildUser("engineer");
      const status = await buildBearer(client);
      const path = `/api/v1/users/${user.id}`;
      made(await (await as("administrator")).patch(path, patch, ifMatch(user)));
      expect(await status()).toBe(401);
      const events = await queryRows<{ revoked: string }>(
        `select after->>'apiTokensRevoked' as revoked from audit_events
          where entity_id = $1 and action = 'user.updated'`,
        [user.id],
      );
      expect(events).toEqual([{ revoked: "1" }]);
    }
  });

  it("is revoked when they sign out everywhere", async () => {
    const { client } = await buildUser("planner");
    const status = await buildBearer(client);
    expect((await client.delete("/api/v1/session")).status).toBe(204);
    expect(await status()).toBe(401);
  });
});

describe("a write with a cookie", () => {
  const write = async (headers: Record<string, string>) =>
    (await signIn("planner")).post("/api/v1/basins", { name: uniqueName("Basin") }, { headers });

  it("answers 403 when a page of another site sent it", async () => {
    const answer = await write({ Origin: "https://elsewhere.example" });
    expect(answer).toMatchObject({ status: 403, body: { code: "cross_site" } });
    const marked = await write({ "Sec-Fetch-Site": "cross-site" });
    expect(marked).toMatchObject({ status: 403, body: { code: "cross_site" } });
    const sibling = await write({ "Sec-Fetch-Site": "same-site" });
    expect(sibling.status).toBe(403);
  });

  it("goes through from a page of this site", async () => {
    expect((await write({ "Sec-Fetch-Site": "same-origin" })).status).toBe(201);
    expect((await write({})).status).toBe(201);
  });
});

describe("a request body", () => {
  const post = async (body: unknown, headers?: Record<string, string>) =>
    (await as("planner")).post<Problem>("/api/v1/basins", body, { headers });

  it("answers 415 when it is not JSON", async () => {
    expect((await post("name=Basin")).status).toBe(415);
  });

  it("answers 400 when it is broken JSON", async () => {
    const answer = await post('{"name":', { "Content-Type": "application/json" });
    expect(answer).toMatchObject({ status: 400, body: { code: "malformed_json" } });
  });

  it("answers 413 beyond two mebibytes", async () => {
    const answer = await post({ name: "x".repeat(2 * 1024 * 1024) });
    expect(answer.status).toBe(413);
  });

  it("answers 422 with a pointer for each thing that is wrong", async () => {
    const answer = await post({ name: " ", colour: "blue" });
    expect(answer.status).toBe(422);
    expect(answer.body.errors?.map(({ pointer }) => pointer).sort()).toEqual(["#", "#/name"]);
    const told = answer.body.errors?.find(({ pointer }) => pointer === "#/name");
    expect(told?.detail).toBe("must not be empty");
  });
});

describe("an address", () => {
  it("answers 404 when its id is no id", async () => {
    const answer = await (await as("engineer")).get("/api/v1/estimates/not-an-id");
    expect(answer).toMatchObject({ status: 404, body: { code: "not_found" } });
  });

  it("answers 400 naming the parameter that cannot be used", async () => {
    const answer = await (await as("engineer")).get<Problem>("/api/v1/estimates?limit=1000");
    expect(answer.status).toBe(400);
    expect(answer.body.errors?.[0].pointer).toBe("?limit");
  });
});

describe("an Idempotency-Key", () => {
  const once = (key: string) => ({ headers: { "Idempotency-Key": key } });

  it("answers a repetition with the first answer and does nothing again", async () => {
    const planner = await as("planner");
    const key = uniqueName("key");
    const body = { name: uniqueName("Basin") };
    const first = await planner.post<BasinView>("/api/v1/basins", body, once(key));
    const second = await planner.post<BasinView>("/api/v1/basins", body, once(key));
    expect(first.status).toBe(201);
    expect(second.status).toBe(201);
    expect(second.body).toEqual(first.body);
    expect(second.headers.get("etag")).toBe(first.headers.get("etag"));
  });

  it("is refused for a different request", async () => {
    const planner = await as("planner");
    const key = uniqueName("key");
    await planner.post("/api/v1/basins", { name: uniqueName("Basin") }, once(key));
    const other = await planner.post("/api/v1/basins", { name: uniqueName("Basin") }, once(key));
    expect(other.status).toBe(422);
  });

  it("does not keep a failure", async () => {
    const planner = await as("planner");
    const key = uniqueName("key");
    const name = uniqueName("Basin");
    await planner.post("/api/v1/basins", { name });
    const taken = await planner.post("/api/v1/basins", { name }, once(key));
    expect(taken.status).toBe(409);
    const again = await planner.post("/api/v1/basins", { name }, once(key));
    expect(again.status).toBe(409);
  });

  it("does the work once when two arrive together", async () => {
    const planner = await as("planner");
    const key = uniqueName("key");
    const body = { name: uniqueName("Basin") };
    const answers = await Promise.all(
      [1, 2, 3].map(() => planner.post("/api/v1/basins", body, once(key))),
    );
    const statuses = answers.map(({ status }) => status);
    expect(statuses).toContain(201);
    expect(statuses.every((status) => status === 201 || status === 409)).toBe(true);
    const rows = await queryRows("select 1 from basins where name = $1", [body.name]);
    expect(rows).toHaveLength(1);
  });
});

describe("POST /api/v1/setup", () => {
  it("is refused once anybody exists", async () => {
    const body = { email: "first@quillmere.example", name: "First", password };
    const answer = await visitor().post("/api/v1/setup", body);
    expect(answer).toMatchObject({ status: 409, body: { code: "already_set_up" } });
  });

  it("says that nothing is left to set up", async () => {
    const answer = await visitor().get("/api/v1/setup");
    expect(answer.body).toEqual({ needsSetup: false });
  });
});
