import { recoveryRouteLabels } from "@/analytics/recovery/recovery-curve-schema";
import { shortConcepts } from "@/components/estimate/plan-words";
import { resultFactor, resultUnit, type ResultBasis } from "@/components/estimate/result-rows";
import type { ChartData } from "@/components/charts/chart-frame";
import { fractionDigits } from "@/components/ui/format";
import { FigureCell, LedgerTable } from "@/components/ui/table";
import { Unit } from "@/components/ui/text";
import type { ConceptView } from "./concept-findings";

/** One concept's row in the units of the basis. Means add up to what is in place, as the bars do. */
function rowOf(view: ConceptView, basis: ResultBasis) {
  const condensate = resultFactor("condensateRecoverableStb", basis);
  const { p90, p50, p10 } = view.condensateRecoverableStb;
  const inPlace = view.condensateInPlaceStb.mean;
  return {
    concept: view.concept,
    p90: p90 * condensate,
    p50: p50 * condensate,
    p10: p10 * condensate,
    mean: inPlace * view.shares.toTank * condensate,
    rock: view.shares.leftInRock * inPlace * condensate,
    gas: view.shares.leftInGas * inPlace * condensate,
    salesGas: view.salesGasScf.p50 * resultFactor("salesGasScf", basis),
  };
}

/** Condensate to the tank as a range, what stays behind, and the gas that is sold, for each concept. */
export function ConceptTable({
  concepts,
  basis,
}: {
  concepts: readonly ConceptView[];
  basis: ResultBasis;
}) {
  const rows = concepts.map((view) => rowOf(view, basis));
  const unit = resultUnit("condensateRecoverableStb", basis);
  const digits = fractionDigits(rows.flatMap(({ p90, p50, p10, mean }) => [p90, p50, p10, mean]));
  return (
    <LedgerTable
      caption="Concepts: condensate to the tank and left behind"
      className="concept-table mt-0"
    >
      <thead>
        <tr>
          <th scope="col">
            To the tank <Unit>{unit}</Unit>
          </th>
          {["P90", "P50", "P10", "Mean"].map((level) => (
            <th key={level} scope="col" className="right">
              {level}
            </th>
          ))}
          <th scope="col" className="right">
            In the rock <Unit>mean</Unit>
          </th>
          <th scope="col" className="right">
            In the gas <Unit>mean</Unit>
          </th>
          <th scope="col" className="right">
            Sales gas P50 <Unit>{resultUnit("salesGasScf", basis)}</Unit>
          </th>
        </tr>
      </thead>
      <tbody>
        {rows.map(({ concept, ...row }) => (
          <tr key={concept}>
            <th scope="row" className="plain">
              {shortConcepts[concept]}
            </th>
            <FigureCell value={row.p90} fraction={digits} />
            <FigureCell value={row.p50} fraction={digits} strong />
            <FigureCell value={row.p10} fraction={digits} />
            <FigureCell value={row.mean} fraction={digits} />
            <FigureCell value={row.rock} />
            <FigureCell value={row.gas} />
            <FigureCell value={row.salesGas} />
          </tr>
        ))}
      </tbody>
    </LedgerTable>
  );
}

/** The same and the shares, for the chart's own table and its CSV. */
export function conceptData(concepts: readonly ConceptView[], basis: ResultBasis): ChartData {
  const unit = resultUnit("condensateRecoverableStb", basis);
  return {
    columns: [
      { label: "Concept" },
      { label: "Recovery from" },
      { label: "To the tank P90", unit },
      { label: "To the tank P50", unit },
      { label: "To the tank P10", unit },
      { label: "To the tank, mean", unit },
      { label: "To the tank, mean share", unit: "%" },
      { label: "Left in the rock, mean share", unit: "%" },
      { label: "Left in the gas, mean share", unit: "%" },
      { label: "Left in the rock, mean", unit },
      { label: "Left in the gas, mean", unit },
      { label: "Sales gas P50", unit: resultUnit("salesGasScf", basis) },
    ],
    rows: concepts.map((view) => {
      const row = rowOf(view, basis);
      return [
        shortConcepts[view.concept],
        recoveryRouteLabels[view.route],
        row.p90,
        row.p50,
        row.p10,
        row.mean,
        view.shares.toTank * 100,
        view.shares.leftInRock * 100,
        view.shares.leftInGas * 100,
        row.rock,
        row.gas,
        row.salesGas,
      ];
    }),
  };
}
