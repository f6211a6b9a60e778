import type { MaterialBalanceResponse } from "@/app/api/v1/calculations/material-balance-schema";
import type { MarkRange } from "@/components/charts/range-mark";
import { formatFigure, formatPercent } from "@/components/ui/format";

export const bscf = (scf: number) => formatFigure(scf / 1e9);

/** Where the gas in place from pressures lies in the range that the rock gives. */
export function placeInRange(scf: number, range: MarkRange | null): string | null {
  if (!range) return null;
  if (scf < range.p90) return `below the volumetric P90 of ${bscf(range.p90)}`;
  if (scf > range.p10) return `above the volumetric P10 of ${bscf(range.p10)}`;
  const difference = scf / range.p50 - 1;
  const away = formatPercent(Math.abs(difference));
  return Math.abs(difference) < 0.005
    ? "at the volumetric P50"
    : `within the volumetric range, ${away} ${difference < 0 ? "below" : "above"} its P50`;
}

/** The finding of a line, with its figure. */
export function balanceTitle(result: MaterialBalanceResponse, range: MarkRange | null): string {
  const place = placeInRange(result.wellstreamInPlaceScf, range);
  return `Pressures show ${bscf(result.wellstreamInPlaceScf)} Bscf in place${place ? `, ${place}` : ""}`;
}

/** What a difference means; `null` where the line lies in the range, or there is none. */
export function balanceAdvice(scf: number, range: MarkRange | null): string | null {
  if (!range) return null;
  if (scf < range.p90) {
    return "Part of the rock may hold no gas, or not reach the wells: a line sees only what is connected.";
  }
  if (scf > range.p10) {
    return "There may be more rock than the estimate has, or water or a neighbour that holds the pressure up.";
  }
  return null;
}

/** Warnings that the page shows nowhere else: those of the separator sheet stand beside it. */
export const balanceWarnings = ({ warnings }: MaterialBalanceResponse) =>
  warnings.filter(
    ({ code, input }) => code === "dew_point_unknown" || !input?.startsWith("separatorTest"),
  );
