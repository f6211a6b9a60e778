"use client";

import { isUnmeasured } from "@/analytics/recovery/recovery-curve-schema";
import { useRouter } from "next/navigation";
import type { RecoveryPlan } from "@/analytics/recovery/recovery-plan-schema";
import { textOfPlan } from "@/components/estimate/plan-text";
import { conceptLabels, planInWords } from "@/components/estimate/plan-words";
import { RouteFlag } from "@/components/estimate/route-flag";
import type { ConceptView } from "@/components/recovery/concept-findings";
import { Button } from "@/components/ui/button";
import { Dialog } from "@/components/ui/dialog";
import { formatPercent } from "@/components/ui/format";
import { useToast } from "@/components/ui/toast";
import { useReservoir } from "../_editor/reservoir-context";

/** Writes a concept's plan into the draft; recoveries are then worked out instead of sampled. */
export function UsePlanDialog({
  plan,
  view,
  onClose,
}: {
  plan: RecoveryPlan;
  view: ConceptView | null;
  onClose: () => void;
}) {
  const { draft, text, shown, place, withBasis } = useReservoir();
  const router = useRouter();
  const toast = useToast();
  const label = conceptLabels[plan.concept].toLowerCase();

  function handleUse() {
    if (!draft) return;
    // What the concept does not use stays as it was typed.
    const typed = textOfPlan(plan);
    const inputs = { ...text?.plan?.inputs, ...typed.inputs };
    if (plan.cycling === null && text?.plan) {
      inputs.sweepEfficiency = text.plan.inputs.sweepEfficiency;
      inputs.displacementEfficiency = text.plan.inputs.displacementEfficiency;
    }
    draft.setPlan({ ...typed, inputs });
    onClose();
    toast({ title: `Recoveries of the draft are worked out for ${label}` });
    router.push(withBasis(`/fields/${place.field}/${place.reservoir}`));
  }

  return (
    <Dialog
      open
      onClose={onClose}
      width={600}
      title={`Use ${label} in ${shown ? `draft r${shown.revision}` : "the first estimate"}`}
      description="Gas and condensate recovery are then worked out from the curve in every trial instead of being sampled. The curve is copied in: a later change of the sample leaves the draft alone."
      actions={
        <>
          <Button onClick={onClose}>Cancel</Button>
          <Button kind="primary" onClick={handleUse}>
            Use this concept
          </Button>
        </>
      }
    >
      <div className="mt-3 grid gap-3 text-13">
        <p>{planInWords(plan)}.</p>
        {view && (
          <p>
            Condensate recovery {formatPercent(view.condensateRecovery.p90, { decimals: 1 })} to{" "}
            {formatPercent(view.condensateRecovery.p10, { decimals: 1 })} (P90 to P10), gas recovery{" "}
            {formatPercent(view.gasRecovery.p90, { decimals: 1 })} to{" "}
            {formatPercent(view.gasRecovery.p10, { decimals: 1 })}.
          </p>
        )}
        {isUnmeasured(plan.curve.route) && (
          <p>
            <RouteFlag route={plan.curve.route} />
          </p>
        )}
        <p className="text-ink-soft">
          {text?.usesPlan && text.plan
            ? `It takes the place of the plan for ${conceptLabels[text.plan.concept].toLowerCase()}.`
            : "The recoveries that were typed are kept with their ranges, and come back with “Enter recoveries by hand instead”."}
        </p>
      </div>
    </Dialog>
  );
}
