import { renderToStaticMarkup } from "react-dom/server";
import { describe, expect, it } from "vitest";
import { lastHeardOf } from "@/app/(tools)/_queries/runs";
import type { RunView } from "@/app/api/v1/runs/schema";
import { RunProgress } from "@/components/runs/run-progress";

const heardAt = Date.UTC(2026, 11, 1, 17, 25, 24);

const run: RunView = {
  id: "0198f0aa-5c1e-7000-8000-000000000001",
  kind: "recalculation",
  state: "running",
  title: "Recalculation of the approved book",
  createdBy: null,
  createdAt: "2026-12-01T17:25:00.000Z",
  startedAt: "2026-12-01T17:25:01.000Z",
  finishedAt: null,
  counts: { total: 29, waiting: 26, running: 1, done: 2, failed: 0, passedOver: 0 },
  remainingSeconds: 18,
  workers: [],
  stalled: false,
  can: { cancel: true, retry: false },
  version: 3,
};

describe("lastHeardOf(query)", () => {
  const well = { dataUpdatedAt: heardAt, error: null, failureCount: 0, fetchStatus: "idle" };

  it("is null while the server answers, and before it ever did", () => {
    expect(lastHeardOf(well)).toBeNull();
    expect(lastHeardOf({ ...well, dataUpdatedAt: 0, error: new Error("none") })).toBeNull();
  });

  it("is the last answer from the first look that failed, or that could not be sent", () => {
    for (const silence of [
      { error: new Error("The server did not answer.") },
      { failureCount: 1 },
      { fetchStatus: "paused" },
    ]) {
      expect(lastHeardOf({ ...well, ...silence })).toEqual(new Date(heardAt));
    }
  });
});

describe("RunProgress", () => {
  it("says pace, time left and that the run goes on while the server answers", () => {
    const html = renderToStaticMarkup(<RunProgress run={run} label="Computing" />);
    expect(html).toContain("2 of 29, 90 a minute, about 18 s left");
    expect(html).toContain("the run goes on");
    expect(html).not.toContain("Last heard");
  });

  it("claims none of them once the server is silent, and says when it was last heard", () => {
    const html = renderToStaticMarkup(
      <RunProgress
        run={{ ...run, stalled: true }}
        label="Computing"
        lastHeard={new Date(heardAt)}
        action={<button>Cancel</button>}
      />,
    );
    expect(html).toContain("Last heard 17:25:24 UTC");
    expect(html).toContain("2 of 29<");
    expect(html).not.toMatch(/Computing|a minute|left|goes on|Cancel|Nothing has moved/);
  });
});
