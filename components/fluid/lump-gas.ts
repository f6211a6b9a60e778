import type { ReportedStream } from "@/analytics/composition/composition-schema";
import type { DepletionTable } from "@/analytics/depletion/depletion-table-schema";

/** Groups that a chart of the produced gas draws, lightest first. */
export const gasGroups = ["N2", "CO2", "H2S", "C1", "C2", "C3", "C4", "C5", "C6", "C7+"] as const;
export type GasGroup = (typeof gasGroups)[number];

/** Mole per cent of each group: butanes and pentanes together, heptanes and heavier as one. */
export function lumpGas({ light, carbonNumbers, plus }: ReportedStream): Record<GasGroup, number> {
  const of = (name: keyof typeof light) => light[name] ?? 0;
  return {
    N2: of("N2"),
    CO2: of("CO2"),
    H2S: of("H2S"),
    C1: of("C1"),
    C2: of("C2"),
    C3: of("C3"),
    C4: of("iC4") + of("nC4"),
    C5: of("iC5") + of("nC5"),
    C6: of("C6"),
    "C7+": carbonNumbers.reduce(
      (sum, { molePercent }) => sum + molePercent,
      plus?.molePercent ?? 0,
    ),
  };
}

/** Produced gas step by step, where the table has it. */
export const producedGasOf = ({ rows }: DepletionTable) =>
  rows.flatMap(({ pressurePsia, producedGas }) =>
    producedGas ? [{ pressurePsia, groups: lumpGas(producedGas) }] : [],
  );
