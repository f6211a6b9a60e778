"use client";

import { isUnmeasured } from "@/analytics/recovery/recovery-curve-schema";
import Link from "next/link";
import { Button } from "@/components/ui/button";
import { PlanFields } from "./plan-fields";
import type { PlanReading } from "./plan-reading";
import type { PlanText } from "./plan-text";
import { conceptLabels, curveInWords } from "./plan-words";
import { RouteFlag } from "./route-flag";

/** What can be done about a plan in the input table. */
export interface PlanChanges {
  /** typing in the plan's single figures */
  onPlan: (plan: PlanText) => void;
  /** turns between the plan and recoveries typed by hand */
  onUse: (usesPlan: boolean) => void;
}

/** Says that recoveries are worked out, for which way of producing, and from what. */
export function PlanHeadRow({
  text,
  fluidHref,
  changes,
}: {
  text: PlanText;
  fluidHref: string;
  changes?: PlanChanges;
}) {
  const { route } = text.curve;
  return (
    <tr className="follow plan-head" data-followed="">
      <td className="folio" />
      <td colSpan={6}>
        <div className="plan-head-line">
          <div>
            <b>Recoveries are worked out: {conceptLabels[text.concept].toLowerCase()}</b>
            <p>
              {curveInWords(text)}. <Link href={fluidHref}>Curve and concepts</Link>
            </p>
          </div>
          {isUnmeasured(route) && <RouteFlag route={route} />}
          {changes && (
            <Button size="small" onClick={() => changes.onUse(false)}>
              Enter recoveries by hand instead
            </Button>
          )}
        </div>
      </td>
    </tr>
  );
}

/** The plan's single figures, under its uncertain inputs. */
export function PlanSettingsRow({
  text,
  reading,
  changes,
}: {
  text: PlanText;
  reading: PlanReading;
  changes?: PlanChanges;
}) {
  return (
    <tr className="follow plan-tail">
      <td className="folio" />
      <td colSpan={6}>
        <PlanFields text={text} reading={reading} onChange={changes?.onPlan} />
      </td>
    </tr>
  );
}

/** Under recoveries that are typed: the way to having them worked out. */
export function HandRow({
  plan,
  fluidHref,
  changes,
}: {
  plan: PlanText | null;
  fluidHref: string;
  changes: PlanChanges;
}) {
  return (
    <tr className="follow plan-hand">
      <td className="folio" />
      <td colSpan={6}>
        <div className="plan-head-line">
          {plan ? (
            <>
              <p>
                The plan for {conceptLabels[plan.concept].toLowerCase()} is set aside with its
                figures.
              </p>
              <Button size="small" onClick={() => changes.onUse(true)}>
                Work recoveries out by the plan
              </Button>
            </>
          ) : (
            <p>
              Recoveries can be worked out from the fluid instead:{" "}
              <Link href={fluidHref}>choose a concept on the fluid sample</Link>.
            </p>
          )}
        </div>
      </td>
    </tr>
  );
}
