import { parse } from "csv-parse/sync";
import { describe, expect, it } from "vitest";
import type { AuditEventView } from "@/app/api/v1/audit-events/schema";
import type { BasinView } from "@/app/api/v1/basins/schema";
import { as, buildBasin, ifMatch, made } from "../factories";
import { visitor } from "../support/api";
import { queryRows } from "../support/database";

interface PageOf<Item> {
  items: Item[];
  total: number;
}

const roles = ["engineer", "reviewer", "planner", "executive"] as const;

async function renamedBasin(name: string): Promise<BasinView> {
  const planner = await as("planner");
  const basin = await buildBasin();
  const path = `/api/v1/basins/${basin.id}`;
  return made(await planner.patch<BasinView>(path, { name }, ifMatch(basin)));
}

describe("GET /api/v1/audit-events", () => {
  it("tells of one record from what to what, newest first", async () => {
    const basin = await renamedBasin(`Renamed ${Date.now()}`);
    const administrator = await as("administrator");
    const path = `/api/v1/audit-events?entity=basin&entityId=${basin.id}`;
    const { items } = made(await administrator.get<PageOf<AuditEventView>>(path));
    expect(items.map(({ action }) => action)).toEqual(["basin.updated", "basin.created"]);
    expect(items[0].after).toEqual({ name: basin.name });
    expect(items[0].actor?.name).toBe("Marit Sundeholt");
  });

  it("keeps to a person and to a time", async () => {
    const administrator = await as("administrator");
    const read = async (search: string) =>
      made(await administrator.get<PageOf<AuditEventView>>(`/api/v1/audit-events?${search}`));
    const { items } = await read("limit=1&entity=estimate");
    const actorId = items[0].actor?.id;
    const ofPerson = await read(`actorId=${actorId}&limit=200`);
    expect(ofPerson.items.every(({ actor }) => actor?.id === actorId)).toBe(true);
    const of2024 = await read("from=2024-01-01T00:00:00Z&to=2025-01-01T00:00:00Z&limit=200");
    expect(of2024.total).toBeGreaterThan(0);
    expect(of2024.items.every(({ at }) => at.startsWith("2024-"))).toBe(true);
  });

  it("answers 403 to everybody but an administrator", async () => {
    for (const role of roles) {
      expect((await (await as(role)).get("/api/v1/audit-events")).status).toBe(403);
    }
  });
});

describe("GET /api/v1/exports/audit.csv", () => {
  it("holds every event once, newest first, however many batches that takes", async () => {
    const administrator = await as("administrator");
    const answer = await administrator.get<string>("/api/v1/exports/audit.csv");
    expect(answer.status).toBe(200);
    expect(answer.headers.get("content-type")).toMatch(/^text\/csv/);
    expect(answer.headers.get("content-disposition")).toMatch(/dewledger-audit-.*\.csv/);
    const rows = parse(answer.body, { columns: true, bom: true }) as Record<string, string>[];
    const [{ count }] = await queryRows<{ count: string }>("select count(*) from audit_events");
    expect(rows.length).toBeGreaterThan(200);
    expect(rows).toHaveLength(Number(count));
    expect(new Set(rows.map((row) => row.event_id)).size).toBe(rows.length);
    const moments = rows.map((row) => row.at_utc);
    expect(moments).toEqual([...moments].sort().reverse());
  });

  it("keeps to the filter and holds values as JSON", async () => {
    const basin = await renamedBasin(`=Renamed ${Date.now()}`);
    const administrator = await as("administrator");
    const path = `/api/v1/exports/audit.csv?entity=basin&entityId=${basin.id}`;
    const { body } = await administrator.get<string>(path);
    const rows = parse(body, { columns: true, bom: true }) as Record<string, string>[];
    expect(rows).toHaveLength(2);
    expect(JSON.parse(rows[0].after_json)).toEqual({ name: basin.name });
  });

  it("answers 403 to everybody but an administrator and 401 to a visitor", async () => {
    for (const role of roles) {
      expect((await (await as(role)).get("/api/v1/exports/audit.csv")).status).toBe(403);
    }
    expect((await visitor().get("/api/v1/exports/audit.csv")).status).toBe(401);
  });
});
