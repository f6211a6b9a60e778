import { describe, expect, it } from "vitest";
import { visitor } from "../support/api";

describe("GET /api/v1/health", () => {
  it("answers 200 to anybody while the database answers", async () => {
    const answer = await visitor().get("/api/v1/health");
    expect(answer.status).toBe(200);
    expect(answer.body).toEqual({ status: "ok" });
  });
});
