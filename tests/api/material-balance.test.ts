import { describe, expect, it } from "vitest";
import type { Problem } from "@/app/_server/problem";
import {
  materialBalanceResponseSchema,
  type MaterialBalanceResponse,
} from "@/app/api/v1/calculations/material-balance-schema";
import { materialBalanceExample } from "@/app/(tools)/api-guide/_components/fluid-examples";
import { as } from "../factories";
import { visitor } from "../support/api";

const path = "/api/v1/calculations/material-balance";
const question = materialBalanceExample;

async function refused(changes: object): Promise<Problem> {
  const engineer = await as("engineer");
  const answer = await engineer.post<Problem>(path, { ...question, ...changes });
  expect(answer.status).toBe(422);
  expect(answer.headers.get("content-type")).toBe("application/problem+json");
  return answer.body;
}

const pointersOf = ({ errors }: Problem) => errors?.map(({ pointer }) => pointer);

describe("POST /api/v1/calculations/material-balance", () => {
  it("gives the gas in place whose foot the line stands on, and what the gas's own z would say", async () => {
    const executive = await as("executive");
    const { status, body } = await executive.post<MaterialBalanceResponse>(path, question);
    expect(status).toBe(200);
    materialBalanceResponseSchema.parse(body);
    const [first] = body.points;
    // Two points of one straight line: p/z at no production, and none at the foot.
    expect(first.linePressureOverZ).toBeCloseTo(
      body.line.initialPressureOverZ *
        (1 - first.wellstreamProducedScf / body.wellstreamInPlaceScf),
      6,
    );
    // A wellstream is its dry gas and the vapour of its condensate.
    expect(
      body.dryGasInPlaceScf + body.vapourEquivalentScfPerStb * body.condensateInPlaceStb,
    ).toBeCloseTo(body.wellstreamInPlaceScf, -2);
    expect(body.withGasZ?.bias).toBeLessThan(0);
  });

  it("does with a separator test alone, and says what that costs", async () => {
    const engineer = await as("engineer");
    const { body } = await engineer.post<MaterialBalanceResponse>(path, {
      ...question,
      curve: null,
    });
    expect(body.withGasZ).toBeNull();
    expect(body.warnings.map(({ code }) => code)).toContain("gas_z_below_dew_point");
  });

  it("refuses at its field a production that does not rise, and too few pressures", async () => {
    const [first, second, third] = question.records;
    const falling = await refused({ records: [first, third, second] });
    expect(pointersOf(falling)).toEqual(["#/records/2/surfaceGasScf"]);
    expect(pointersOf(await refused({ records: [first, second] }))).toEqual(["#/records"]);
  });

  it("refuses more records than a line needs", async () => {
    const many = await refused({ records: Array.from({ length: 201 }, () => question.records[0]) });
    expect(pointersOf(many)).toEqual(["#/records"]);
  });

  it("answers 401 to a visitor", async () => {
    expect((await visitor().post(path, question)).status).toBe(401);
  });
});
