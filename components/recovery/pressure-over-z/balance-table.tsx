import type { MaterialBalanceResponse } from "@/app/api/v1/calculations/material-balance-schema";
import { rangePhrase, type MarkRange } from "@/components/charts/range-mark";
import { Figure } from "@/components/ui/figure";
import { formatFigure, formatPercent } from "@/components/ui/format";
import { Unit } from "@/components/ui/text";

/** Volumetric ranges in place, scf and STB; `null` without an estimate's results. */
export interface VolumetricRanges {
  wellstreamScf: MarkRange;
  dryGasScf: MarkRange;
  condensateStb: MarkRange;
}

const times = (range: MarkRange, factor: number): MarkRange => ({
  p90: range.p90 * factor,
  p50: range.p50 * factor,
  p10: range.p10 * factor,
});

/** What the foot of the line is in gas and condensate, beside the estimate's ranges. */
export function BalanceTable({
  result,
  volumetric,
}: {
  result: MaterialBalanceResponse;
  volumetric: VolumetricRanges | null;
}) {
  const rows = [
    {
      label: "Wellstream",
      unit: "Bscf",
      value: result.wellstreamInPlaceScf / 1e9,
      range: volumetric && times(volumetric.wellstreamScf, 1e-9),
    },
    {
      label: "Dry gas",
      unit: "Bscf",
      value: result.dryGasInPlaceScf / 1e9,
      range: volumetric && times(volumetric.dryGasScf, 1e-9),
    },
    {
      label: "Condensate",
      unit: "MMSTB",
      value: result.condensateInPlaceStb / 1e6,
      range: volumetric && times(volumetric.condensateStb, 1e-6),
    },
  ];
  const { withGasZ, line } = result;
  return (
    <div>
      <table className="ledger-table">
        <caption className="sr-only">In place by pressures and by volumetrics, gross</caption>
        <thead>
          <tr>
            <th scope="col">In place</th>
            <th scope="col" className="right">
              Pressures
            </th>
            {volumetric && (
              <th scope="col" className="right">
                Volumetric P50
              </th>
            )}
          </tr>
        </thead>
        <tbody>
          {rows.map(({ label, unit, value, range }) => (
            <tr key={label}>
              <th scope="row">
                {label} <Unit>{unit}</Unit>
              </th>
              <td className="right strong">
                <Figure value={value} />
              </td>
              {range && (
                <td className="right">
                  <Figure value={range.p50} />
                  <small className="block text-12 text-ink-soft">{rangePhrase(range)}</small>
                </td>
              )}
            </tr>
          ))}
        </tbody>
      </table>
      <p className="mt-2 text-12 text-ink-soft">
        {formatPercent(result.producedFraction, { decimals: 1 })} of it is produced. r²{" "}
        {formatFigure(line.rSquared, { digits: 4 })}.
        {withGasZ &&
          ` With the gas’s own z below the dew point it would have been ${formatFigure(withGasZ.wellstreamInPlaceScf / 1e9)} Bscf, ${formatPercent(withGasZ.bias, { decimals: 1, signed: true })}, r² ${formatFigure(withGasZ.rSquared, { digits: 4 })}.`}
      </p>
    </div>
  );
}
