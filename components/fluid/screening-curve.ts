import { DomainError } from "@/analytics/errors";
import type { SeparatorTest } from "@/analytics/fluid/separator-test-schema";
import { correlationCurve } from "@/analytics/recovery/correlation-curve";
import type { RecoveryCurve } from "@/analytics/recovery/recovery-curve-schema";

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
): { curve: RecoveryCurve | null; reason: string | null } {
  if (test === null || temperatureDegF === null) return { curve: null, reason: null };
  try {
    return { curve: correlationCurve(test, { temperatureDegF, dewPointPsia }).curve, reason: null };
  } catch (error) {
    if (!(error instanceof DomainError)) throw error;
    return { curve: null, reason: error.message };
  }
}
