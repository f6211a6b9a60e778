import { phaseLabels, shortConcepts } from "@/components/estimate/plan-words";
import { resultFactor, resultUnit, type ResultBasis } from "@/components/estimate/result-rows";
import { formatFigure, formatPercent, MISSING } from "@/components/ui/format";
import { LedgerTable } from "@/components/ui/table";
import { VisuallyHidden } from "@/components/ui/text";
import { gasBalanceFinding, type ConceptView } from "./concept-findings";

/** Phases and gas balance are all this table and list look at. */
type Phased = Pick<ConceptView, "concept" | "phases">;

/** What is recovered when: condensate and gas of each phase as shares of what is in place, means over the trials. */
export function PhaseTable({ concepts }: { concepts: readonly Phased[] }) {
  const names = [...new Set(concepts.flatMap(({ phases }) => phases.map(({ name }) => name)))];
  return (
    <LedgerTable
      caption="What is recovered when, per cent of what is in place"
      className="phase-table"
    >
      <thead>
        <tr>
          <th scope="col">Phase</th>
          {concepts.map(({ concept }) => (
            <th key={concept} scope="col" className="right">
              {shortConcepts[concept]}
            </th>
          ))}
        </tr>
      </thead>
      <tbody>
        {names.map((name) => (
          <tr key={name}>
            <th scope="row" className="plain">
              {phaseLabels[name]}
            </th>
            {concepts.map(({ concept, phases }) => {
              const phase = phases.find((candidate) => candidate.name === name);
              return (
                <td key={concept} className="right">
                  {phase && (phase.condensateShare !== 0 || phase.gasShare !== 0) ? (
                    <>
                      {formatPercent(phase.condensateShare, { decimals: 1 })}
                      <small className="block text-ink-soft">
                        {formatPercent(phase.gasShare, { decimals: 1 })} of gas
                      </small>
                    </>
                  ) : (
                    <>
                      <span aria-hidden="true">{MISSING}</span>
                      <VisuallyHidden>does not occur</VisuallyHidden>
                    </>
                  )}
                </td>
              );
            })}
          </tr>
        ))}
        <tr className="total">
          <th scope="row">Recovered</th>
          {concepts.map(({ concept, phases }) => {
            const sum = (part: "condensateShare" | "gasShare") =>
              phases.reduce((total, phase) => total + phase[part], 0);
            return (
              <td key={concept} className="right strong">
                {formatPercent(sum("condensateShare"), { decimals: 1 })}
                <small className="block font-normal text-ink-soft">
                  {formatPercent(sum("gasShare"), { decimals: 1 })} of gas
                </small>
              </td>
            );
          })}
        </tr>
      </tbody>
    </LedgerTable>
  );
}

/** What cycling does with gas: injected, bought, burnt, and the pressure it ends at. Means over the trials. */
export function GasBalance({
  balance,
  basis,
}: {
  balance: NonNullable<ConceptView["gasBalance"]>;
  basis: ResultBasis;
}) {
  const factor = resultFactor("salesGasScf", basis);
  const unit = resultUnit("salesGasScf", basis);
  const figures = [
    { label: "Injected", value: balance.injectedScf * factor, unit },
    { label: "Produced meanwhile", value: balance.producedWhileCyclingScf * factor, unit },
    { label: "Fuel and losses", value: balance.fuelScf * factor, unit },
    { label: "Make-up gas bought", value: balance.makeUpScf * factor, unit },
    { label: "Pressure at the end", value: balance.pressureAtEndPsia, unit: "psia" },
  ];
  return (
    <div>
      <h3>{gasBalanceFinding(balance, factor, unit)}</h3>
      <dl className="gas-balance">
        {figures.map(({ label, value, unit: of }) => (
          <div key={label}>
            <dt>{label}</dt>
            <dd>
              {value === 0 ? "none" : formatFigure(value)}{" "}
              {value !== 0 && <span className="unit">{of}</span>}
            </dd>
          </div>
        ))}
      </dl>
    </div>
  );
}
