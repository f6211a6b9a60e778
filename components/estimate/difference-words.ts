/** A distribution as it was typed, in a line: what a reviewer compares with what it was. */
import type { Distribution, SimpleDistribution } from "@/analytics/uncertainty/distribution-schema";
import type { EstimateInputs } from "@/analytics/volumetrics/inputs-schema";
import type { DriverName } from "@/analytics/volumetrics/results-schema";
import { inputNames } from "@/analytics/volumetrics/inputs-schema";
import { listWords } from "@/components/portfolio/reporting";
import { formatPercent, lowerFirst } from "@/components/ui/format";
import { familyLabels } from "./fit-words";
import { inputCatalogue } from "./input-catalogue";
import { percentileName } from "./percent-text";
import { typedFigure } from "./quantities-of-inputs";
import { parametersOf, parametersOfShape, shapeOf } from "./shapes";

/** Digits beyond these come of a conversion of units, not of a keyboard. */
const TYPED_DIGITS = 6;

const figure = (value: number) => typedFigure(Number(value.toPrecision(TYPED_DIGITS)));

/** Only the first letter of a word goes: "P90" stays, "Most likely" is "most likely". */
const within = (label: string) => (/^[A-Z]\d/.test(label) ? label : lowerFirst(label));

const dataNames = {
  empirical: "as they are",
  normal: "as a normal curve",
  lognormal: "as a lognormal curve",
} as const;

function boundWords(distribution: SimpleDistribution): string {
  if (distribution.kind === "constant") return "";
  const { minimum, maximum } = distribution;
  const ends = [
    minimum !== undefined && `at least ${figure(minimum)}`,
    maximum !== undefined && `at most ${figure(maximum)}`,
  ].filter((end) => end !== false);
  return ends.length === 0 ? "" : `, bounded: ${ends.join(" and ")}`;
}

function simpleWords(distribution: SimpleDistribution): string {
  switch (distribution.kind) {
    case "percentiles": {
      const points = distribution.points.map(
        ({ exceedance, value }) => `${percentileName(exceedance)} ${figure(value)}`,
      );
      return `${familyLabels[distribution.family]} through ${listWords(points)}`;
    }
    case "data":
      return `${distribution.values.length.toLocaleString("en-US")} measured values ${dataNames[distribution.shape]}`;
    default: {
      const values = parametersOf(distribution);
      const [name] = shapeOf(distribution.kind).label.split(",");
      const parts = parametersOfShape(distribution).map(
        ({ key, label }) => `${within(label)} ${figure(values[key])}`,
      );
      return distribution.kind === "constant"
        ? `Constant ${figure(distribution.value)}`
        : `${name}: ${parts.join(", ")}`;
    }
  }
}

/**
 * "PERT: lowest 0.34, most likely 0.45, highest 0.56", "12 measured values as they are", "Cases: low 30 % (constant 900),
 * …, the same as of area (Gas-water contact)". Figures are in the unit in which the input is kept.
 *
 * @param name    the input, and the estimate it is of, whose other inputs may take the same case
 */
export function distributionWords(
  distribution: Distribution,
  name: DriverName,
  { uncertain }: Pick<EstimateInputs, "uncertain">,
): string {
  if (distribution.kind !== "scenarios") {
    return `${simpleWords(distribution)}${boundWords(distribution)}`;
  }
  const { caseSet, scenarios } = distribution;
  const cases = scenarios.map(
    ({ name: called, weight, distribution: own }) =>
      `${called} ${formatPercent(weight)} (${lowerShape(simpleWords(own))}${boundWords(own)})`,
  );
  const sharing = inputNames.filter((other) => {
    const { distribution: theirs } = uncertain[other];
    return (
      other !== name &&
      caseSet !== undefined &&
      theirs.kind === "scenarios" &&
      theirs.caseSet === caseSet
    );
  });
  const others = listWords(sharing.map((other) => lowerFirst(inputCatalogue[other].label)));
  const set =
    caseSet === undefined
      ? ""
      : others === ""
        ? `; set ${caseSet}`
        : `; the same case as ${others} (${caseSet})`;
  return `Cases: ${cases.join(", ")}${set}`;
}

/** "PERT" keeps its capitals. */
const lowerShape = (words: string) => (words.startsWith("PERT") ? words : lowerFirst(words));

/** Shapes whose typed figures are the ones that a list of P90 and P10 shows anyhow. */
export const isReadOffRange = ({ kind }: Distribution): boolean =>
  kind === "normalP90P10" || kind === "lognormalP90P10" || kind === "constant";
