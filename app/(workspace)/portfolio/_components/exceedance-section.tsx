import type { Statement } from "@/app/api/v1/portfolio/schema";
import { ChartFrame } from "@/components/charts/chart-frame";
import { Exceedance } from "@/components/charts/exceedance";
import { moneyWords, type Reporting } from "@/components/portfolio/reporting";
import { formatFigure, formatPercent } from "@/components/ui/format";
import { liquidOf } from "./liquid";

/** The total's chance of at least each amount, with the sums of percentiles set apart. */
export function ExceedanceSection({
  statement,
  reporting,
}: {
  statement: Statement;
  reporting: Reporting;
}) {
  const { totals } = statement;
  if (!totals) return null;
  const liquid = liquidOf(statement, reporting);
  const range = liquid.rangeOf(totals.trialByTrial);
  const sum = liquid.rangeOf(totals.arithmeticSum);
  const curve = {
    values: totals.condensateExceedance.values.map((barrels) => barrels * liquid.perStb),
    probabilities: totals.condensateExceedance.probabilities,
  };
  const hidden = range.p90 - sum.p90;
  const hiddenWords = liquid.isMoney
    ? moneyWords(hidden / reporting.money.factor, reporting.currency)
    : `${formatFigure(hidden)} ${liquid.unit}`;
  const several = totals.fields > 1;

  return (
    <ChartFrame
      title={
        several
          ? `Adding up the fields’ P90s would hide ${hiddenWords} of the low case`
          : `How much ${liquid.name}, and how sure`
      }
      note={
        several &&
        `The ${formatFigure(sum.p90)} that the column of P90s adds to is ${certaintyWords(totals.chanceOfSummedP90)}: the chance of at least that much is ${chanceWords(totals.chanceOfSummedP90)}. Percentiles do not add; trials do.`
      }
      fileName="portfolio-liquid-exceedance"
      data={{
        columns: [
          { label: "Chance of at least this much", unit: "%" },
          { label: `Portfolio ${liquid.name}`, unit: liquid.unit },
        ],
        rows: curve.values.map((value, index) => [curve.probabilities[index] * 100, value]),
      }}
    >
      <Exceedance
        name={`Portfolio ${liquid.name}`}
        unit={liquid.unit}
        curve={curve}
        range={range}
        arithmetic={several ? { p90: sum.p90, p10: sum.p10 } : undefined}
        xTitle={`${liquid.name.charAt(0).toUpperCase()}${liquid.name.slice(1)}, ${liquid.unit}, ${reporting.words}`}
      />
    </ChartFrame>
  );
}

/** A simulation of so many trials never shows a certainty. */
const chanceWords = (chance: number) =>
  chance > 0.9995 ? "over 99.9\u00a0%" : formatPercent(chance, { decimals: 1 });

/** A sum of P90s is a modest amount; how modest is said in a word. */
function certaintyWords(chance: number): string {
  if (chance >= 0.99) return "nearly certain";
  if (chance >= 0.95) return "very likely";
  return "more likely than a P90";
}
