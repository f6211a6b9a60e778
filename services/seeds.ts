import { createHash } from "node:crypto";

/**
 * The sampling seed of a reservoir: the same on every installation, and different for every reservoir, so that their
 * samples are independent until a dependence is asked for.
 *
 * @returns a whole number from 0 to 2^31 - 1
 */
export function seedOf(fieldSlug: string, reservoirSlug: string): number {
  const digest = createHash("sha256").update(`${fieldSlug}/${reservoirSlug}`).digest();
  return digest.readUInt32BE(0) >>> 1;
}
