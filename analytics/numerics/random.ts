/**
 * Seeded random numbers: xoshiro128** 1.1, 128 bits of state, period 2^128 - 1.
 *
 * One stream per (seed, stream): the four state words are a splitmix-style hash of both, so streams of one seed are
 * unrelated for all practical purposes and any of them can be made without making the others first. That is what
 * lets a pool of threads of any size produce the same bytes.
 *
 * @see D. Blackman, S. Vigna, Scrambled linear pseudorandom number generators, ACM Trans. Math. Softw. 47 (2021) 36,
 *      doi:10.1145/3460772; public-domain reference at prng.di.unimi.it/xoshiro128starstar.c
 */
export class RandomStream {
  private readonly state = new Int32Array(4);

  /** @param state four 32-bit words, not all zero. Use {@link createRandom} unless you are testing. */
  constructor(state: readonly [number, number, number, number]) {
    this.state.set(state);
  }

  /** Fills `out[0..count)` with integers uniform on [0, 2^32). */
  fill(out: Uint32Array, count: number = out.length): void {
    // Local copies keep the state in registers for the whole block.
    let s0 = this.state[0];
    let s1 = this.state[1];
    let s2 = this.state[2];
    let s3 = this.state[3];
    for (let i = 0; i < count; i += 1) {
      const scaled = Math.imul(s1, 5);
      out[i] = Math.imul((scaled << 7) | (scaled >>> 25), 9);
      const shifted = s1 << 9;
      s2 ^= s0;
      s3 ^= s1;
      s1 ^= s2;
      s0 ^= s3;
      s2 ^= shifted;
      s3 = (s3 << 11) | (s3 >>> 21);
    }
    this.state[0] = s0;
    this.state[1] = s1;
    this.state[2] = s2;
    this.state[3] = s3;
  }
}

const GOLDEN = 0x9e3779b9;

/** The 32-bit finaliser of MurmurHash3: every input bit changes about half of the output bits. */
function mix(word: number): number {
  let h = word | 0;
  h = Math.imul(h ^ (h >>> 16), 0x85ebca6b);
  h = Math.imul(h ^ (h >>> 13), 0xc2b2ae35);
  return (h ^ (h >>> 16)) | 0;
}

/**
 * The random stream number `stream` of run `seed`.
 *
 * @param seed    any safe integer; its lower 32 bits and the bits above them both count
 * @param stream  integer, 0 to 2^32 - 1
 */
export function createRandom(seed: number, stream: number): RandomStream {
  const low = seed | 0;
  const high = Math.floor(seed / 0x100000000) | 0;
  let counter = mix(mix(mix(low) ^ (high + GOLDEN)) ^ (stream | 0));
  const next = () => {
    counter = (counter + GOLDEN) | 0;
    return mix(counter ^ mix(stream + low));
  };
  // The all-zero state is the only forbidden one; setting a bit in one word excludes it.
  return new RandomStream([next() | 1, next(), next(), next()]);
}

/**
 * A 32-bit stream number for a name, so that a reservoir keeps its draws whatever else is in the run (FNV-1a,
 * finished with an avalanche step).
 */
export function streamOf(name: string): number {
  let hash = 0x811c9dc5;
  for (let i = 0; i < name.length; i += 1) {
    hash = Math.imul(hash ^ name.charCodeAt(i), 0x01000193);
  }
  return mix(hash) >>> 0;
}

/** 2^-32: a 32-bit integer k becomes the number (k + 1/2) 2^-32, strictly inside (0, 1). */
export const TWO_TO_MINUS_32 = 1 / 0x100000000;

/**
 * Writes a uniformly random permutation of 0..count-1 to `out` (Fisher and Yates, as Durstenfeld's algorithm 235).
 * Drawing the index by multiplication is uneven by less than count / 2^32.
 *
 * @param out    at least `count` long
 * @param words  scratch, at least `count` long
 */
export function fillPermutation(
  random: RandomStream,
  out: Uint32Array,
  count: number,
  words: Uint32Array,
): void {
  random.fill(words, count);
  for (let i = 0; i < count; i += 1) {
    const j = (words[i] * TWO_TO_MINUS_32 * (i + 1)) >>> 0;
    out[i] = out[j];
    out[j] = i;
  }
}
