import { DomainError, underPath } from "../errors";
import type { CompiledDistribution } from "../uncertainty/distribution";
import type { Distribution } from "../uncertainty/distribution-schema";
import { compilePossible } from "../uncertainty/possible-range";
import { fineCurve, type FineCurve } from "./fine-curve";
import { planRanges } from "./plan-ranges";
import {
  planInputNames,
  type Cycling,
  type PlanInputName,
  type RecoveryPlan,
} from "./recovery-plan-schema";

/** A recovery plan found possible, once a run. */
export interface CompiledPlan {
  readonly plan: RecoveryPlan;
  readonly curve: FineCurve;
  /** the uncertain inputs that the concept uses, in their order */
  readonly inputNames: readonly PlanInputName[];
  readonly distributions: Readonly<Partial<Record<PlanInputName, CompiledDistribution>>>;
  /** null for depletion and compression, whatever the plan keeps for later */
  readonly cycling: Cycling | null;
}

/**
 * Checks everything that can be impossible in a recovery plan by itself, and compiles it.
 *
 * @throws {DomainError} whose `input` is a path inside the plan, such as `abandonmentPressurePsia.minimum`,
 *   `curve.points.2.pressurePsia` or `cycling.injectedPoreVolumes`
 */
export function compilePlan(plan: RecoveryPlan): CompiledPlan {
  const curve = fineCurve(plan.curve);
  const cycling = cyclingOf(plan, curve);
  checkSaturations(plan);
  const ranges = planRanges(plan);
  const described = describedInputs(plan, cycling);
  const names = planInputNames.filter((name) => described[name]);
  const distributions: Partial<Record<PlanInputName, CompiledDistribution>> = {};
  for (const name of names) {
    const distribution = described[name];
    if (distribution) {
      distributions[name] = underPath(planPaths[name], () =>
        compilePossible(ranges[name], distribution),
      );
    }
  }
  const compiled = { plan, curve, inputNames: names, distributions, cycling };
  checkOrder(compiled);
  return compiled;
}

/** Where an uncertain input stands in a plan. */
export const planPaths: Readonly<Record<PlanInputName, string>> = {
  abandonmentPressurePsia: "abandonmentPressurePsia",
  condensateCurveFactor: "condensateCurveFactor",
  sweepEfficiency: "cycling.sweepEfficiency",
  displacementEfficiency: "cycling.displacementEfficiency",
};

function describedInputs(
  plan: RecoveryPlan,
  cycling: Cycling | null,
): Partial<Record<PlanInputName, Distribution>> {
  return {
    abandonmentPressurePsia: plan.abandonmentPressurePsia.distribution,
    condensateCurveFactor: plan.condensateCurveFactor.distribution,
    sweepEfficiency: cycling?.sweepEfficiency.distribution,
    displacementEfficiency: cycling?.displacementEfficiency.distribution,
  };
}

function cyclingOf(plan: RecoveryPlan, curve: FineCurve): Cycling | null {
  if (plan.concept !== "cycling") return null;
  const { cycling, waterDrive } = plan;
  if (!cycling) {
    throw new DomainError("Cycling needs its pressure, efficiencies and injected volume.", {
      input: "cycling",
    });
  }
  if (waterDrive.kind !== "none") {
    throw new DomainError(
      "Cycling together with water influx is not modelled: water and injected gas compete for the same pore space. " +
        "Choose a closed volume, or depletion with influx.",
      { input: "waterDrive.kind" },
    );
  }
  if (cycling.pressurePsia < curve.lowestPsia) {
    throw new DomainError(
      `Injection cannot begin at ${cycling.pressurePsia} psia: the depletion curve ends at ${curve.lowestPsia} psia.`,
      { input: "cycling.pressurePsia", value: cycling.pressurePsia },
    );
  }
  return cycling;
}

function checkSaturations({ criticalSaturation: { low, high } }: RecoveryPlan): void {
  if (low > high) {
    throw new DomainError(
      `The band of critical saturation runs from ${low} to ${high}; its low end is above its high end.`,
      { input: "criticalSaturation.low", value: low },
    );
  }
}

/** What contradicts itself at P50 contradicts itself in every other trial or so: said before any trial is run. */
function checkOrder({ cycling, distributions }: CompiledPlan): void {
  if (!cycling) return;
  const median = (name: PlanInputName) => distributions[name]?.range.p50 ?? 0;
  const abandonment = median("abandonmentPressurePsia");
  if (!(abandonment < cycling.pressurePsia)) {
    throw new DomainError(
      `Injection begins at ${cycling.pressurePsia} psia, but the reservoir is abandoned at ${abandonment} psia.`,
      { input: "cycling.pressurePsia", value: cycling.pressurePsia },
    );
  }
  const swept = median("sweepEfficiency") * median("displacementEfficiency");
  if (swept > cycling.injectedPoreVolumes) {
    throw new DomainError(
      `${cycling.injectedPoreVolumes} pore volumes of injected gas cannot displace ${swept.toFixed(2)} of one.`,
      { input: "cycling.injectedPoreVolumes", value: cycling.injectedPoreVolumes },
    );
  }
}
