import { describe, expect, it } from "vitest";
import { createRandom, fillPermutation, RandomStream, streamOf } from "@/analytics/numerics/random";

const draw = (random: RandomStream, count: number) => {
  const words = new Uint32Array(count);
  random.fill(words);
  return words;
};

describe("RandomStream", () => {
  it("gives the outputs of the authors' C program", () => {
    // Blackman and Vigna, xoshiro128starstar.c 1.1, run for the test data of the public project xoshiro-6502.
    const random = new RandomStream([0x964d4a0c, 0xd40ab895, 0xad7fdecb, 0x3006f0f0]);
    expect([...draw(random, 4)]).toEqual([0xf1391922, 0x6fe53806, 0xa5be2840, 0xf510ee70]);
  });

  it("continues where the last block ended", () => {
    const whole = draw(createRandom(7, 3), 10);
    const parts = createRandom(7, 3);
    expect([...draw(parts, 4), ...draw(parts, 6)]).toEqual([...whole]);
  });
});

describe("createRandom", () => {
  it("repeats itself for the same seed and stream", () => {
    expect(draw(createRandom(42, 5), 8)).toEqual(draw(createRandom(42, 5), 8));
  });

  it("gives different numbers for neighbouring seeds, streams and seeds above 32 bits", () => {
    const firsts = [
      [1, 0],
      [2, 0],
      [1, 1],
      [0, 1],
      [1 + 2 ** 32, 0],
    ].map(([seed, stream]) => draw(createRandom(seed, stream), 1)[0]);
    expect(new Set(firsts).size).toBe(firsts.length);
  });

  it("has no visible correlation between neighbouring streams", () => {
    const n = 20_000;
    const uniform = (stream: number) =>
      [...draw(createRandom(9, stream), n)].map((w) => w / 2 ** 32 - 0.5);
    const a = uniform(0);
    const b = uniform(1);
    const correlation = (12 * a.reduce((sum, value, i) => sum + value * b[i], 0)) / n;
    // Four standard errors of independent uniforms.
    expect(Math.abs(correlation)).toBeLessThan(4 / Math.sqrt(n));
  });
});

describe("streamOf", () => {
  it("keeps names that differ in one letter apart", () => {
    const streams = Array.from({ length: 1000 }, (_, i) => streamOf(`reservoir-${i}`));
    expect(new Set(streams).size).toBe(1000);
  });
});

describe("fillPermutation", () => {
  it("writes every index once", () => {
    const out = new Uint32Array(1000);
    fillPermutation(createRandom(1, 1), out, 1000, new Uint32Array(1000));
    expect([...out].sort((a, b) => a - b)).toEqual(Array.from({ length: 1000 }, (_, i) => i));
  });

  it("gives all six orders of three equally often", () => {
    const random = createRandom(3, 0);
    const out = new Uint32Array(3);
    const words = new Uint32Array(3);
    const counts = new Map<string, number>();
    for (let i = 0; i < 12_000; i += 1) {
      fillPermutation(random, out, 3, words);
      counts.set(out.join(), (counts.get(out.join()) ?? 0) + 1);
    }
    expect(counts.size).toBe(6);
    const chiSquare = [...counts.values()].reduce((sum, n) => sum + (n - 2000) ** 2 / 2000, 0);
    // 99.9 % point of chi-square with five degrees of freedom.
    expect(chiSquare).toBeLessThan(20.52);
  });
});
