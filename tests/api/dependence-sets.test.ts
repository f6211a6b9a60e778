import { describe, expect, it } from "vitest";
import type { Problem } from "@/app/_server/problem";
import type { DependenceSetView } from "@/app/api/v1/dependence-sets/schema";
import type { Ranking, Together } from "@/app/api/v1/fields/ranking-schema";
import type { Statement } from "@/app/api/v1/portfolio/schema";
import { as, buildApproved, buildBasin, buildField, ifMatch, made, uniqueName } from "../factories";
import { visitor } from "../support/api";
import { openTransaction, queryRows } from "../support/database";

const PATH = "/api/v1/dependence-sets";
const NOWHERE = "00000000-0000-4000-8000-000000000000";

const independent = {
  portfolioRank: 0,
  basinRanks: {},
  otherBasinsRank: 0,
  sharedFactors: [],
};
const together = { ...independent, portfolioRank: 0.9, otherBasinsRank: 0.9 };

async function buildSet(values: Record<string, unknown> = {}): Promise<DependenceSetView> {
  const planner = await as("planner");
  const body = { name: uniqueName("Set"), dependence: independent, ...values };
  return made(await planner.post<DependenceSetView>(PATH, body));
}

const listSets = async () =>
  made(await (await as("engineer")).get<{ items: DependenceSetView[] }>(PATH)).items;

const soon = (word: string) =>
  new Promise<string>((resolve) => setTimeout(() => resolve(word), 1000));

const propose = async (dependence: Record<string, unknown>) =>
  (await as("planner")).post<Problem>(PATH, { name: uniqueName("Set"), dependence });

describe("GET /api/v1/dependence-sets", () => {
  it("lists the default first, which is one", async () => {
    const items = await listSets();
    expect(items.map(({ isDefault }) => isDefault).filter(Boolean)).toHaveLength(1);
    expect(items[0]).toMatchObject({ isDefault: true, name: "By basin" });
    expect(items.map(({ name }) => name)).toEqual(
      expect.arrayContaining(["Independent", "Shared survey and plant", "One play"]),
    );
  });

  it("answers 401 to a visitor", async () => {
    expect((await visitor().get(PATH)).status).toBe(401);
  });
});

describe("POST /api/v1/dependence-sets", () => {
  it("keeps a set with basins and a shared factor, and says so in the audit trail", async () => {
    const [one, other] = [await buildField(), await buildField()];
    const dependence = {
      portfolioRank: 0.05,
      basinRanks: { [one.basin.id]: 0.3 },
      otherBasinsRank: 0.1,
      sharedFactors: [
        { name: "One survey", note: "Velocities", rank: 0.4, fieldIds: [one.id, other.id] },
      ],
    };
    const set = await buildSet({ dependence, note: "A test" });
    expect(set).toMatchObject({ dependence, note: "A test", isDefault: false, version: 1 });
    expect(set.updatedBy?.name).toBe("Marit Sundeholt");
    const events = await queryRows<{ action: string }>(
      `select action from audit_events where entity_id = $1`,
      [set.id],
    );
    expect(events).toEqual([{ action: "dependenceSet.created" }]);
  });

  it("answers 422 naming basins and fields that are not there", async () => {
    const { id } = await buildField();
    const { status, body } = await propose({
      ...independent,
      basinRanks: { [NOWHERE]: 0.2 },
      sharedFactors: [{ name: "One survey", rank: 0.4, fieldIds: [id, NOWHERE] }],
    });
    expect(status).toBe(422);
    expect(body.errors?.map(({ pointer }) => pointer)).toEqual([
      `#/dependence/basinRanks/${NOWHERE}`,
      "#/dependence/sharedFactors/0/fieldIds/1",
    ]);
  });

  it("answers 422 for a basin below the portfolio, naming it", async () => {
    const field = await buildField();
    const { status, body } = await propose({
      ...independent,
      portfolioRank: 0.3,
      otherBasinsRank: 0.3,
      basinRanks: { [field.basin.id]: 0.1 },
    });
    expect(status).toBe(422);
    expect(body.errors?.[0].detail).toContain(field.basin.name);
  });

  it("answers 422 for a field that would share more than there is, naming the factors", async () => {
    const [one, other] = [await buildField(), await buildField()];
    const fieldIds = [one.id, other.id];
    const { status, body } = await propose({
      ...independent,
      otherBasinsRank: 0.5,
      sharedFactors: [
        { name: "Survey", rank: 0.4, fieldIds },
        { name: "Plant", rank: 0.4, fieldIds },
      ],
    });
    expect(status).toBe(422);
    expect(body.errors).toHaveLength(2);
    expect(body.errors?.[0].pointer).toBe("#/dependence/sharedFactors/1/fieldIds");
    expect(body.errors?.map(({ detail }) => detail).join()).toContain(one.name);
    expect(body.errors?.[0].detail).toContain("Survey (0.4), Plant (0.4)");
  });

  it("answers 422 for factors that name too many fields taken together", async () => {
    const fieldIds = Array.from(
      { length: 401 },
      (_, i) => `00000000-0000-4000-8000-${String(i).padStart(12, "0")}`,
    );
    const factors = ["a", "b", "c", "d", "e"].map((name) => ({ name, rank: 0.1, fieldIds }));
    const { status, body } = await propose({ ...independent, sharedFactors: factors });
    expect(status).toBe(422);
    expect(body.errors?.map(({ detail }) => detail).join()).toContain("at most 2,000 fields");
  });

  it("answers 409 for a name that is taken, in any case", async () => {
    const { name } = await buildSet();
    const planner = await as("planner");
    const body = { name: name.toUpperCase(), dependence: independent };
    expect(await planner.post(PATH, body)).toMatchObject({
      status: 409,
      body: { detail: "There is a dependence set of this name already." },
    });
  });

  it("answers 403 to everybody but planners", async () => {
    for (const role of ["engineer", "reviewer", "executive", "administrator"] as const) {
      const answer = await (await as(role)).post(PATH, { name: "x", dependence: independent });
      expect(answer.status, role).toBe(403);
    }
  });
});

describe("PATCH and DELETE /api/v1/dependence-sets/:id", () => {
  it("makes another set the default and takes the mark from the one that was, in one step", async () => {
    const planner = await as("planner");
    const [before] = await listSets();
    const set = await buildSet();
    const patch = { isDefault: true };
    const after = made(
      await planner.patch<DependenceSetView>(`${PATH}/${set.id}`, patch, ifMatch(set)),
    );
    expect(after).toMatchObject({ isDefault: true, version: 2 });
    const stepped = made(await planner.get<DependenceSetView>(`${PATH}/${before.id}`));
    expect(stepped).toMatchObject({ isDefault: false, version: before.version + 1 });
    expect(await planner.delete(`${PATH}/${set.id}`, ifMatch(after))).toMatchObject({
      status: 409,
      body: { code: "default_set" },
    });
    made(await planner.patch(`${PATH}/${before.id}`, patch, ifMatch(stepped)));
    const again = made(await planner.get<DependenceSetView>(`${PATH}/${set.id}`));
    expect((await planner.delete(`${PATH}/${set.id}`, ifMatch(again))).status).toBe(204);
    expect((await planner.get(`${PATH}/${set.id}`)).status).toBe(404);
  });

  it("answers 412 with the set as it is to whoever is late", async () => {
    const planner = await as("planner");
    const set = await buildSet();
    made(await planner.patch(`${PATH}/${set.id}`, { note: "first" }, ifMatch(set)));
    const late = await planner.patch<Problem>(`${PATH}/${set.id}`, { note: "2" }, ifMatch(set));
    expect(late).toMatchObject({ status: 412, body: { current: { note: "first", version: 2 } } });
    expect((await planner.patch(`${PATH}/${set.id}`, { note: "3" })).status).toBe(428);
  });

  it("refuses to move a field to a basin where a set would ask too much of it", async () => {
    const planner = await as("planner");
    const [one, other] = [await buildField(), await buildField()];
    const basin = await buildBasin();
    await buildField({ basinId: basin.id });
    const set = await buildSet({
      dependence: {
        ...independent,
        basinRanks: { [basin.id]: 0.8 },
        sharedFactors: [{ name: "Plant", note: "", rank: 0.5, fieldIds: [one.id, other.id] }],
      },
    });
    const answer = await planner.patch<Problem>(
      `/api/v1/fields/${one.id}`,
      { basinId: basin.id },
      ifMatch(one),
    );
    expect(answer.status).toBe(422);
    expect(answer.body.errors?.[0]).toMatchObject({ pointer: "#/basinId" });
    expect(answer.body.errors?.[0].detail).toContain(set.name);
  });
});

describe("a field that is moved while somebody saves a set", () => {
  it("waits for the set, and is refused where the set as saved would ask too much of it", async () => {
    const planner = await as("planner");
    const [one, other] = [await buildField(), await buildField()];
    const basin = await buildBasin();
    await buildField({ basinId: basin.id });
    const set = await buildSet();
    const saved = {
      ...independent,
      basinRanks: { [basin.id]: 0.8 },
      sharedFactors: [{ name: "Plant", note: "", rank: 0.5, fieldIds: [one.id, other.id] }],
    };
    const [saving, saves] = await openTransaction(
      "lock table dependence_sets in share row exclusive mode",
    );
    await saving("update dependence_sets set dependence = $1 where id = $2", [saved, set.id]);
    const moving = planner.patch<Problem>(
      `/api/v1/fields/${one.id}`,
      { basinId: basin.id },
      ifMatch(one),
    );
    const first = await Promise.race([moving, soon("waits")]);
    await saves();
    expect(first).toBe("waits");
    const { status, body } = await moving;
    expect(status).toBe(422);
    expect(body.errors?.[0].detail).toContain(set.name);
  });
});

describe("totals on a dependence set", () => {
  it("answer 409 naming a set that cannot be had, and go on with the others", async () => {
    const approved = await buildApproved();
    const planner = await as("planner");
    const set = await buildSet();
    const { items } = made(await planner.get<Ranking>("/api/v1/fields?limit=1000"));
    const { id } = items.find(({ chosen }) =>
      chosen.some((one) => one.estimateId === approved.id),
    )!;
    const impossible = {
      ...independent,
      otherBasinsRank: 0.8,
      sharedFactors: [{ name: "Plant", note: "", rank: 0.5, fieldIds: [id] }],
    };
    // Nothing lets such a set in; should one be there all the same, a person has to know which.
    await queryRows("update dependence_sets set dependence = $1 where id = $2", [
      impossible,
      set.id,
    ]);
    const answer = await planner.get<Problem>(`/api/v1/portfolio?dependence=${set.id}`);
    expect(answer).toMatchObject({ status: 409, body: { code: "impossible_dependence" } });
    expect(answer.body.detail).toContain(set.name);
    expect((await planner.get("/api/v1/portfolio")).status).toBe(200);
    await queryRows("delete from dependence_sets where id = $1", [set.id]);
  });

  const get = async <Body>(path: string) => made(await (await as("planner")).get<Body>(path));

  it("are wider the more fields move together, with the same mean", async () => {
    const [apart, close] = [await buildSet(), await buildSet({ dependence: together })];
    const on = (set: DependenceSetView) => get<Statement>(`/api/v1/portfolio?dependence=${set.id}`);
    const [loose, tight] = [await on(apart), await on(close)];
    expect(loose.dependence).toEqual({ id: apart.id, name: apart.name, isDefault: false });
    const of = ({ totals }: Statement) => totals!.trialByTrial.condensateRecoverableStb;
    expect(of(tight).p90).toBeLessThan(of(loose).p90);
    expect(of(tight).p10).toBeGreaterThan(of(loose).p10);
    expect(of(tight).mean / of(loose).mean).toBeCloseTo(1, 9);
    const { diversification } = loose.totals!;
    expect(diversification.condensateRecoverableStb.p90).toBeGreaterThan(
      tight.totals!.diversification.condensateRecoverableStb.p90,
    );
    expect(diversification.liquidValue!.p10).toBeLessThan(0);
  });

  it("are the same for whoever leaves the set out and whoever names the default", async () => {
    const [{ id }] = await listSets();
    const [named, left] = [
      await get<Ranking>(`/api/v1/fields?dependence=${id}`),
      await get<Ranking>("/api/v1/fields"),
    ];
    expect(named.totals).toEqual(left.totals);
    expect(named.dependence).toEqual(left.dependence);
  });

  it("have contributions that add up to the total, of any selection", async () => {
    const { items } = await get<Ranking>("/api/v1/fields?limit=5");
    const ids = items.map(({ id }) => id).join(",");
    const { total } = await get<Together>(`/api/v1/fields/together?ids=${ids}&risk=risked`);
    const { contributions, trialByTrial } = total!;
    expect(contributions.map(({ fieldId }) => fieldId).sort()).toEqual(
      items.map(({ id }) => id).sort(),
    );
    for (const name of ["p90", "p50", "p10", "mean"] as const) {
      const sum = contributions.reduce((all, one) => all + one[name], 0);
      expect(sum / trialByTrial.condensateRecoverableStb[name]).toBeCloseTo(1, 9);
    }
    expect(contributions.reduce((all, one) => all + one.shareOfVariance, 0)).toBeCloseTo(1, 9);
  });

  it("answer 422 for a selection with a field that is not there, naming it", async () => {
    const planner = await as("planner");
    const { id } = await buildField();
    const answer = await planner.get<Problem>(`/api/v1/fields/together?ids=${id},${NOWHERE}`);
    expect(answer).toMatchObject({
      status: 422,
      body: { errors: [{ pointer: "#/ids", detail: `There is no field ${NOWHERE}.` }] },
    });
    const { total } = await get<Together>(`/api/v1/fields/together?ids=${id}`);
    expect(total, "a field without figures").toBeNull();
  });

  it("answer 404 for a set that is not there, and 400 for a word that is none", async () => {
    const planner = await as("planner");
    for (const path of ["portfolio", "fields", "exports/budget.csv", "exports/ranking.csv"]) {
      const answer = await planner.get(`/api/v1/${path}?dependence=${NOWHERE}`);
      expect(answer.status, path).toBe(404);
    }
    expect((await planner.get("/api/v1/portfolio?dependence=loose")).status).toBe(400);
  });
});

describe("totals drawn yes or no", () => {
  it("have the risked means within their sampling error, a lower P90 and a chance of nothing", async () => {
    const planner = await as("planner");
    const read = async (risk: string) =>
      made(await planner.get<Statement>(`/api/v1/portfolio?risk=${risk}`)).totals!;
    const [drawn, risked, unrisked] = [
      await read("yesNo"),
      await read("risked"),
      await read("unrisked"),
    ];
    const of = (total: typeof drawn) => total.trialByTrial.condensateRecoverableStb;
    const error = drawn.standardErrors.mean;
    expect(Math.abs(of(drawn).mean - of(risked).mean)).toBeLessThan(3 * error);
    expect(of(drawn).p90).toBeLessThan(of(risked).p90);
    expect(of(drawn).p10).toBeGreaterThan(of(risked).p10);
    // Some fields of the book are on production: their chance is 1, so something always comes.
    expect([drawn.chanceOfNothing, risked.chanceOfNothing, unrisked.chanceOfNothing]).toEqual([
      0,
      null,
      null,
    ]);
  });

  it("give a prospect its own chance of nothing, and nothing as its P90", async () => {
    const planner = await as("planner");
    const { items } = made(await planner.get<Ranking>("/api/v1/fields?risk=yesNo&limit=1000"));
    const unsure = items.find(
      ({ ranges, chanceOfCommerciality: chance }) => ranges !== null && chance < 0.9,
    )!;
    const { total } = made(
      await planner.get<Together>(`/api/v1/fields/together?risk=yesNo&ids=${unsure.id}`),
    );
    expect(total!.chanceOfNothing).toBeCloseTo(1 - unsure.chanceOfCommerciality, 9);
    expect(unsure.ranges!.condensateRecoverableStb.p90).toBe(0);
  });
});

describe("an estimate with another number of trials", () => {
  it("is in the totals by its ranks, with its own mean", async () => {
    const approved = await buildApproved();
    const planner = await as("planner");
    const { items, engine } = made(
      await planner.get<Ranking>("/api/v1/fields?limit=1000&interest=gross"),
    );
    const row = items.find(({ chosen }) => chosen.some((one) => one.estimateId === approved.id))!;
    expect(row.chosen[0].trials).toBe(1000);
    expect(engine!.trials).not.toBe(1000);
    expect(row.leftOut).toEqual([]);
    const own = approved.summary!.results.condensateRecoverableStb;
    const { condensateRecoverableStb: shown } = row.ranges!;
    expect(shown.mean / own.mean).toBeCloseTo(1, 2);
    expect(shown.p50 / own.p50).toBeCloseTo(1, 2);
  });
});
