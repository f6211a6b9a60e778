import { afterAll, describe, expect, it } from "vitest";
import { tallyRuns } from "@/models/queries/runs";
import { sequelize } from "@/models/sequelize";
import { queryRows } from "../support/database";

/** A run that began to be worked on, for the last time, so many seconds ago; ended, so that no worker looks at it. */
async function runBegun(secondsAgo: number): Promise<string> {
  const [{ id }] = await queryRows<{ id: string }>(
    `insert into runs (kind, state, title, created_by, finished_at, updated_at)
      select 'recalculation', 'finished', 'made for a test', id, now(),
        now() - make_interval(secs => $1)
      from users limit 1 returning id`,
    [secondsAgo],
  );
  return id;
}

async function addItem(runId: string, position: number, worker: string, endedSecondsAgo: number) {
  await queryRows(
    `insert into run_items (run_id, position, estimate_id, estimate_version, revision,
        reservoir_id, state, worker, finished_at)
      select $1, $2, gen_random_uuid(), 1, 1, id, 'done', $3, now() - make_interval(secs => $4)
      from reservoirs limit 1`,
    [runId, position, worker, endedSecondsAgo],
  );
}

afterAll(() => sequelize.close());

describe("tallyRuns(runIds)", () => {
  it("counts towards the pace only what ended since work last began", async () => {
    const runId = await runBegun(20);
    await addItem(runId, 1, "z", 30);
    await addItem(runId, 2, "z", 25);
    await addItem(runId, 3, "a", 10);
    const tally = (await tallyRuns([runId])).get(runId)!;
    expect(tally).toMatchObject({ counts: { done: 3 }, ended: 1, recentlyEnded: 1 });
  });

  it("knows of these the ones of the last minute, and every worker by its first item", async () => {
    const runId = await runBegun(600);
    await addItem(runId, 1, "z", 300);
    await addItem(runId, 2, "a", 30);
    await addItem(runId, 3, "z", 10);
    const tally = (await tallyRuns([runId])).get(runId)!;
    expect(tally).toMatchObject({ ended: 3, recentlyEnded: 2, workers: ["z", "a"] });
  });
});
