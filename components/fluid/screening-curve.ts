import { DomainError } from "@/analytics/errors";
import type { SeparatorTest } from "@/analytics/fluid/separator-test-schema";
import { correlationCurve } from "@/analytics/recovery/correlation-curve";
import type { RecoveryCurve } from "@/analytics/recovery/recovery-curve-schema";
import type { Warning } from "@/analytics/warnings";

export interface ScreeningCurve {
  curve: RecoveryCurve | null;
  /** why there is none */
  reason: string | null;
  /** what to know about the one there is */
  warnings: readonly Warning[];
}

const nothing: ScreeningCurve = { curve: null, reason: null, warnings: [] };

/**
 * The depletion curve of a fluid without a composition, by correlation, or why there is none.
 *
 * @param test             of the surface; `null` while it is not filled in
 * @param temperatureDegF  of the reservoir; `null` while it is not known
 */
export function screeningCurve(
  test: SeparatorTest | null,
  temperatureDegF: number | null,
  dewPointPsia: number | null,
): ScreeningCurve {
  if (test === null || temperatureDegF === null) return nothing;
  try {
    return { ...nothing, ...correlationCurve(test, { temperatureDegF, dewPointPsia }) };
  } catch (error) {
    if (!(error instanceof DomainError)) throw error;
    return { ...nothing, reason: error.message };
  }
}
