import type { ReportedStream } from "@/analytics/composition/composition-schema";

/**
 * Wellstream of the third comparative solution project, a gas condensate at 200 degF with a laboratory dew point of
 * 3,428 psig.
 *
 * @see D. E. Kenyon, G. A. Behie, J. Pet. Technol. 39 (Aug. 1987) 981-997; from memory
 */
export const thirdComparativeStream: ReportedStream = {
  light: {
    CO2: 1.21,
    N2: 1.94,
    C1: 65.99,
    C2: 8.69,
    C3: 5.91,
    iC4: 2.39,
    nC4: 2.78,
    iC5: 1.57,
    nC5: 1.12,
    C6: 1.81,
  },
  carbonNumbers: [],
  plus: { carbonNumber: 7, molePercent: 6.59, molecularWeight: 140, specificGravity: 0.774 },
};
