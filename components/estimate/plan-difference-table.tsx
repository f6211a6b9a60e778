import { isUnmeasured } from "@/analytics/recovery/recovery-curve-schema";
import { LedgerTable } from "@/components/ui/table";
import type { RecoveryPlan } from "@/analytics/recovery/recovery-plan-schema";
import { RouteFlag } from "./route-flag";
import { planInWords } from "./plan-words";
import { planDifferences } from "./differences";

/** How recoveries came about and how they do now, in words; a plan that stands as it stood is told in a line. */
export function PlanDifferenceTable({
  now,
  before,
}: {
  now: RecoveryPlan | null;
  /** with what it is called: "r4" */
  before: { plan: RecoveryPlan | null; label: string } | null;
}) {
  const differences = before ? planDifferences(now, before.plan) : [];
  if (differences.length === 0 || before === null) {
    return now ? (
      <div className="mt-6 grid gap-1.5">
        <h3>How recoveries come about{before ? ` is as in ${before.label}` : ""}</h3>
        <p className="text-13 text-ink-soft">{planInWords(now)}.</p>
        {isUnmeasured(now.curve.route) && (
          <p>
            <RouteFlag route={now.curve.route} />
          </p>
        )}
      </div>
    ) : null;
  }
  return (
    <div className="mt-6 grid gap-2">
      <h3>How recoveries come about has changed</h3>
      <LedgerTable caption={`The recovery plan against ${before.label}`}>
        <thead>
          <tr>
            <th scope="col">Part</th>
            <th scope="col">{before.label}</th>
            <th scope="col">Now</th>
          </tr>
        </thead>
        <tbody>
          {differences.map((part) => (
            <tr key={part.label}>
              <th scope="row">{part.label}</th>
              <td className="wrap soft">{part.before}</td>
              <td className="wrap">{part.now}</td>
            </tr>
          ))}
        </tbody>
      </LedgerTable>
      {now && isUnmeasured(now.curve.route) && (
        <p>
          <RouteFlag route={now.curve.route} />
        </p>
      )}
    </div>
  );
}
