import { beforeEach, describe, expect, it, vi } from "vitest";
import { runImportedEstimates } from "@/services/imports/run-estimates";

const { findUser, runEstimate, recordImportProgress } = vi.hoisted(() => ({
  findUser: vi.fn(),
  runEstimate: vi.fn(),
  recordImportProgress: vi.fn(),
}));

const reportRow = (line: number) => ({
  line,
  basin: "Basin",
  field: "Field",
  reservoir: `Reservoir ${line}`,
  action: "create",
  changes: [],
  problems: [],
  warnings: [],
  fieldSlug: null,
  reservoirSlug: null,
  estimateId: `estimate-${line}`,
});

vi.mock("@/models/queries/users", () => ({ findUser }));
vi.mock("@/services/estimate-runs", () => ({ runEstimate }));
vi.mock("@/models/queries/estimates", () => ({
  findEstimate: (id: string) => Promise.resolve({ id, computedAt: null, version: 1 }),
}));
vi.mock("@/models/queries/imports", () => ({
  recordImportProgress,
  findImport: () =>
    Promise.resolve({
      state: "applying",
      createdBy: "person",
      report: {
        delimiter: ",",
        encoding: "utf-8",
        problems: [],
        warnings: [],
        remarks: 0,
        rows: [3, 4, 5, 6].map(reportRow),
        taken: "all",
        failedRuns: {},
      },
    }),
}));

describe("runImportedEstimates({ importId })", () => {
  const person = { id: "person", name: "A", email: "a@example.org", role: "engineer" };

  beforeEach(() => {
    vi.resetAllMocks();
  });

  it("runs nothing more for a person who is made inactive meanwhile, and says why", async () => {
    let active = true;
    findUser.mockImplementation(() => Promise.resolve({ ...person, active }));
    runEstimate.mockImplementation(() => {
      active = false;
      return Promise.resolve();
    });
    await runImportedEstimates({ importId: "import" });
    // Two go on at the same time; whichever asked before the change is done.
    expect(runEstimate.mock.calls.length).toBeLessThanOrEqual(2);
    const reports = recordImportProgress.mock.calls.flatMap(([, values]) =>
      values.report ? [values.report] : [],
    );
    const failed: Record<string, string> = reports.at(-1).failedRuns;
    expect(Object.keys(failed)).toHaveLength(4 - runEstimate.mock.calls.length);
    expect(failed["estimate-6"]).toContain("no longer active");
    expect(recordImportProgress.mock.lastCall?.[1]).toMatchObject({ state: "applied" });
  });
});
