import path from "node:path";
import { existsSync } from "node:fs";
import { Piscina } from "piscina";
import { streamOf } from "@/analytics/numerics/random";
import type { BenchReservoir } from "./workload";

/**
 * Milliseconds for the simulations of all reservoirs on one and on two threads of the product's own worker bundle;
 * null when it has not been built.
 */
export async function measureThreads(reservoirs: readonly BenchReservoir[], trials: number) {
  const filename = path.resolve(import.meta.dirname, "../../dist/workers/compute.mjs");
  if (!existsSync(filename)) return null;
  return {
    oneThread: await timePool(filename, 1, reservoirs, trials),
    twoThreads: await timePool(filename, 2, reservoirs, trials),
  };
}

async function timePool(
  filename: string,
  threads: number,
  reservoirs: readonly BenchReservoir[],
  trials: number,
): Promise<number> {
  const pool = new Piscina({ filename, minThreads: threads, maxThreads: threads });
  const run = async (batch: readonly BenchReservoir[]) => {
    await Promise.all(
      batch.map(({ id, inputs }) =>
        pool.run({ inputs, options: { trials, seed: streamOf(id) } }, { name: "simulate" }),
      ),
    );
  };
  await run(reservoirs.slice(0, 40));
  const start = performance.now();
  await run(reservoirs);
  const elapsed = performance.now() - start;
  await pool.destroy();
  return elapsed;
}
