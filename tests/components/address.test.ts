import { describe, expect, it } from "vitest";
import { safePath } from "@/app/_client/address";

describe("safePath", () => {
  it.each([
    ["/fields?units=metric#top", "/fields?units=metric#top"],
    [undefined, "/"],
    ["https://elsewhere.example/", "/"],
    ["//elsewhere.example/", "/"],
    ["/\\elsewhere.example/", "/"],
    ["javascript:alert(1)", "/"],
    ["/sign-in?callbackUrl=/fields", "/"],
  ])("goes from %j to %j", (wanted, path) => {
    expect(safePath(wanted)).toBe(path);
  });
});
