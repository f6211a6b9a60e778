import { rankedClasses } from "@/analytics/portfolio/ranking";
import type { Statement } from "@/app/api/v1/portfolio/schema";
import type { Basis } from "@/components/basis/basis";
import { RangeMark, type Tone } from "@/components/charts/range-mark";
import { shownRange, type Reporting, type Shown } from "@/components/portfolio/reporting";
import { formatDate, formatFigure, formatPercent } from "@/components/ui/format";
import { KeyFigures } from "@/components/ui/statement";
import type { Range } from "@/analytics/volumetrics/results-schema";
import { riskNote } from "./total-words";

interface Headline {
  label: string;
  range: Range;
  unit: string;
  tone: Tone;
  /** mean of the revisions in force a year ago, same unit; null when it is not known */
  before: number | null;
}

/** The largest type of the page: what the book comes to, each with its range. */
export function TotalsSection({
  statement,
  reporting,
  basis,
}: {
  statement: Statement;
  reporting: Reporting;
  basis: Basis;
}) {
  const { totals, year, prices, dependence } = statement;
  if (!totals) return null;
  const headlines = headlinesOf(statement, reporting);
  const relative = headlines.flatMap(({ range }) =>
    range.p50 > 0 ? [range.p90 / range.p50, range.p10 / range.p50] : [],
  );
  const low = Math.min(...relative, 1) * 0.85;
  const high = Math.max(...relative, 1) * 1.12;

  return (
    <>
      <KeyFigures
        label="Totals"
        headline
        figures={headlines.map(({ label, range, unit, tone, before }) => ({
          label,
          figure: formatFigure(range.p50),
          unit,
          note: (
            <>
              P50. Mean <b>{formatFigure(range.mean)}</b>
              <Change before={before} now={range.mean} />
            </>
          ),
          mark: (
            <RangeMark
              name={label}
              range={range}
              unit={unit}
              tone={tone}
              size="large"
              scale={{ kind: "linear", domain: [low * range.p50, high * range.p50] }}
            />
          ),
        }))}
      />
      <p className="scale-note">
        Each mark is drawn from {low.toFixed(2)} to {high.toFixed(2)} times its own P50, so the
        widths compare. P90 is the low case: 90 % chance of at least this much. Totals are added up
        trial by trial, with fields moving together by “{dependence.name}”.{" "}
        {year &&
          `Changes are of the mean, from estimates revised since ${formatDate(year.since)}, at today’s interests and prices. `}
        {prices?.condensatePerStb != null &&
          `Values are undiscounted, at the deck’s flat price: ${reporting.currency}${prices.condensatePerStb.toFixed(2)} per STB of condensate${prices.gasPerMscf === null ? "" : `, ${reporting.currency}${prices.gasPerMscf.toFixed(2)} per Mscf of sales gas`}. `}
        {riskNote(basis.risk, {
          classes: classesIn(statement),
          chanceOfNothing: totals.chanceOfNothing,
        })}
      </p>
    </>
  );
}

/** How many PRMS classes the totals are made of. */
function classesIn({ basins }: Statement): number {
  return rankedClasses.filter((name) =>
    basins.some(({ condensateMeanStbByClass: means }) => (means[name] ?? 0) > 0),
  ).length;
}

function Change({ before, now }: { before: number | null; now: number }) {
  if (before === null || before <= 0) return null;
  const change = now / before - 1;
  return (
    <>
      ,{" "}
      <b style={change > 0 ? { color: "var(--positive)" } : undefined}>
        {formatPercent(change, { decimals: 1, signed: true })}
      </b>{" "}
      in a year
    </>
  );
}

function headlinesOf(
  { totals, year, prices }: Statement,
  { money, condensate, gas }: Reporting,
): Headline[] {
  const ranges = totals?.trialByTrial;
  if (!ranges) return [];
  const of = (
    label: string,
    range: Range | null,
    shown: Shown,
    tone: Tone,
    before: number | null | undefined,
  ): Headline[] =>
    range
      ? [
          {
            label,
            range: shownRange(range, shown),
            unit: shown.unit,
            tone,
            before: before == null ? null : before * shown.factor,
          },
        ]
      : [];
  const stb = year?.condensateMeanBeforeStb;
  const scf = year?.salesGasMeanBeforeScf;
  const worth = (volume: number | undefined, price: number | null | undefined) =>
    volume === undefined || price == null ? null : volume * price;
  return [
    ...of(
      "Liquid value",
      ranges.liquidValue,
      money,
      "condensate",
      worth(stb, prices?.condensatePerStb),
    ),
    ...of("Condensate to the tank", ranges.condensateRecoverableStb, condensate, "condensate", stb),
    ...of("Sales gas", ranges.salesGasScf, gas, "gas", scf),
    ...of(
      "Gas value",
      ranges.gasValue,
      money,
      "gas",
      worth(scf, prices?.gasPerMscf == null ? null : prices.gasPerMscf / 1000),
    ),
  ];
}
