import { beforeEach, describe, expect, it, vi } from "vitest";
import { vectorNames } from "@/analytics/volumetrics/results-schema";
import type { PortfolioFieldRow } from "@/models/queries/portfolio";
import { withAlignedFields, type CountedReservoir } from "@/services/portfolio/aligned-fields";
import { independent } from "../../analytics/portfolio/book";

/** Totals that read stored trials or have them in hand, now and at most. */
const held = { now: 0, most: 0 };
const hold = () => (held.most = Math.max(held.most, (held.now += 1)));
const read = vi.hoisted(() => vi.fn());
const align = vi.hoisted(() => vi.fn());

vi.mock("@/models/queries/portfolio", () => ({ listTrialVectors: read }));
vi.mock("@/services/compute/pool", () => ({ MAXIMUM_QUEUE: 64, runAlignment: align }));

const TRIALS = 100;

/** One field of one reservoir; a revision of its own has not been read before. */
const counted = (revision: string): CountedReservoir[] => [
  {
    field: {
      id: "field",
      slug: "field",
      basinId: "basin",
      basinSlug: "basin",
      chanceOfCommerciality: 1,
    } as PortfolioFieldRow,
    reservoir: {
      slug: "sand",
      estimateId: revision,
      trials: TRIALS,
      computedAt: new Date(0),
    } as CountedReservoir["reservoir"],
  },
];

const soon = () => new Promise((resolve) => setTimeout(resolve, 5));

beforeEach(() => {
  Object.assign(held, { now: 0, most: 0 });
  read.mockReset().mockImplementation(async (ids: string[]) => {
    hold();
    await soon();
    const vector = Buffer.from(new Float32Array(TRIALS).fill(1).buffer);
    return ids.map((estimateId) => ({
      estimateId,
      ...Object.fromEntries(vectorNames.map((name) => [name, vector])),
    }));
  });
  align.mockReset().mockImplementation(async (pieces: unknown[]) => {
    await soon();
    return pieces.map(() => ({ certain: {}, yesNo: {} }));
  });
});

/** A total that takes its time over what it has. */
const total = (revision: string) =>
  withAlignedFields(counted(revision), TRIALS, independent, async (fields) => {
    await soon();
    held.now -= 1;
    return fields.size;
  });

describe("withAlignedFields(counted, trials, dependence, work)", () => {
  it("holds the trials of one total that has to read them at a time, however many ask", async () => {
    const sizes = await Promise.all(Array.from({ length: 12 }, (_, i) => total(`many-${i}`)));
    expect(sizes).toEqual(new Array(12).fill(1));
    expect(read).toHaveBeenCalledTimes(12);
    expect(held.most).toBe(1);
  });

  it("reads once what many ask for at a time, and lets nobody wait for what is in memory", async () => {
    await Promise.all([total("same"), total("same"), total("same")]);
    expect(read).toHaveBeenCalledTimes(1);
    let finish = () => {};
    const finished = new Promise<void>((resolve) => (finish = resolve));
    const slow = withAlignedFields(counted("slow"), TRIALS, independent, () => finished);
    await total("same");
    finish();
    await slow;
  });

  it("goes on with the next total when one fails, and reads again what failed", async () => {
    read.mockRejectedValueOnce(new Error("no database"));
    const [failed, next] = await Promise.allSettled([total("failing"), total("next")]);
    expect(failed.status).toBe("rejected");
    expect(next.status).toBe("fulfilled");
    await expect(total("failing")).resolves.toBe(1);
  });
});
