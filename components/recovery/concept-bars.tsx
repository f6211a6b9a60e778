import { recoveryRouteLabels } from "@/analytics/recovery/recovery-curve-schema";
import type { ReactNode } from "react";
import { RangeMark } from "@/components/charts/range-mark";
import type { Scale } from "@/components/charts/scale";
import { conceptLabels } from "@/components/estimate/plan-words";
import { formatPercent } from "@/components/ui/format";
import type { ConceptView } from "./concept-findings";

const places = [
  { key: "toTank", place: "tank", label: "To the tank" },
  { key: "leftInRock", place: "rock", label: "Left in the rock" },
  { key: "leftInGas", place: "gas", label: "Left in the gas" },
] as const;

const percentScale: Scale = { kind: "linear", domain: [0, 100] };
/** A share narrower than this has no room for its figure; the table has it. */
const LEAST_LABELLED = 0.13;

/** Condensate in place as one length a concept, and under it how sure the part is that reaches the tank. */
export function ConceptBars({
  concepts,
  isStale = false,
  action,
}: {
  concepts: readonly ConceptView[];
  /** figures of assumptions that have changed since */
  isStale?: boolean;
  /** what can be done with a concept, under its name */
  action?: (concept: ConceptView["concept"]) => ReactNode;
}) {
  return (
    <>
      <PlaceKey />
      <div className="place-rows" data-stale={isStale || undefined}>
        <div className="place-head">Concept</div>
        <div className="place-head">
          <span className="range-scale" aria-hidden="true">
            {[0, 25, 50, 75, 100].map((value) => (
              <i key={value} style={{ left: `${value}%` }}>
                {value === 0 ? "0" : `${value} %`}
              </i>
            ))}
          </span>
        </div>
        {concepts.map((view) => (
          <ConceptRow key={view.concept} view={view} action={action?.(view.concept)} />
        ))}
      </div>
    </>
  );
}

export function PlaceKey() {
  return (
    <div className="place-key" aria-hidden="true">
      {places.map(({ place, label }) => (
        <span key={place}>
          <i data-place={place} />
          {label}
        </span>
      ))}
    </div>
  );
}

function ConceptRow({ view, action }: { view: ConceptView; action: ReactNode }) {
  const { condensateRecovery } = view;
  return (
    <>
      <div className="place-name">
        {conceptLabels[view.concept]}
        <small>{recoveryRouteLabels[view.route]}</small>
        {action}
      </div>
      <div>
        <PlaceBar name={conceptLabels[view.concept]} shares={view.shares} />
        <RangeMark
          name={`${conceptLabels[view.concept]}, share that reaches the tank`}
          range={{
            p90: condensateRecovery.p90 * 100,
            p50: condensateRecovery.p50 * 100,
            p10: condensateRecovery.p10 * 100,
            mean: condensateRecovery.mean * 100,
          }}
          unit="% of in place"
          scale={percentScale}
          gridLines={false}
          tipSide="left"
        />
      </div>
    </>
  );
}

/** Shares of the condensate in place; they add up to the whole length. */
export function PlaceBar({ name, shares }: { name: string; shares: ConceptView["shares"] }) {
  const spoken = places
    .map(({ key, label }) => `${label.toLowerCase()} ${formatPercent(shares[key])}`)
    .join(", ");
  return (
    <span className="place-bar" role="img" aria-label={`${name}: ${spoken}`}>
      {places.map(({ key, place }) => (
        <i
          key={key}
          data-place={place}
          style={{ width: `${(Math.max(shares[key], 0) * 100).toFixed(2)}%` }}
        >
          {shares[key] >= LEAST_LABELLED && <b>{formatPercent(shares[key])}</b>}
        </i>
      ))}
    </span>
  );
}
