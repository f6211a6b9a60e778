import { parse } from "csv-parse/sync";
import { describe, expect, it } from "vitest";
import type { Problem } from "@/app/_server/problem";
import type { Ranking, RankingRow, Together } from "@/app/api/v1/fields/ranking-schema";
import type { Statement } from "@/app/api/v1/portfolio/schema";
import { roles } from "@/models/vocabulary";
import { as, made } from "../factories";
import { visitor } from "../support/api";
import { queryRows } from "../support/database";

type Row = Record<string, string>;

async function get<Body>(path: string): Promise<Body> {
  return made(await (await as("planner")).get<Body>(path));
}
const ranking = (search = "") => get<Ranking>(`/api/v1/fields?limit=1000${search}`);
async function csv(path: string): Promise<Row[]> {
  return parse(await get<string>(path), { columns: true, bom: true });
}
const valueOf = (row: RankingRow) => row.ranges?.liquidValue?.mean ?? null;
const counted = ({ items }: Ranking) => items.filter(({ ranges }) => ranges !== null);
const sum = (values: readonly number[]) => values.reduce((total, value) => total + value, 0);

/** Stored trials of the approved revisions of a field, as the database has them. */
async function storedTrials(fieldId: string): Promise<Float32Array[]> {
  const rows = await queryRows<{ bytes: Buffer }>(
    `select t.condensate_recoverable_stb as bytes
       from estimate_trials t join estimates e on e.id = t.estimate_id
       join reservoirs r on r.id = e.reservoir_id
      where e.state = 'approved' and r.field_id = $1`,
    [fieldId],
  );
  return rows.map(({ bytes }) => new Float32Array(Uint8Array.from(bytes).buffer));
}

/** R-7 (Hyndman and Fan 1996), written out for this test. */
function quantile(sorted: Float32Array, p: number): number {
  const h = (sorted.length - 1) * p;
  const low = Math.floor(h);
  return sorted[low] + (h - low) * ((sorted[low + 1] ?? sorted[low]) - sorted[low]);
}

describe("GET /api/v1/fields", () => {
  it("ranks by mean liquid value, largest first, fields without an estimate last", async () => {
    const { items, total, fieldsInAll } = await ranking();
    expect(items.length).toBe(total);
    expect(total).toBe(fieldsInAll);
    const means = items.map(valueOf);
    const known = means.filter((mean) => mean !== null);
    expect(known.length).toBeGreaterThan(15);
    expect(known).toEqual([...known].sort((a, b) => b - a));
    expect(means.slice(known.length).every((mean) => mean === null)).toBe(true);
    expect(items.slice(0, known.length).map(({ rank }) => rank)).toEqual(
      known.map((_, i) => i + 1),
    );
  });

  it("has for a field of one reservoir the percentiles of its stored trials, net and priced", async () => {
    const { items, prices, engine } = await ranking();
    const single = items.filter(({ chosen, ranges }) => ranges !== null && chosen.length === 1);
    const stored = await Promise.all(single.map(({ id }) => storedTrials(id)));
    // Only a revision with as many trials as totals have comes through row for row; others join by their ranks.
    const at = stored.findIndex(([trials]) => trials.length === engine!.trials);
    const row = single[at];
    const [trials] = stored[at];
    const sorted = trials.slice().sort();
    const factor = row.netRevenueInterest * prices!.condensatePerStb!;
    const value = row.ranges!.liquidValue!;
    expect(value.p90 / (factor * quantile(sorted, 0.1))).toBeCloseTo(1, 6);
    expect(value.p50 / (factor * quantile(sorted, 0.5))).toBeCloseTo(1, 6);
    expect(value.p10 / (factor * quantile(sorted, 0.9))).toBeCloseTo(1, 6);
    expect(value.mean / ((factor * sum([...trials])) / trials.length)).toBeCloseTo(1, 6);
  });

  it("adds fields of several reservoirs up to the mean of all their stored trials", async () => {
    const { items } = await ranking();
    const row = items.find(({ chosen }) => chosen.length > 1)!;
    const vectors = await storedTrials(row.id);
    const mean = sum(vectors.map((trials) => sum([...trials]) / trials.length));
    const shown = row.ranges!.condensateRecoverableStb.mean;
    expect(shown / (row.netRevenueInterest * mean)).toBeCloseTo(1, 6);
  });

  it("has a total whose mean is the sum of the means and whose P90 is above the sum of the P90s", async () => {
    const page = await ranking();
    const { trialByTrial, arithmeticSum, fields } = page.totals!;
    const rows = counted(page);
    expect(fields).toBe(rows.length);
    const means = sum(rows.map((row) => row.ranges!.salesGasScf.mean));
    expect(trialByTrial.salesGasScf.mean / means).toBeCloseTo(1, 9);
    const p90s = sum(rows.map((row) => row.ranges!.condensateRecoverableStb.p90));
    expect(arithmeticSum.condensateRecoverableStb.p90 / p90s).toBeCloseTo(1, 9);
    expect(trialByTrial.condensateRecoverableStb.p90).toBeGreaterThan(p90s);
    expect(trialByTrial.condensateRecoverableStb.p90).toBeLessThan(
      trialByTrial.condensateRecoverableStb.p50,
    );
  });

  it("has net = interest x gross and risked mean = chance x unrisked mean, field by field", async () => {
    const [net, gross, risked] = [
      await ranking(),
      await ranking("&interest=gross"),
      await ranking("&risk=risked"),
    ];
    const meanOf = (page: Ranking, id: string) =>
      page.items.find((row) => row.id === id)!.ranges!.condensateRecoverableStb.mean;
    for (const row of counted(net)) {
      const mean = meanOf(net, row.id);
      expect(mean / (row.netRevenueInterest * meanOf(gross, row.id))).toBeCloseTo(1, 9);
      expect(meanOf(risked, row.id) / (row.chanceOfCommerciality * mean)).toBeCloseTo(1, 9);
    }
  });

  it("changes values with the price case and leaves volumes as they are", async () => {
    const [mid, low] = [await ranking(), await ranking("&case=low")];
    expect(low.prices!.condensatePerStb).toBeLessThan(mid.prices!.condensatePerStb!);
    expect(low.totals!.trialByTrial.salesGasScf).toEqual(mid.totals!.trialByTrial.salesGasScf);
    expect(
      low.totals!.trialByTrial.liquidValue!.p10 / low.prices!.condensatePerStb! -
        mid.totals!.trialByTrial.liquidValue!.p10 / mid.prices!.condensatePerStb!,
    ).toBeCloseTo(0, 3);
  });

  it("filters, and totals what it shows", async () => {
    const page = await ranking("&basin=corrith&class=contingent");
    expect(page.items.length).toBeGreaterThan(1);
    expect(page.items.length).toBeLessThan(page.fieldsInAll);
    for (const { basin, prmsClass } of page.items) {
      expect([basin.slug, prmsClass]).toEqual(["corrith", "contingent"]);
    }
    expect(page.totals!.fields).toBe(counted(page).length);
  });

  it("sorts by any column, in pages that have the whole's total", async () => {
    const whole = await ranking("&sort=yield&direction=ascending");
    const page = await get<Ranking>(
      "/api/v1/fields?sort=yield&direction=ascending&limit=5&offset=5",
    );
    expect(page.items.map(({ id }) => id)).toEqual(whole.items.slice(5, 10).map(({ id }) => id));
    expect(page.total).toBe(whole.total);
    expect(page.totals).toEqual(whole.totals);
  });

  it("counts drafts too on the basis of the latest estimates", async () => {
    const [approved, latest] = [await ranking(), await ranking("&estimates=latest")];
    expect(counted(latest).length).toBeGreaterThan(counted(approved).length);
  });

  it("names fields without an estimate and does not count them as zero", async () => {
    const { items, totals } = await ranking("&state=none");
    expect(items.map(({ name }) => name)).toEqual(
      expect.arrayContaining(["Askerdale", "Hesper Reach"]),
    );
    expect(totals).toBeNull();
    expect(items.every(({ leftOut, rank }) => leftOut.length > 0 || rank === null)).toBe(true);
  });

  it("answers 400 for a column or a class that there is not", async () => {
    const planner = await as("planner");
    const answer = await planner.get<Problem>("/api/v1/fields?sort=colour&class=best");
    expect(answer.status).toBe(400);
    expect(answer.body.errors!.length).toBe(2);
  });

  it("answers 404 for a deck that is not published", async () => {
    const planner = await as("planner");
    const deck = "00000000-0000-4000-8000-000000000000";
    expect((await planner.get(`/api/v1/fields?deck=${deck}`)).status).toBe(404);
  });

  it("answers 401 to a visitor", async () => {
    expect((await visitor().get("/api/v1/fields")).status).toBe(401);
  });
});

describe("GET /api/v1/fields/together", () => {
  it("gives one field alone what the ranking gives it", async () => {
    const [first] = (await ranking()).items;
    const { total } = await get<Together>(`/api/v1/fields/together?ids=${first.id}`);
    for (const [quantity, range] of Object.entries(first.ranges!)) {
      const alone = total!.trialByTrial[quantity as keyof typeof first.ranges];
      for (const name of ["p90", "p50", "p10", "mean"] as const) {
        expect(alone![name] / range![name], `${quantity} ${name}`).toBeCloseTo(1, 9);
      }
    }
  });

  it("adds several trial by trial, narrower than their percentiles add up to", async () => {
    const rows = counted(await ranking()).slice(0, 3);
    const ids = rows.map(({ id }) => id).join(",");
    const { total } = await get<Together>(`/api/v1/fields/together?ids=${ids}`);
    const { trialByTrial, arithmeticSum, fields } = total!;
    expect(fields).toBe(3);
    expect(trialByTrial.liquidValue!.mean / sum(rows.map((row) => valueOf(row)!))).toBeCloseTo(
      1,
      9,
    );
    expect(trialByTrial.liquidValue!.p90).toBeGreaterThan(arithmeticSum.liquidValue!.p90);
    expect(trialByTrial.liquidValue!.p10).toBeLessThan(arithmeticSum.liquidValue!.p10);
  });

  it("answers 400 without ids", async () => {
    expect((await (await as("planner")).get("/api/v1/fields/together")).status).toBe(400);
  });
});

describe("GET /api/v1/portfolio", () => {
  it("agrees with the ranking's totals", async () => {
    const statement = await get<Statement>("/api/v1/portfolio");
    const { totals } = await ranking();
    expect(statement.totals!.trialByTrial).toEqual(totals!.trialByTrial);
    expect(statement.totals!.arithmeticSum).toEqual(totals!.arithmeticSum);
    expect(statement.counted).toBe(totals!.fields);
  });

  it("splits the mean into named fields and the others, and into basins and classes, exactly", async () => {
    const { totals, fields, others, basins } = await get<Statement>("/api/v1/portfolio");
    const mean = totals!.trialByTrial.condensateRecoverableStb.mean;
    const named = sum(fields.map((row) => row.ranges!.condensateRecoverableStb.mean));
    const rest = others?.trialByTrial.condensateRecoverableStb.mean ?? 0;
    expect((named + rest) / mean).toBeCloseTo(1, 9);
    const cells = basins.flatMap(({ condensateMeanStbByClass }) =>
      Object.values(condensateMeanStbByClass).map((cell) => cell ?? 0),
    );
    expect(sum(cells) / mean).toBeCloseTo(1, 9);
    expect(sum(basins.map(({ shareOfVariance }) => shareOfVariance))).toBeCloseTo(1, 9);
  });

  it("has an exceedance curve that passes through P90, P50 and P10", async () => {
    const { totals } = await get<Statement>("/api/v1/portfolio");
    const { values, probabilities } = totals!.condensateExceedance;
    const { p90, p50, p10 } = totals!.trialByTrial.condensateRecoverableStb;
    const at = (chance: number) =>
      values[probabilities.findIndex((known) => Math.abs(known - chance) < 1e-9)];
    expect([at(0.9), at(0.5), at(0.1)]).toEqual([p90, p50, p10]);
  });

  it("points at the revision that waits, and at what approving it would do", async () => {
    const { attention } = await get<Statement>("/api/v1/portfolio");
    const waiting = attention.find(
      (item) => item.kind === "submitted" && item.name === "Pellow North",
    );
    expect(waiting).toMatchObject({ fieldSlug: "pellow-north", revisions: [{ revision: 4 }] });
    // Net thickness was typed as gross, 1.62 times too much: it must add a good part of the reservoir.
    expect(waiting?.kind === "submitted" && waiting.changeStb).toBeGreaterThan(1e6);
  });

  it("names every field whose recovery nobody measured, with their share of the liquid", async () => {
    const { attention, totals } = await get<Statement>("/api/v1/portfolio");
    const unmeasured = attention.find((item) => item.kind === "unmeasured");
    const weak = counted(await ranking()).filter(
      ({ recoveryRoute }) =>
        recoveryRoute === "correlation" || recoveryRoute === "untunedEquationOfState",
    );
    expect(weak.length).toBeGreaterThan(0);
    const named = unmeasured!.fields.map(({ name }) => name);
    expect(named).toEqual(expect.arrayContaining(weak.map(({ name }) => name)));
    const known = sum(weak.map(({ ranges }) => ranges!.condensateRecoverableStb.mean));
    const total = totals!.trialByTrial.condensateRecoverableStb.mean;
    expect(unmeasured!.share).toBeGreaterThanOrEqual(known / total - 1e-9);
    expect(unmeasured!.share).toBeLessThan(1);
  });

  it("finds the same wide ranges whether a chance scales every trial or decides each of them", async () => {
    const wideUnder = async (risk: string) => {
      const { attention } = await get<Statement>(`/api/v1/portfolio?risk=${risk}`);
      return new Map(
        attention.flatMap((item) =>
          item.kind === "field" && item.spread !== null ? [[item.name, item.spread] as const] : [],
        ),
      );
    };
    const [risked, yesNo] = [await wideUnder("risked"), await wideUnder("yesNo")];
    expect(risked.size).toBeGreaterThan(0);
    expect([...yesNo.keys()].sort()).toEqual([...risked.keys()].sort());
    for (const [name, spread] of yesNo) expect(spread).toBeCloseTo(risked.get(name)!, 9);
  });

  it("explains the year's change of the mean in steps that add up", async () => {
    const { year, totals } = await get<Statement>("/api/v1/portfolio");
    const change = sum(year!.moves.map(({ changeStb }) => changeStb));
    const now = totals!.trialByTrial.condensateRecoverableStb.mean;
    // Revisions with another number of trials join the total by their ranks, which moves a mean by about 1 in 10,000.
    expect((year!.condensateMeanBeforeStb + change) / now).toBeCloseTo(1, 3);
  });

  it("is open to every role", async () => {
    for (const role of roles) {
      expect((await (await as(role)).get("/api/v1/portfolio")).status).toBe(200);
    }
  });
});

describe("GET /api/v1/exports/ranking.csv", () => {
  const view = "sort=name&direction=ascending&class=reserves";
  const columns = "basin,class,yield,liquidValueP90,liquidValueMean,salesGasMean,rankRange";

  it("has exactly the rows, the order, the columns and the figures of the same address", async () => {
    const page = await get<Ranking>(`/api/v1/fields?limit=1000&${view}`);
    const rows = await csv(`/api/v1/exports/ranking.csv?${view}&columns=${columns}`);
    const fields = rows.filter((row) => row.row_kind === "field");
    expect(fields.map((row) => row.field)).toEqual(page.items.map(({ name }) => name));
    expect(Object.keys(rows[0]).slice(0, 11)).toEqual([
      "row_kind",
      "rank",
      "field",
      "basin",
      "prms_class",
      "condensate_yield_stb_per_mmscf",
      "liquid_value_p90_million",
      "liquid_value_mean_million",
      "sales_gas_mean_bscf",
      "rank_best_of_80_percent",
      "rank_worst_of_80_percent",
    ]);
    for (const [index, item] of page.items.entries()) {
      const ranges = item.ranges;
      if (!ranges) continue;
      expect(Number(fields[index].liquid_value_p90_million) * 1e6).toBeCloseTo(
        ranges.liquidValue!.p90,
        3,
      );
      expect(Number(fields[index].sales_gas_mean_bscf) * 1e9).toBeCloseTo(
        ranges.salesGasScf.mean,
        0,
      );
    }
  });

  it("names the total and the arithmetic sum for what they are", async () => {
    const { totals } = await get<Ranking>(`/api/v1/fields?${view}`);
    const rows = await csv(`/api/v1/exports/ranking.csv?${view}&columns=${columns}`);
    const [total, arithmetic] = rows.slice(-2);
    expect([total.row_kind, arithmetic.row_kind]).toEqual([
      "total_trial_by_trial",
      "arithmetic_sum",
    ]);
    expect(Number(total.liquid_value_p90_million) * 1e6).toBeCloseTo(
      totals!.trialByTrial.liquidValue!.p90,
      3,
    );
    expect(Number(arithmetic.liquid_value_p90_million) * 1e6).toBeCloseTo(
      totals!.arithmeticSum.liquidValue!.p90,
      3,
    );
  });

  it("carries its basis on every row, and follows its units", async () => {
    const rows = await csv("/api/v1/exports/ranking.csv?interest=gross&units=metric&base=metric");
    for (const row of rows) {
      expect(row).toMatchObject({
        interest: "gross",
        risk: "unrisked",
        estimates: "approved",
        currency: "USD",
        standard_conditions: "101.325 kPa, 15 °C",
      });
    }
    expect(Object.keys(rows[0])).toContain("sales_gas_mean_billion_sm3");
  });

  it("is a file to save, in CRLF and UTF-8", async () => {
    const answer = await (await as("executive")).get<string>("/api/v1/exports/ranking.csv");
    expect(answer.status).toBe(200);
    expect(answer.headers.get("content-type")).toContain("text/csv; charset=utf-8");
    expect(answer.headers.get("content-disposition")).toMatch(
      /^attachment; filename="dewledger-ranking-\d{4}-\d\d-\d\d\.csv"$/,
    );
    expect(answer.body.replaceAll("\r\n", "")).not.toMatch(/[\r\n]/);
  });
});

describe("GET /api/v1/exports/budget.csv", () => {
  it("has one row a field and a total that agrees with the ranking", async () => {
    const rows = await csv("/api/v1/exports/budget.csv");
    const page = await ranking();
    const kinds = (kind: string) => rows.filter((row) => row.row_kind === kind);
    expect(kinds("field").length).toBe(counted(page).length);
    expect(kinds("field").length + kinds("field_without_estimate").length).toBe(page.total);
    const [total] = kinds("total");
    const { condensateRecoverableStb, liquidValue } = page.totals!.trialByTrial;
    expect(Number(total.condensate_recoverable_p90_stb)).toBe(condensateRecoverableStb.p90);
    expect(Number(total.liquid_value_mean)).toBe(liquidValue!.mean);
    const means = sum(kinds("field").map((row) => Number(row.liquid_value_mean)));
    expect(means / Number(total.liquid_value_mean)).toBeCloseTo(1, 9);
  });

  it("leaves the figures of a field without an estimate empty", async () => {
    const rows = await csv("/api/v1/exports/budget.csv");
    const row = rows.find(({ field_name }) => field_name === "Askerdale")!;
    expect(row).toMatchObject({
      row_kind: "field_without_estimate",
      liquid_value_mean: "",
      sales_gas_p90_mmscf: "",
    });
  });

  it("traces every field to the revisions it stands on, with ISO dates", async () => {
    for (const row of await csv("/api/v1/exports/budget.csv")) {
      expect(row.price_deck_as_of).toMatch(/^\d{4}-\d\d-\d\d$/);
      if (row.row_kind !== "field") continue;
      expect(row.estimates_effective_on).toMatch(/^\d{4}-\d\d-\d\d$/);
      expect(row.estimate_ids.split("; ").length).toBe(Number(row.reservoirs_counted));
    }
  });

  it("says at the end by which dependence set it adds up, and how risk counts", async () => {
    for (const name of ["budget.csv", "ranking.csv"]) {
      const rows = await csv(`/api/v1/exports/${name}?risk=yesNo`);
      expect(Object.keys(rows[0]).at(-1)).toBe("dependence_set");
      for (const row of rows) {
        expect([row.risk, row.dependence_set]).toEqual(["yes_no", "By basin"]);
      }
    }
  });

  it("has the columns that its dictionary explains, in the same order", async () => {
    const [first] = await csv("/api/v1/exports/budget.csv");
    const dictionary = await csv("/api/v1/exports/budget-dictionary.csv");
    expect(dictionary.map(({ name }) => name)).toEqual(Object.keys(first));
  });

  it("keeps its units whatever the screen shows", async () => {
    const [one] = await csv("/api/v1/exports/budget.csv");
    const [other] = await csv("/api/v1/exports/budget.csv?units=metric&base=14.65");
    expect(other).toEqual(one);
  });

  it("answers 403 to an administrator and 401 to a visitor", async () => {
    for (const name of ["budget.csv", "ranking.csv", "budget-dictionary.csv"]) {
      const path = `/api/v1/exports/${name}`;
      expect((await (await as("administrator")).get(path)).status).toBe(403);
      expect((await visitor().get(path)).status).toBe(401);
    }
  });
});
