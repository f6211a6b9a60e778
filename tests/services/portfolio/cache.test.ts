import { describe, expect, it } from "vitest";
import { ByteBoundedCache } from "@/services/portfolio/cache";

function counted(capacity: number) {
  const computed: string[] = [];
  const cache = new ByteBoundedCache<string>(capacity, (value) => value.length);
  const get = (key: string, value = key) =>
    cache.get(key, async () => {
      computed.push(key);
      return value;
    });
  return { cache, computed, get };
}

describe("ByteBoundedCache.get(key, compute)", () => {
  it("computes a value once, also when it is asked for twice at a time", async () => {
    const { computed, get } = counted(100);
    await Promise.all([get("a"), get("a")]);
    await get("a");
    expect(computed).toEqual(["a"]);
  });

  it("forgets what was used longest ago when the bytes run out", async () => {
    const { cache, computed, get } = counted(4);
    await get("aa");
    await get("bb");
    await get("aa");
    await get("cc");
    expect(cache.size).toBe(4);
    await get("aa");
    expect(computed).toEqual(["aa", "bb", "cc"]);
    await get("bb");
    expect(computed).toEqual(["aa", "bb", "cc", "bb"]);
  });

  it("returns a value that is larger than all its room without keeping it", async () => {
    const { cache, get } = counted(3);
    expect(await get("a", "too long")).toBe("too long");
    expect(cache.size).toBe(0);
  });

  it("does not keep a failure", async () => {
    const { cache, get } = counted(100);
    const failing = cache.get("a", () => Promise.reject(new Error("no connection")));
    await expect(failing).rejects.toThrow("no connection");
    expect(await get("a")).toBe("a");
  });
});
