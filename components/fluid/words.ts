import { formatFigure, MISSING } from "@/components/ui/format";

/** "5,215", "14.7": a pressure to the psi, a low one to three digits. */
export const psia = (value: number | null | undefined): string =>
  value === null || value === undefined
    ? MISSING
    : formatFigure(value, Math.abs(value) >= 100 ? { decimals: 0 } : { digits: 3 });
