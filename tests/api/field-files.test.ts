import { describe, expect, it } from "vitest";
import type { EstimateView } from "@/app/api/v1/estimates/schema";
import {
  fieldFileSchema,
  reservoirPageSchema,
  type FieldFileView,
  type ReservoirPageView,
} from "@/app/api/v1/fields/file-schema";
import { as, buildApproved, buildField, made } from "../factories";
import { visitor } from "../support/api";

function resultOf({ summary }: EstimateView) {
  if (!summary) throw new Error("an approved estimate has results");
  return summary.results.condensateRecoverableStb;
}

describe("GET /api/v1/fields/:id/file", () => {
  it("gives the field by the word of its address or by its id, with reservoirs and revisions", async () => {
    const approved = await buildApproved();
    const executive = await as("executive");
    const { field, reservoir } = approved.place;
    const bySlug = made(await executive.get<FieldFileView>(`/api/v1/fields/${field.slug}/file`));
    fieldFileSchema.parse(bySlug);
    expect(bySlug.reservoirs).toHaveLength(1);
    expect(bySlug.reservoirs[0]).toMatchObject({ slug: reservoir.slug });
    const [revision] = bySlug.reservoirs[0].revisions;
    const { p90, p50, p10, mean } = resultOf(approved);
    expect(revision).toMatchObject({
      revision: 1,
      state: "approved",
      condensateRecoverableStb: { p90, p50, p10, mean },
    });
    expect(made(await executive.get(`/api/v1/fields/${field.id}/file`))).toEqual(bySlug);
  });

  it("has no figures for a field without an estimate", async () => {
    const field = await buildField();
    const planner = await as("planner");
    const file = made(await planner.get<FieldFileView>(`/api/v1/fields/${field.slug}/file`));
    expect(file.reservoirs).toEqual([]);
    expect(file.ranked).toMatchObject({ ranges: null, rank: null });
  });

  it("answers 404 where no field is, and 401 to a visitor", async () => {
    const planner = await as("planner");
    expect((await planner.get("/api/v1/fields/no-such-field/file")).status).toBe(404);
    expect((await visitor().get("/api/v1/fields/no-such-field/file")).status).toBe(401);
  });
});

describe("GET /api/v1/fields/:id/reservoirs/:reservoir", () => {
  it("gives the reservoir by the words of its address, with the ranges of its revisions", async () => {
    const approved = await buildApproved();
    const { field, reservoir } = approved.place;
    const reviewer = await as("reviewer");
    const page = made(
      await reviewer.get<ReservoirPageView>(
        `/api/v1/fields/${field.slug}/reservoirs/${reservoir.slug}`,
      ),
    );
    reservoirPageSchema.parse(page);
    expect(page).toMatchObject({ slug: reservoir.slug, approved: { id: approved.id }, open: null });
    expect(page.revisions.map(({ estimateId }) => estimateId)).toEqual([approved.id]);
  });

  it("answers 404 for a reservoir of another field", async () => {
    const approved = await buildApproved();
    const other = await buildField();
    const reviewer = await as("reviewer");
    const path = `/api/v1/fields/${other.slug}/reservoirs/${approved.place.reservoir.slug}`;
    expect((await reviewer.get(path)).status).toBe(404);
  });
});
