import type { CompositionResponse } from "@/app/api/v1/calculations/fluid-schema";
import { Figure } from "@/components/ui/figure";
import { ComponentLabel } from "./component-label";
import { ShareBar } from "./share-bar";

/** A wellstream, normalised: what was reported, what it counts as, and how much of it there is. */
export function WellstreamTable({ computed }: { computed: CompositionResponse }) {
  const { components } = computed;
  const isReported = components.some(({ reportedMolePercent }) => reportedMolePercent !== null);
  const largest = Math.max(...components.map(({ moleFraction }) => moleFraction), 1e-9);
  const total = components.reduce((sum, { moleFraction }) => sum + moleFraction, 0);
  return (
    <table className="ledger-table composition-table">
      <caption className="sr-only">Wellstream composition</caption>
      <thead>
        <tr>
          <th scope="col">Component</th>
          {isReported && (
            <th scope="col" className="right">
              Reported
            </th>
          )}
          <th scope="col" className="right">
            Mol %
          </th>
          <td />
        </tr>
      </thead>
      <tbody>
        {components.map(({ name, reportedMolePercent, moleFraction }) => (
          <tr key={name}>
            <th scope="row" className="plain">
              <ComponentLabel symbol={name} />
            </th>
            {isReported && (
              <td className="right soft">
                <Figure value={reportedMolePercent} decimals={2} />
              </td>
            )}
            <td className="right">
              <Figure value={moleFraction * 100} decimals={2} />
            </td>
            <td className="bar-cell">
              <ShareBar symbol={name} share={moleFraction / largest} />
            </td>
          </tr>
        ))}
        <tr className="total">
          <th scope="row">Total</th>
          {isReported && <td />}
          <td className="right">
            <Figure value={total * 100} decimals={2} />
          </td>
          <td />
        </tr>
      </tbody>
    </table>
  );
}
