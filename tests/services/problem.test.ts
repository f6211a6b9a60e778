import { describe, expect, it } from "vitest";
import { problemResponse } from "@/app/_server/problem";
import { ServiceBusyError } from "@/services/errors";

const origin = { instance: "/api/v1/somewhere", requestId: "request-1", present: () => null };

describe("problemResponse", () => {
  it("asks the caller of a busy service to come back in a few seconds", async () => {
    const response = problemResponse(new ServiceBusyError(), origin);
    expect(response.status).toBe(503);
    expect(response.headers.get("retry-after")).toBe("5");
    expect(await response.json()).toMatchObject({ title: "Service Unavailable", code: "busy" });
  });

  it("tells nobody what went wrong inside", async () => {
    const response = problemResponse(new Error("password is hunter2"), origin);
    expect(response.status).toBe(500);
    expect(await response.text()).not.toContain("hunter2");
  });
});
