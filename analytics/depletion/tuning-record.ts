/** Whether an equation of state counts as tuned: by what was kept of its tuning, and nothing else. */
import { z } from "zod";
import type { CompositionSheet } from "../composition/composition-schema";
import { isAdjusted, type Characterisation } from "../equation-of-state/characterisation-schema";
import type { DepletionTable } from "./depletion-table-schema";

/** What accepted adjustments were fitted to and by how much they missed. */
export const tuningRecordSchema = z
  .object({
    measuredDewPointPsia: z.number(),
    fittedDewPointPsia: z.number(),
    averageLiquidErrorPoints: z.number().nullable(),
    /** `tuningKey` of the figures that it was fitted to; null when nobody kept it */
    fittedTo: z.string().max(40).nullable().default(null),
  })
  .strict();
export type TuningRecord = z.infer<typeof tuningRecordSchema>;

/** How far a fit may miss and still count as one. Common practice, no source. */
const DEW_POINT_LIMIT = 0.02;
const LIQUID_LIMIT_POINTS = 5;

/** What a tuning belongs to: with another composition, heavy end or table it is another fluid's. */
export interface TunedFluid {
  readonly sheet: CompositionSheet;
  readonly characterisation: Characterisation;
  readonly table: DepletionTable | null;
}

/**
 * A short name of the figures of a fluid, the same for the same figures in whatever order their keys stand.
 *
 * @see G. Fowler, L. C. Noll, K.-P. Vo, D. Eastlake, "The FNV Non-Cryptographic Hash Algorithm": FNV-1a of 64 bits
 */
export function tuningKey({ sheet, characterisation, table }: TunedFluid): string {
  const text = canonical({ sheet, characterisation, table });
  let hash = 0xcbf29ce484222325n;
  for (let at = 0; at < text.length; at += 1) {
    hash = BigInt.asUintN(64, (hash ^ BigInt(text.charCodeAt(at))) * 0x100000001b3n);
  }
  return hash.toString(16).padStart(16, "0");
}

/** Ten digits: more than anybody measures, fewer than a way through a text field may change. */
function canonical(value: unknown): string {
  if (typeof value === "number") return String(Number(value.toPrecision(10)));
  if (Array.isArray(value)) return `[${value.map(canonical).join(",")}]`;
  if (typeof value !== "object" || value === null) return JSON.stringify(value);
  const entries = Object.entries(value).filter(([, part]) => part !== undefined);
  entries.sort(([a], [b]) => (a < b ? -1 : 1));
  return `{${entries.map(([key, part]) => `${JSON.stringify(key)}:${canonical(part)}`).join(",")}}`;
}

export interface TuningStanding {
  readonly isTuned: boolean;
  /** why adjustments do not count as a tuning, as a sentence; null for a tuned fluid, and for one without any */
  readonly doubt: string | null;
}

/**
 * A fluid counts as tuned when its adjustments come from a tuning that was kept, that met the dew point within 2 % and
 * the liquid within 5 points on average, and that was fitted to the very figures that stand now.
 *
 * @param computedDewPointPsia  what the equation of state gives now; it must meet the measured one as well
 */
export function tuningStanding(
  fluid: TunedFluid,
  tuning: TuningRecord | null,
  computedDewPointPsia: number | null = null,
): TuningStanding {
  if (!isAdjusted(fluid.characterisation)) return { isTuned: false, doubt: null };
  const doubt = tuning
    ? doubtOf(fluid, tuning, computedDewPointPsia)
    : "Adjustments are set, but nothing says what they were fitted to.";
  return { isTuned: doubt === null, doubt };
}

function doubtOf(
  fluid: TunedFluid,
  tuning: TuningRecord,
  computedDewPointPsia: number | null,
): string | null {
  if (tuning.fittedTo !== tuningKey(fluid)) {
    return "Composition, heavy end or depletion table are not those that it was fitted to. Run the tuning again.";
  }
  const { measuredDewPointPsia: measured, averageLiquidErrorPoints: liquidError } = tuning;
  for (const dewPoint of [tuning.fittedDewPointPsia, computedDewPointPsia ?? measured]) {
    const miss = Math.abs(dewPoint / measured - 1);
    if (!(miss <= DEW_POINT_LIMIT)) {
      return `The fit misses the measured dew point by ${(100 * miss).toFixed(1)} %; up to ${100 * DEW_POINT_LIMIT} % counts as met.`;
    }
  }
  if (liquidError === null) return "No measured liquid stands behind the fit.";
  return liquidError <= LIQUID_LIMIT_POINTS
    ? null
    : `The fit misses the measured liquid by ${liquidError.toFixed(1)} points on average; up to ${LIQUID_LIMIT_POINTS} count as met.`;
}
