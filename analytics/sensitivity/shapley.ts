import { DomainError } from "../errors";
import { createRandom, fillPermutation } from "../numerics/random";

/** The value of making some of the changes; `made[i]` says whether change i is among them. */
export type ValueOf = (made: readonly boolean[]) => number;

export interface Attribution {
  /** none of the changes, and all of them */
  from: number;
  to: number;
  /** in the order of the changes; they add up to `to - from` */
  effects: number[];
  /** of the average over drawn orders; null when all orders were taken */
  standardErrors: number[] | null;
  /** orders of making the changes that were averaged over */
  orders: "all" | number;
}

/** Up to this many changes, every set of them is evaluated: 64 evaluations. */
export const MOST_EXACT = 6;
/** Orders drawn for more changes: 32 and their reverses. */
export const DRAWN_ORDERS = 64;

/**
 * How much each of several changes explains of a move, averaged over all orders of making them one by one (the value of
 * L. S. Shapley). Effects add up to the move; a change that never matters gets 0; two changes that always do the same get
 * the same.
 *
 * With more than six changes the average is over 64 orders drawn at random, each second one the reverse of the one before
 * (antithetic: what comes early in one comes late in the other). The effects of every single order add up to the move, so
 * those of the average do. Standard errors are those of the 32 pairs' means.
 *
 * @param count    number of changes
 * @param valueOf  asked once for each set of changes
 * @param seed     draws the orders
 * @see L. S. Shapley, A value for n-person games, Contributions to the Theory of Games II (1953) 307-317; J. Castro,
 *      D. Gomez, J. Tejada, Polynomial calculation of the Shapley value based on sampling, Comput. Oper. Res. 36 (2009)
 *      1726-1730; E. Song, B. L. Nelson, J. Staum, Shapley effects for global sensitivity analysis, SIAM/ASA J. Uncertain.
 *      Quantif. 4 (2016) 1060-1083
 */
export function shapley(count: number, valueOf: ValueOf, seed: number): Attribution {
  const value = remembering(valueOf);
  const ends = {
    from: value(new Array<boolean>(count).fill(false)),
    to: value(new Array<boolean>(count).fill(true)),
  };
  if (count <= MOST_EXACT) {
    return { ...ends, effects: exactEffects(count, value), standardErrors: null, orders: "all" };
  }
  const pairs = drawOrders(count, seed).map((order) => {
    const forward = effectsInOrder(order, value);
    const backward = effectsInOrder([...order].reverse(), value);
    return forward.map((effect, i) => (effect + backward[i]) / 2);
  });
  const of = (i: number) => pairs.map((effects) => effects[i]);
  const effects = Array.from({ length: count }, (_, i) => mean(of(i)));
  return {
    ...ends,
    effects,
    standardErrors: effects.map((effect, i) => {
      const squares = mean(of(i).map((one) => (one - effect) ** 2));
      return Math.sqrt(squares / (pairs.length - 1));
    }),
    orders: DRAWN_ORDERS,
  };
}

/** Sets of changes that {@link shapley} asks for: no more than this. */
export function evaluationsFor(count: number): number {
  return count <= MOST_EXACT ? 2 ** count : DRAWN_ORDERS * (count - 1) + 2;
}

function remembering(valueOf: ValueOf): ValueOf {
  const known = new Map<string, number>();
  return (made) => {
    const key = made.map(Number).join("");
    const before = known.get(key);
    if (before !== undefined) return before;
    const value = valueOf(made);
    if (!Number.isFinite(value)) {
      throw new DomainError("A set of changes has no finite value.", { input: "changes" });
    }
    known.set(key, value);
    return value;
  };
}

function exactEffects(count: number, value: ValueOf): number[] {
  const effects = new Array<number>(count).fill(0);
  for (let set = 0; set < 2 ** count; set += 1) {
    const made = Array.from({ length: count }, (_, i) => (set & (1 << i)) !== 0);
    const size = made.filter(Boolean).length;
    // Orders in which exactly this set comes before change i: size! (count - size - 1)! of count!.
    const weight = (factorial(size) * factorial(count - size - 1)) / factorial(count);
    for (let i = 0; i < count; i += 1) {
      if (made[i]) continue;
      effects[i] += weight * (value(made.with(i, true)) - value(made));
    }
  }
  return effects;
}

const factorial = (n: number): number => (n <= 1 ? 1 : n * factorial(n - 1));

function effectsInOrder(order: readonly number[], value: ValueOf): number[] {
  const made = new Array<boolean>(order.length).fill(false);
  const effects = new Array<number>(order.length).fill(0);
  let before = value(made);
  for (const change of order) {
    made[change] = true;
    const after = value(made);
    effects[change] = after - before;
    before = after;
  }
  return effects;
}

function drawOrders(count: number, seed: number): number[][] {
  const words = new Uint32Array(count);
  const order = new Uint32Array(count);
  const random = createRandom(seed, 0);
  return Array.from({ length: DRAWN_ORDERS / 2 }, () => {
    fillPermutation(random, order, count, words);
    return [...order];
  });
}

function mean(values: readonly number[]): number {
  return values.reduce((sum, value) => sum + value, 0) / values.length;
}
