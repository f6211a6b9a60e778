import { randomUUID } from "node:crypto";
import { afterAll, describe, expect, it } from "vitest";
import {
  claimRunItem,
  failExhaustedItems,
  giveItemBack,
  lockLeasedItem,
  renewLeases,
  type LeaseToken,
} from "@/models/queries/run-leases";
import { passOverOpenItems, returnEndedItems } from "@/models/queries/runs";
import { sequelize } from "@/models/sequelize";
import { queryRows } from "../support/database";

const limits = { leaseSeconds: 30, mostAttempts: 3 };
const worker = () => `test:${randomUUID()}`;

/** A run with items that no worker of the product takes, because the run itself is at its end. */
async function runOf(items: number): Promise<string> {
  const [{ id }] = await queryRows<{ id: string }>(
    `insert into runs (kind, state, title, created_by, finished_at)
      select 'recalculation', 'finished', 'made for a test', id, now() from users limit 1
      returning id`,
  );
  await queryRows(
    `insert into run_items (run_id, position, estimate_id, estimate_version, revision, reservoir_id)
      select $1, n, gen_random_uuid(), 1, 1, (select id from reservoirs limit 1)
      from generate_series(1, $2::integer) as n`,
    [id, items],
  );
  return id;
}

async function expire({ runId, position }: LeaseToken): Promise<void> {
  await queryRows(
    "update run_items set leased_until = now() - interval '1 s' where run_id = $1 and position = $2",
    [runId, position],
  );
}

/** Cancelled and set going again, as far as items go. */
async function cancelAndRetry(runId: string): Promise<void> {
  await sequelize.transaction(async (transaction) => {
    const reasons = { waiting: "cancelled", running: "cancelled" };
    await passOverOpenItems(runId, reasons, new Date(), transaction);
    // Only what still has its estimate comes back.
    await sequelize.query(
      "update run_items set estimate_id = (select id from estimates limit 1) where run_id = :runId",
      { replacements: { runId }, transaction },
    );
    expect(await returnEndedItems(runId, transaction)).toBe(1);
  });
}

const isOwn = (token: LeaseToken) =>
  sequelize.transaction(async (transaction) => (await lockLeasedItem(token, transaction)) !== null);

afterAll(() => sequelize.close());

describe("claimRunItem(runId, worker)", () => {
  it("gives every item to one of many who ask at once", async () => {
    const runId = await runOf(6);
    const claims = Array.from({ length: 8 }, () => claimRunItem(runId, worker(), limits));
    const positions = (await Promise.all(claims)).map((claim) => claim?.position ?? null);
    // One who looks while others choose may find nothing free, and looks again.
    for (let rest = await claimRunItem(runId, worker(), limits); rest; ) {
      positions.push(rest.position);
      rest = await claimRunItem(runId, worker(), limits);
    }
    const taken = positions.filter((position) => position !== null);
    expect(taken.sort()).toEqual([1, 2, 3, 4, 5, 6]);
  });

  it("takes an item from a worker that is not heard of, who can then store nothing", async () => {
    const runId = await runOf(1);
    const [dead, alive] = [worker(), worker()];
    const first = (await claimRunItem(runId, dead, limits))!;
    expect(await claimRunItem(runId, alive, limits)).toBeNull();
    expect(await isOwn(first)).toBe(true);
    await expire(first);
    const second = (await claimRunItem(runId, alive, limits))!;
    expect(second).toMatchObject({ position: 1, attempts: 2 });
    expect(await isOwn(first)).toBe(false);
    expect(await isOwn(second)).toBe(true);
    expect(await renewLeases([first.claimId], 30)).toEqual([]);
  });

  it("lets a worker that took its own item again store under the new attempt alone", async () => {
    const runId = await runOf(1);
    const name = worker();
    const first = (await claimRunItem(runId, name, limits))!;
    await expire(first);
    const second = (await claimRunItem(runId, name, limits))!;
    expect([await isOwn(first), await isOwn(second)]).toEqual([false, true]);
  });

  it("gives up after three attempts that ended with their workers", async () => {
    const runId = await runOf(1);
    for (let attempt = 1; attempt <= 3; attempt += 1) {
      const held = await claimRunItem(runId, worker(), limits);
      expect(held?.attempts).toBe(attempt);
      await expire(held!);
    }
    expect(await claimRunItem(runId, worker(), limits)).toBeNull();
    await failExhaustedItems(3, "ended three times");
    const [item] = await queryRows("select state, reason from run_items where run_id = $1", [
      runId,
    ]);
    expect(item).toEqual({ state: "failed", reason: "ended three times" });
  });
});

describe("renewLeases(claimIds)", () => {
  it("keeps an item whose lease is renewed", async () => {
    const runId = await runOf(1);
    const held = (await claimRunItem(runId, worker(), limits))!;
    await expire(held);
    expect(await renewLeases([held.claimId], 30)).toEqual([held.claimId]);
    expect(await claimRunItem(runId, worker(), limits)).toBeNull();
    expect(await renewLeases([], 30)).toEqual([]);
  });

  it("lets an item go that its living worker does not know it has", async () => {
    const runId = await runOf(2);
    const name = worker();
    const held = (await claimRunItem(runId, name, limits))!;
    // Committed, but the answer was lost on the way to the worker.
    const orphan = (await claimRunItem(runId, name, limits))!;
    await expire(held);
    await expire(orphan);
    expect(await renewLeases([held.claimId], 30)).toEqual([held.claimId]);
    const taken = await claimRunItem(runId, worker(), limits);
    expect(taken).toMatchObject({ position: orphan.position, attempts: 2 });
    expect(await claimRunItem(runId, worker(), limits)).toBeNull();
    expect([await isOwn(held), await isOwn(orphan), await isOwn(taken!)]).toEqual([
      true,
      false,
      true,
    ]);
  });

  it("knows a claim from before a retry as gone, though worker and attempt are the same again", async () => {
    const runId = await runOf(1);
    const name = worker();
    const before = (await claimRunItem(runId, name, limits))!;
    await cancelAndRetry(runId);
    const after = (await claimRunItem(runId, name, limits))!;
    expect([before.attempts, after.attempts]).toEqual([1, 1]);
    expect([await isOwn(before), await isOwn(after)]).toEqual([false, true]);
    expect(await renewLeases([before.claimId, after.claimId], 30)).toEqual([after.claimId]);
    await giveItemBack(before, { counted: false });
    expect(await isOwn(after)).toBe(true);
  });
});

describe("giveItemBack(token)", () => {
  it("lets others have it at once, without counting an attempt that was broken off", async () => {
    const runId = await runOf(1);
    const held = (await claimRunItem(runId, worker(), limits))!;
    await giveItemBack(held, { counted: false });
    expect(await claimRunItem(runId, worker(), limits)).toMatchObject({ attempts: 1 });
  });

  it("changes nothing when the item is another's by now", async () => {
    const runId = await runOf(1);
    const first = (await claimRunItem(runId, worker(), limits))!;
    await expire(first);
    const second = (await claimRunItem(runId, worker(), limits))!;
    await giveItemBack(first, { counted: false });
    expect(await isOwn(second)).toBe(true);
  });
});
