/** Two revisions, ways of producing or fields beside each other, and what explains the difference. */
import { DomainError } from "@/analytics/errors";
import type { ProducingConcept } from "@/analytics/recovery/recovery-plan-schema";
import { planForConcept } from "@/analytics/recovery/starting-plan";
import type { EstimateRun } from "@/analytics/sensitivity/estimate-changes";
import type { ChangeExplanation } from "@/analytics/sensitivity/sensitivity-schema";
import { compileDistribution } from "@/analytics/uncertainty/distribution";
import { requirePossibleInputs } from "@/analytics/volumetrics/check-inputs";
import type { EstimateInputs } from "@/analytics/volumetrics/inputs-schema";
import {
  vectorNames,
  type QuantitySummary,
  type SimulationSummary,
  type VectorName,
} from "@/analytics/volumetrics/results-schema";
import type { Estimate } from "@/models/estimate";
import { findEstimateWithPeople } from "@/models/queries/estimates";
import type { EstimateState } from "@/models/vocabulary";
import { runChange, runFieldSummary, runSimulation, type ComputeOptions } from "./compute/pool";
import { InvalidInputError, NotFoundError } from "./errors";
import { authorise, type Actor } from "./policy";
import { alignFields } from "./portfolio/aligned-fields";
import type { PortfolioBasis } from "./portfolio/basis";
import { loadBook } from "./portfolio/roll-ups";

export type ComparedSide =
  | { kind: "estimate"; estimateId: string }
  | { kind: "concept"; estimateId: string; concept: ProducingConcept }
  | { kind: "field"; fieldId: string };

export interface ComparisonQuestion {
  left: ComparedSide;
  right: ComparedSide;
  /** whose P50 is explained */
  result: VectorName;
}

type Quantities = Record<VectorName, Omit<QuantitySummary, "histogram">>;

export interface SideView {
  label: string;
  detail: string;
  href: string;
  trials: number;
  quantities: Quantities;
  inputs: EstimateInputs | null;
}

export interface ComparisonView {
  left: SideView;
  right: SideView;
  explanation: ChangeExplanation | null;
  whyNotExplained: string | null;
}

interface LoadedSide {
  view: SideView;
  /** what its numbers come from; null with the reason when that is no single estimate */
  run: EstimateRun | null;
  whyNot: string | null;
}

/**
 * Both sides gross and unrisked. A revision shows its stored results; another way of producing it, or a draft that was
 * not run yet, is computed for the comparison and not kept. A field is what its reservoirs add up to on the basis.
 *
 * @param basis           which revisions and which dependence set stand for a field
 * @param options.signal  gives it up
 * @throws {NotFoundError}
 * @throws {InvalidInputError} at the side that has no figures, with the reason
 * @throws {ServiceBusyError}
 */
export async function compare(
  actor: Actor,
  { left, right, result }: ComparisonQuestion,
  basis: Pick<PortfolioBasis, "estimates" | "dependence">,
  options: ComputeOptions = {},
): Promise<ComparisonView> {
  authorise(actor, "estimate.read");
  const load = (side: ComparedSide, pointer: string) => {
    if (side.kind !== "field") return loadEstimateSide(side, pointer, options);
    authorise(actor, "portfolio.read");
    return loadFieldSide(side.fieldId, pointer, basis, options);
  };
  // Whichever fails first, what is said is about the left side when both fail.
  const [first, second] = await Promise.allSettled([load(left, "left"), load(right, "right")]);
  if (first.status === "rejected") throw first.reason;
  if (second.status === "rejected") throw second.reason;
  const [before, now] = [first.value, second.value];
  const sides = { left: before.view, right: now.view };
  if (!before.run || !now.run) {
    return { ...sides, explanation: null, whyNotExplained: before.whyNot ?? now.whyNot };
  }
  try {
    const question = { from: before.run, to: now.run, result, percentile: "p50" as const };
    return { ...sides, explanation: await runChange(question, options), whyNotExplained: null };
  } catch (error) {
    if (!(error instanceof DomainError)) throw error;
    return { ...sides, explanation: null, whyNotExplained: error.message };
  }
}

async function loadEstimateSide(
  side: Exclude<ComparedSide, { kind: "field" }>,
  pointer: string,
  options: ComputeOptions,
): Promise<LoadedSide> {
  const estimate = await findEstimateWithPeople(side.estimateId);
  const { reservoir } = estimate ?? {};
  if (!estimate || !reservoir?.field) throw new NotFoundError("estimate");
  const { seed, trials, sampling, revision } = estimate;
  const other = side.kind === "concept" ? withConcept(estimate, side.concept, pointer) : null;
  const inputs = other ?? estimate.inputs;
  const stored = other === null ? estimate.summary : null;
  const summary = stored ?? (await simulated({ inputs, seed, trials, sampling }, pointer, options));
  const concept = side.kind === "concept" ? conceptWords[side.concept] : null;
  const label = `${reservoir.field.name}, ${reservoir.name}, r${revision}`;
  return {
    view: {
      label: concept ? `${label}, ${concept}` : label,
      detail: [
        stateInWords(estimate),
        concept && (other ? "instead of its own concept" : "the concept of its recovery plan"),
        stored === null && "computed for this comparison",
      ]
        .filter(Boolean)
        .join(", "),
      href: `/fields/${reservoir.field.slug}/${reservoir.slug}/${estimate.state === "superseded" ? "history" : "results"}`,
      trials: summary.trials,
      quantities: quantitiesOf(summary.results),
      inputs,
    },
    run: { inputs, seed, trials, sampling },
    whyNot: null,
  };
}

const conceptWords: Record<ProducingConcept, string> = {
  depletion: "depletion",
  compression: "depletion with compression",
  cycling: "cycling, then blowdown",
};

const stateWords: Record<EstimateState, string> = {
  draft: "Draft",
  submitted: "Submitted",
  approved: "Approved",
  returned: "Returned",
  superseded: "Superseded",
};

/** "Approved, in force from 14 Mar 2026", "Draft, run 2 Apr 2026" */
function stateInWords({ state, effectiveOn, computedAt }: Estimate): string {
  if (effectiveOn)
    return `${stateWords[state]}, in force from ${dateInWords(new Date(effectiveOn))}`;
  return computedAt ? `${stateWords[state]}, run ${dateInWords(computedAt)}` : stateWords[state];
}

const dateFormat = new Intl.DateTimeFormat("en-GB", { dateStyle: "medium", timeZone: "UTC" });
const dateInWords = (date: Date) => dateFormat.format(date);

/** The inputs as another concept would have them, on the curve of their own plan; null when it is their own concept. */
function withConcept(
  { inputs, revision }: Estimate,
  concept: ProducingConcept,
  pointer: string,
): EstimateInputs | null {
  const { recoveryPlan } = inputs;
  if (!recoveryPlan) {
    throw new InvalidInputError([
      {
        pointer: `#/${pointer}/concept`,
        detail: `The recoveries of r${revision} were entered; without a recovery plan there is no curve to produce it by another concept.`,
      },
    ]);
  }
  if (recoveryPlan.concept === concept) return null;
  const { p90, p50 } = compileDistribution(inputs.uncertain.pressurePsia.distribution).range;
  const start = { sampleName: null, pressurePsia: { p90, p50 }, depthFt: inputs.depthFt };
  return { ...inputs, recoveryPlan: planForConcept(concept, recoveryPlan, start) };
}

/** A side that cannot be computed is a problem of that side, whatever of it is impossible. */
async function simulated(
  { inputs, ...how }: EstimateRun,
  pointer: string,
  options: ComputeOptions,
): Promise<SimulationSummary> {
  try {
    requirePossibleInputs(inputs);
    return (await runSimulation(inputs, how, options)).summary;
  } catch (error) {
    if (!(error instanceof DomainError)) throw error;
    throw new InvalidInputError([{ pointer: `#/${pointer}`, detail: error.message }]);
  }
}

async function loadFieldSide(
  fieldId: string,
  pointer: string,
  basis: Pick<PortfolioBasis, "estimates" | "dependence">,
  options: ComputeOptions,
): Promise<LoadedSide> {
  const book = await loadBook(basis);
  const field = book.fields.find(({ id }) => id === fieldId);
  if (!field) throw new NotFoundError("field");
  const counted = book.counted.filter((one) => one.field.id === fieldId);
  const aligned = (await alignFields(counted, book.trials, book.dependence.dependence)).get(
    fieldId,
  );
  if (!aligned) {
    throw new InvalidInputError([
      { pointer: `#/${pointer}/fieldId`, detail: `${field.name} has no figures on this basis.` },
    ]);
  }
  const count = counted.length;
  const only = count === 1 ? await findEstimateWithPeople(counted[0].reservoir.estimateId) : null;
  return {
    view: {
      label: field.name,
      detail: `${count === 1 ? "1 reservoir" : `${count} reservoirs`}, ${
        basis.estimates === "approved" ? "approved revisions" : "latest revisions"
      }, dependence “${book.dependence.name}”`,
      href: `/fields/${field.slug}`,
      trials: book.trials,
      quantities: quantitiesOf(
        await runFieldSummary({ buffer: aligned.buffer, trials: book.trials }, options),
      ),
      inputs: null,
    },
    run: only && {
      inputs: only.inputs,
      seed: only.seed,
      trials: only.trials,
      sampling: only.sampling,
    },
    whyNot:
      count === 1
        ? null
        : `${field.name} adds up ${count} reservoirs. Only a difference between two single estimates can be traced to their inputs.`,
  };
}

function quantitiesOf(results: Record<VectorName, QuantitySummary>): Quantities {
  return Object.fromEntries(
    vectorNames.map((name) => [name, withoutHistogram(results[name])]),
  ) as Quantities;
}

function withoutHistogram(summary: QuantitySummary): Omit<QuantitySummary, "histogram"> {
  const { p90, p50, p10, mean, standardDeviation, mode, minimum, maximum } = summary;
  const { standardErrors, exceedance } = summary;
  return {
    p90,
    p50,
    p10,
    mean,
    standardDeviation,
    mode,
    minimum,
    maximum,
    standardErrors,
    exceedance,
  };
}
