import { describe, expect, it } from "vitest";
import { ageWords, inboxTitle, meanChange } from "@/app/(workspace)/review/_components/waiting";
import type { ReviewItemView } from "@/app/api/v1/review/schema";

const now = new Date("2026-12-01T00:30:00Z");
const range = (mean: number) => ({ p90: 1, p50: 2, p10: 3, mean });

const item = (submittedAt: string, approvedMean: number | null = null): ReviewItemView => ({
  id: "7f8c1f5e-6f1b-4a57-9f3e-2f3f7f0f9a10",
  revision: 2,
  state: "submitted",
  reservoir: { slug: "sand", name: "Sand" },
  field: { slug: "field", name: "Field" },
  basin: "Basin",
  note: "",
  submitter: { id: "7f8c1f5e-6f1b-4a57-9f3e-2f3f7f0f9a11", name: "Somebody" },
  submittedAt,
  decider: null,
  decidedAt: null,
  decisionNote: "",
  condensate: range(3),
  approved: approvedMean === null ? null : { revision: 1, condensate: range(approvedMean) },
  warnings: 0,
  recoveryRoute: null,
  canDecide: true,
});

describe("ageWords", () => {
  it("counts calendar days, not hours", () => {
    expect(ageWords("2026-11-30T23:45:00Z", now)).toBe("1 day");
    expect(ageWords("2026-12-01T00:05:00Z", now)).toBe("today");
    expect(ageWords("2026-11-23T12:00:00Z", now)).toBe("8 days");
  });
});

describe("inboxTitle", () => {
  it("says how many wait and for how long", () => {
    expect(inboxTitle([], now)).toBe("No estimate waits for review");
    expect(inboxTitle([item("2026-11-27T12:00:00Z")], now)).toBe(
      "One estimate waits for review, for 4 days",
    );
    const items = [item("2026-11-27T12:00:00Z"), item("2026-11-23T12:00:00Z")];
    expect(inboxTitle(items, now)).toBe("Two estimates wait for review, the oldest for 8 days");
    expect(inboxTitle([item("2026-12-01T00:10:00Z")], now)).toBe(
      "One estimate waits for review, since today",
    );
  });
});

describe("meanChange", () => {
  it("is the change of the mean against the approved revision, or nothing without one", () => {
    expect(meanChange(item("2026-11-27T12:00:00Z", 2))).toBeCloseTo(0.5, 12);
    expect(meanChange(item("2026-11-27T12:00:00Z"))).toBeNull();
  });
});
