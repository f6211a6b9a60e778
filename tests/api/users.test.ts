import { describe, expect, it } from "vitest";
import type { Problem } from "@/app/_server/problem";
import type { AuditEventView } from "@/app/api/v1/audit-events/schema";
import type { SettingsView } from "@/app/api/v1/settings/schema";
import type { UserView } from "@/app/api/v1/users/schema";
import { as, ifMatch, made, uniqueName } from "../factories";
import { visitor } from "../support/api";
import { queryRows } from "../support/database";

interface PageOf<Item> {
  items: Item[];
  total: number;
}

const newUser = (values: Record<string, unknown> = {}) => ({
  email: `${uniqueName("person").replace(" ", "-")}@quillmere.example`,
  name: "Elspeth Norrington",
  password: "a-long-enough-secret",
  role: "engineer",
  ...values,
});

async function buildUser(): Promise<UserView> {
  const administrator = await as("administrator");
  return made(await administrator.post<UserView>("/api/v1/users", newUser()));
}

describe("POST /api/v1/users", () => {
  it("adds a person and says nothing of the password, in the answer or the audit trail", async () => {
    const administrator = await as("administrator");
    const answer = await administrator.post<UserView>("/api/v1/users", newUser());
    expect(answer.status).toBe(201);
    expect(answer.headers.get("etag")).toBe('"1"');
    expect(JSON.stringify(answer.body)).not.toMatch(/argon|secret/);
    const events = await queryRows<{ text: string }>(
      "select to_jsonb(audit_events)::text as text from audit_events where entity_id = $1",
      [answer.body.id],
    );
    expect(events).toHaveLength(1);
    expect(events[0].text).not.toMatch(/argon|secret/);
  });

  it("stores the password as argon2id", async () => {
    const user = await buildUser();
    const [row] = await queryRows<{ password_hash: string }>(
      "select password_hash from users where id = $1",
      [user.id],
    );
    expect(row.password_hash).toMatch(/^\$argon2id\$v=19\$m=19456,t=2,p=1\$/);
  });

  it("answers 409 when the address is taken, in whatever capitals", async () => {
    const administrator = await as("administrator");
    const user = await buildUser();
    const again = newUser({ email: user.email.toUpperCase() });
    expect((await administrator.post("/api/v1/users", again)).status).toBe(409);
  });

  it("answers 422 to a short password and an unknown role", async () => {
    const body = newUser({ password: "short", role: "emperor" });
    const answer = await (await as("administrator")).post<Problem>("/api/v1/users", body);
    expect(answer.status).toBe(422);
    expect(answer.body.errors?.map(({ pointer }) => pointer).sort()).toEqual([
      "#/password",
      "#/role",
    ]);
  });

  it("answers 403 to everybody but an administrator, 401 to a visitor", async () => {
    for (const role of ["engineer", "reviewer", "planner", "executive"] as const) {
      expect((await (await as(role)).post("/api/v1/users", newUser())).status).toBe(403);
    }
    expect((await visitor().post("/api/v1/users", newUser())).status).toBe(401);
  });
});

describe("PATCH /api/v1/users/:id", () => {
  it("answers 412 with the row as it is now when somebody saved first", async () => {
    const administrator = await as("administrator");
    const user = await buildUser();
    const path = `/api/v1/users/${user.id}`;
    made(await administrator.patch(path, { name: "Elspeth N." }, ifMatch(user)));
    const stale = await administrator.patch<Problem>(path, { name: "E. N." }, ifMatch(user));
    expect(stale.status).toBe(412);
    expect(stale.body).toMatchObject({
      code: "stale_version",
      expectedVersion: 1,
      current: { name: "Elspeth N.", version: 2 },
    });
    expect(JSON.stringify(stale.body)).not.toContain("argon");
  });

  it("answers 428 when the request does not say which version it changes", async () => {
    const user = await buildUser();
    const answer = await (await as("administrator")).patch(`/api/v1/users/${user.id}`, {});
    expect(answer).toMatchObject({ status: 428, body: { code: "version_required" } });
  });

  it("never lets the last active administrator go", async () => {
    const administrator = await as("administrator");
    const { body } = await administrator.get<PageOf<UserView>>("/api/v1/users?limit=200");
    const others = body.items.filter(
      ({ role, active, email }) => role === "administrator" && active && !email.startsWith("joss."),
    );
    for (const other of others) {
      const path = `/api/v1/users/${other.id}`;
      made(await administrator.patch(path, { active: false }, ifMatch(other)));
    }
    const self = body.items.find(({ email }) => email.startsWith("joss."));
    if (!self) throw new Error("the demo has an administrator");
    for (const patch of [{ role: "engineer" }, { active: false }]) {
      const answer = await administrator.patch(`/api/v1/users/${self.id}`, patch, ifMatch(self));
      expect(answer).toMatchObject({ status: 409, body: { code: "last_administrator" } });
    }
  });
});

describe("GET /api/v1/people", () => {
  it("lists active people of a role to everybody, without their addresses", async () => {
    const answer = await (await as("planner")).get("/api/v1/people?role=reviewer");
    expect(answer.status).toBe(200);
    expect(JSON.stringify(answer.body)).toContain("Tobias Falkmere");
    expect(JSON.stringify(answer.body)).not.toContain("@");
  });
});

describe("GET /api/v1/audit-events", () => {
  it("shows an administrator who did what, newest first, a page at a time", async () => {
    const administrator = await as("administrator");
    const user = await buildUser();
    const path = `/api/v1/users/${user.id}`;
    made(await administrator.patch(path, { name: "Elspeth Moor" }, ifMatch(user)));
    const { body } = await administrator.get<PageOf<AuditEventView>>(
      `/api/v1/audit-events?entity=user&entityId=${user.id}&limit=1`,
    );
    expect(body.total).toBe(2);
    expect(body.items).toHaveLength(1);
    expect(body.items[0]).toMatchObject({
      action: "user.updated",
      actor: { name: "Joss Pemberlea" },
      before: { name: "Elspeth Norrington" },
      after: { name: "Elspeth Moor" },
    });
    expect(body.items[0].requestId).toMatch(/^[\w-]{8,64}$/);
  });

  it("answers 403 to everybody else", async () => {
    for (const role of ["engineer", "reviewer", "planner", "executive"] as const) {
      expect((await (await as(role)).get("/api/v1/audit-events")).status).toBe(403);
    }
  });

  it("cannot be changed, even in the database", async () => {
    await expect(queryRows("update audit_events set action = 'nothing'")).rejects.toThrow(
      /append-only/,
    );
    await expect(queryRows("delete from audit_events")).rejects.toThrow(/append-only/);
    await expect(queryRows("truncate audit_events")).rejects.toThrow(/append-only/);
  });
});

describe("PATCH /api/v1/settings", () => {
  it("lets an administrator rename the organisation, and nobody else", async () => {
    const administrator = await as("administrator");
    const settings = made(await administrator.get<SettingsView>("/api/v1/settings"));
    expect(settings).toMatchObject({ standardPressurePsia: 14.696, standardTemperatureDegF: 60 });
    const patch = { organisationName: settings.organisationName };
    const kept = await administrator.patch("/api/v1/settings", patch, ifMatch(settings));
    expect(kept.status).toBe(200);
    const planner = await as("planner");
    const refused = await planner.patch("/api/v1/settings", patch, ifMatch(settings));
    expect(refused.status).toBe(403);
  });
});
