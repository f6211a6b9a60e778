import { describe, expect, it } from "vitest";
import { actionWords, changesOf } from "@/app/(administration)/audit/_components/changes";
import { apiFilter, filterHref, readFilter } from "@/app/(administration)/audit/_components/filter";
import type { AuditEventView } from "@/app/api/v1/audit-events/schema";

const event = (values: Partial<AuditEventView>): AuditEventView => ({
  id: "1",
  actor: null,
  action: "user.updated",
  entity: "user",
  entityId: "7f8c1f5e-6f1b-4a57-9f3e-2f3f7f0f9a10",
  before: null,
  after: null,
  requestId: null,
  at: "2026-12-01T09:30:00.000Z",
  ...values,
});

describe("changesOf", () => {
  it("sets what was beside what is, and leaves out what stayed", () => {
    const changes = changesOf(
      event({ before: { role: "engineer", name: "A" }, after: { role: "planner", name: "A" } }),
    );
    expect(changes).toEqual([{ name: "role", before: "engineer", after: "planner" }]);
  });

  it("has no before for something new, and an en dash for something taken away", () => {
    expect(changesOf(event({ after: { active: true } }))).toEqual([
      { name: "active", before: undefined, after: "yes" },
    ]);
    expect(changesOf(event({ before: { note: "x" }, after: { note: null } }))[0].after).toBe("–");
  });

  it("says that a long list changed when its length did not", () => {
    const rows = (liquidPercent: number) =>
      Array.from({ length: 8 }, () => ({ pressurePsia: 4000, liquidPercent }));
    const changes = changesOf(event({ before: { rows: rows(9) }, after: { rows: rows(4) } }));
    expect(changes).toEqual([{ name: "rows", before: "8 entries", after: "8 entries, changed" }]);
  });

  it("names nested values by their path after whole ones, and reads a long list as its length", () => {
    const prices = Array.from({ length: 9 }, () => ({ product: "condensate", benchmark: 69 }));
    const changes = changesOf(event({ after: { inputs: { netThicknessFt: 128 }, prices } }));
    expect(changes).toEqual([
      { name: "prices", before: undefined, after: "9 entries" },
      { name: "inputs, net thickness ft", before: undefined, after: "128" },
    ]);
  });
});

describe("actionWords", () => {
  it("writes an action out", () => {
    expect(actionWords("user.signedOutEverywhere")).toBe("User signed out everywhere");
    expect(actionWords("priceDeck.published")).toBe("Price deck published");
  });
});

describe("readFilter", () => {
  it("reads back the address that a filter was written to", () => {
    const filter = {
      entity: "estimate",
      entityId: null,
      person: "p",
      from: "2026-11-01",
      to: "2026-11-30",
      page: 3,
    };
    const search = new URLSearchParams(filterHref(filter).split("?")[1]);
    expect(readFilter(search)).toEqual(filter);
  });

  it("takes what it cannot read for not given", () => {
    const filter = readFilter(new URLSearchParams("from=yesterday&page=-2"));
    expect(filter).toMatchObject({ from: null, page: 1 });
  });
});

describe("apiFilter", () => {
  it("counts the last day whole", () => {
    const filter = readFilter(new URLSearchParams("from=2026-11-30&to=2026-11-30"));
    expect(Object.fromEntries(apiFilter(filter))).toEqual({
      from: "2026-11-30T00:00:00Z",
      to: "2026-12-01T00:00:00Z",
    });
  });
});
