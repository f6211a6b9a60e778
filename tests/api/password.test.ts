import { describe, expect, it } from "vitest";
import type { Problem } from "@/app/_server/problem";
import type { UserView } from "@/app/api/v1/users/schema";
import { as, made, uniqueName } from "../factories";
import { signInWith, visitor } from "../support/api";
import { queryRows } from "../support/database";

const path = "/api/v1/session/password";
const oldPassword = "a-long-enough-secret";
const newPassword = "another-long-secret";

async function buildPerson() {
  const email = `${uniqueName("person").replace(" ", "-")}@quillmere.example`;
  const body = { email, name: "Corin Ashgate", password: oldPassword, role: "engineer" };
  const user = made(await (await as("administrator")).post<UserView>("/api/v1/users", body));
  return { user, email, client: await signInWith(email, oldPassword) };
}

describe("POST /api/v1/session/password", () => {
  it("replaces the password and ends every session, the present one included", async () => {
    const { email, client } = await buildPerson();
    const elsewhere = await signInWith(email, oldPassword);
    const body = { currentPassword: oldPassword, password: newPassword };
    expect((await client.post(path, body)).status).toBe(204);
    expect((await client.get("/api/v1/session")).status).toBe(401);
    expect((await elsewhere.get("/api/v1/session")).status).toBe(401);
    await expect(signInWith(email, oldPassword)).rejects.toThrow("could not sign in");
    const again = await signInWith(email, newPassword);
    expect((await again.get("/api/v1/session")).status).toBe(200);
  });

  it("writes an event without either password", async () => {
    const { user, client } = await buildPerson();
    await client.post(path, { currentPassword: oldPassword, password: newPassword });
    const events = await queryRows<{ text: string }>(
      `select to_jsonb(audit_events)::text as text from audit_events
        where entity_id = $1 and action = 'user.passwordChanged'`,
      [user.id],
    );
    expect(events).toHaveLength(1);
    expect(events[0].text).not.toMatch(/argon|secret/);
  });

  it("answers 422 at the field when the present password is wrong, and keeps the old one", async () => {
    const { client } = await buildPerson();
    const body = { currentPassword: "not-this-one-at-all", password: newPassword };
    const answer = await client.post<Problem>(path, body);
    expect(answer.status).toBe(422);
    expect(answer.body.errors?.[0].pointer).toBe("#/currentPassword");
    expect((await client.get("/api/v1/session")).status).toBe(200);
  });

  it("answers 422 to a short password and to the same one again", async () => {
    const { client } = await buildPerson();
    const short = { currentPassword: oldPassword, password: "short" };
    expect((await client.post(path, short)).status).toBe(422);
    const same = { currentPassword: oldPassword, password: oldPassword };
    expect((await client.post(path, same)).status).toBe(422);
  });

  it("answers 429 after ten wrong guesses in a quarter of an hour", async () => {
    const { client } = await buildPerson();
    const body = { currentPassword: "not-this-one-at-all", password: newPassword };
    for (let guess = 0; guess < 10; guess += 1) {
      expect((await client.post(path, body)).status).toBe(422);
    }
    const answer = await client.post(path, body);
    expect(answer.status).toBe(429);
    expect(Number(answer.headers.get("retry-after"))).toBeGreaterThan(0);
  });

  it("answers 401 to a visitor", async () => {
    const body = { currentPassword: oldPassword, password: newPassword };
    expect((await visitor().post(path, body)).status).toBe(401);
  });
});
