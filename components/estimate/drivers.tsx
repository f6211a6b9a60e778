import type { EstimateInputs } from "@/analytics/volumetrics/inputs-schema";
import type { SimulationSummary } from "@/analytics/volumetrics/results-schema";
import { Tornado } from "@/components/charts/tornado";
import { Section } from "@/components/ui/section";
import { caseSetWords, driverFinding, swingFinding } from "./findings";
import { driverCatalogue } from "./input-catalogue";
import { resultFactor, resultUnit, type ResultBasis } from "./result-rows";

/** Inputs that make less than this of the spread are left out of the drawing. */
const LEAST_SHARE = 0.002;

/** What drives a result, with the finding as heading: ranked by share of the spread, or by the swing of each input alone. */
export function Drivers({
  summary,
  basis,
  result = "condensateRecoverableStb",
  level,
  by = "share",
  inputs,
}: {
  summary: SimulationSummary;
  basis: ResultBasis;
  result?: keyof SimulationSummary["drivers"];
  level?: 2 | 3;
  by?: "share" | "swing";
  /** says which inputs never move alone */
  inputs?: EstimateInputs | null;
}) {
  const factor = resultFactor(result, basis);
  const unit = resultUnit(result, basis);
  const name = result === "wetGasInPlaceScf" ? "Wet gas in place" : "Condensate to the tank";
  const drivers =
    by === "share"
      ? summary.drivers[result].filter(({ shareOfSpread }) => shareOfSpread >= LEAST_SHARE)
      : bySwing(summary.drivers[result]);
  const sets = inputs ? caseSetWords(inputs) : null;
  return (
    <Section
      level={level}
      title={
        by === "share"
          ? driverFinding(summary.drivers[result])
          : swingFinding(drivers, factor, unit)
      }
      note={`${name}, ${unit}. Bars: from one input at its P90 to the same at its P10, the others at P50. Per cent: its squared rank correlation over all trials, as a share of the sum.${sets ? ` ${sets}` : ""}`}
    >
      <Tornado
        name={name}
        unit={unit}
        tone={result === "wetGasInPlaceScf" ? "gas" : "condensate"}
        centre={summary.deterministic[result] * factor}
        drivers={drivers.map(({ input, swing, shareOfSpread }) => ({
          name: driverCatalogue[input].label,
          atP90: swing.atP90 * factor,
          atP10: swing.atP10 * factor,
          share: shareOfSpread,
        }))}
      />
    </Section>
  );
}

type Driver = SimulationSummary["drivers"]["wetGasInPlaceScf"][number];

const widthOf = ({ swing }: Driver) => Math.abs(swing.atP10 - swing.atP90);

/** Widest swing first, without inputs that swing nothing. */
const bySwing = (drivers: readonly Driver[]) =>
  drivers.filter((driver) => widthOf(driver) > 0).sort((a, b) => widthOf(b) - widthOf(a));
