import type { SimulationSummary } from "@/analytics/volumetrics/results-schema";
import { Tornado } from "@/components/charts/tornado";
import { Section } from "@/components/ui/section";
import { driverFinding } from "./findings";
import { driverCatalogue } from "./input-catalogue";
import { resultFactor, resultUnit, type ResultBasis } from "./result-rows";

/** Inputs that make less than this of the spread are left out of the drawing. */
const LEAST_SHARE = 0.002;

/** What drives a result, with the finding as heading. */
export function Drivers({
  summary,
  basis,
  result = "condensateRecoverableStb",
  level,
}: {
  summary: SimulationSummary;
  basis: ResultBasis;
  result?: keyof SimulationSummary["drivers"];
  level?: 2 | 3;
}) {
  const factor = resultFactor(result, basis);
  const unit = resultUnit(result, basis);
  const name = result === "wetGasInPlaceScf" ? "Wet gas in place" : "Condensate to the tank";
  const drivers = summary.drivers[result];
  return (
    <Section
      level={level}
      title={driverFinding(drivers)}
      note={`${name}, ${unit}, as each input goes from its P90 to its P10`}
    >
      <Tornado
        name={name}
        unit={unit}
        tone={result === "wetGasInPlaceScf" ? "gas" : "condensate"}
        centre={summary.deterministic[result] * factor}
        drivers={drivers
          .filter(({ shareOfSpread }) => shareOfSpread >= LEAST_SHARE)
          .map(({ input, swing, shareOfSpread }) => ({
            name: driverCatalogue[input].label,
            atP90: swing.atP90 * factor,
            atP10: swing.atP10 * factor,
            share: shareOfSpread,
          }))}
      />
    </Section>
  );
}
