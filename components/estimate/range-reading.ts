/** Reads the fields of a range, and of the cases of an input, as a distribution that may or may not exist. */
import {
  DATA_VALUES,
  type Distribution,
  type DistributionKind,
  type Scenario,
  type SimpleDistribution,
} from "@/analytics/uncertainty/distribution-schema";
import type { DriverName } from "@/analytics/volumetrics/results-schema";
import { driverCatalogue } from "./input-catalogue";
import type { CasesText, DataText, InputText, PercentilesText, RangeText } from "./input-text";
import { readCells, type PastedCells } from "./pasted-cells";
import { readPercent } from "./percent-text";
import { readField, readPlain, type FieldReading } from "./quantities-of-inputs";
import { hasEnds, parametersOfShape } from "./shapes";

export interface RangeReading<Definition extends Distribution = Distribution> {
  /** as typed, whether or not it makes a curve; `null` while something is missing or cannot be read */
  definition: Definition | null;
  /** by path in the distribution: `low`, `points.1.value`, `scenarios.0.distribution.low`, `minimum` */
  fields: Record<string, FieldReading>;
  /** what is wrong with no single field */
  problem: string | null;
  isComplete: boolean;
  /** cells of pasted data; `null` for other shapes */
  cells: PastedCells | null;
}

export const EMPTY_FIELD: FieldReading = { value: null, preview: null, problem: null };

/** Reads an input's range, with all of its cases. */
export function readDefinition(name: DriverName, text: InputText): RangeReading {
  return isCases(text)
    ? readCases(name, text.cases ?? { caseSet: "", cases: [] })
    : readRange(name, text as RangeText);
}

const isCases = (text: RangeText<DistributionKind>) => text.kind === "scenarios";

function readRange(name: DriverName, text: RangeText): RangeReading<SimpleDistribution> {
  const { unit } = driverCatalogue[name];
  const isBounded = text.kind !== "constant";
  const bound = (typed: string) => (isBounded ? readField(typed, name, true, unit) : EMPTY_FIELD);
  const bounds = { minimum: bound(text.minimum), maximum: bound(text.maximum) };
  const shape = readShape(name, text);
  const fields = { ...shape.fields, ...bounds };
  const isReadable = Object.values(fields).every(({ problem }) => problem === null);
  if (!shape.isComplete || !isReadable || shape.problem !== null || shape.parameters === null) {
    return { ...shape, fields, definition: null };
  }
  const limits = Object.fromEntries(
    Object.entries(bounds).flatMap(([key, { value }]) => (value === null ? [] : [[key, value]])),
  );
  // The parameters are those of the kind: each was read by it.
  const definition = { kind: text.kind, ...shape.parameters, ...limits } as SimpleDistribution;
  return { ...shape, fields, definition };
}

type ShapeReading = Omit<RangeReading, "definition"> & {
  /** `null` while the fields give none */
  parameters: object | null;
};

function readShape(name: DriverName, text: RangeText): ShapeReading {
  switch (text.kind) {
    case "percentiles":
      return readPercentiles(name, text.percentiles);
    case "data":
      return readData(name, text.data);
    default:
      return readParameters(name, text);
  }
}

function readParameters(name: DriverName, text: RangeText): ShapeReading {
  const { unit } = driverCatalogue[name];
  const parameters = parametersOfShape(text);
  const fields = Object.fromEntries(
    parameters.map(({ key, inUnit }) => {
      const typed = text.fields[key] ?? "";
      // A spread of temperatures has no zero to convert.
      const isSpread = name === "temperatureDegF" && key === "standardDeviation";
      return [key, isSpread ? readPlain(typed) : readField(typed, name, inUnit, unit)] as const;
    }),
  );
  const isStated = hasEnds(text.kind) && text.ends !== undefined;
  return {
    fields,
    problem: null,
    cells: null,
    isComplete: parameters.every(({ key }) => (text.fields[key] ?? "").trim() !== ""),
    parameters: {
      ...Object.fromEntries(parameters.map(({ key }) => [key, fields[key].value])),
      ...(isStated && { ends: text.ends }),
    },
  };
}

const PERCENTILE_WORDS =
  "A percentile is between P99 and P1: 90 is a chance of 90 % of at least the value.";

function readPercentiles(name: DriverName, text: PercentilesText | undefined): ShapeReading {
  const { unit } = driverCatalogue[name];
  const points = text?.points ?? [];
  const fields = Object.fromEntries(
    points.flatMap(({ exceedance, value }, index) => [
      [`points.${index}.exceedance`, percentReading(exceedance, PERCENTILE_WORDS)] as const,
      [`points.${index}.value`, readField(value, name, true, unit)] as const,
    ]),
  );
  return {
    fields,
    problem: null,
    cells: null,
    isComplete:
      points.length >= 2 &&
      points.every(({ exceedance, value }) => exceedance.trim() !== "" && value.trim() !== ""),
    parameters: text
      ? {
          family: text.family,
          points: points.map((_, index) => ({
            exceedance: fields[`points.${index}.exceedance`].value,
            value: fields[`points.${index}.value`].value,
          })),
        }
      : null,
  };
}

function percentReading(text: string, words: string): FieldReading {
  const read = readPercent(text, words);
  return typeof read === "string"
    ? { ...EMPTY_FIELD, problem: read }
    : { ...EMPTY_FIELD, value: read };
}

function readData(name: DriverName, text: DataText | undefined): ShapeReading {
  const cells = readCells(text?.cells ?? "", name);
  const [fewest, most] = DATA_VALUES;
  const { length } = cells.values;
  const problem =
    cells.count === 0
      ? null
      : length < fewest
        ? `${length === 1 ? "One value says" : `${length} values say`} nothing of a shape; at least ${fewest} are needed.`
        : length > most
          ? `${length.toLocaleString("en-US")} values are more than can be kept here; at most ${most.toLocaleString("en-US")}.`
          : null;
  return {
    fields: {},
    problem,
    cells,
    isComplete: cells.count > 0,
    parameters: text ? { shape: text.shape, values: cells.values } : null,
  };
}

const WEIGHT_WORDS = "The chance of a case is more than 0 and less than 100 %.";

/** Cases as typed. Whether their chances add up to 100 % is for the engine to say. */
function readCases(name: DriverName, text: CasesText): RangeReading {
  const read = text.cases.map(({ range }) => readRange(name, range));
  const weights = text.cases.map(({ weight }) => percentReading(weight, WEIGHT_WORDS));
  const fields = Object.fromEntries(
    read.flatMap(({ fields: ofCase }, index) => [
      [`scenarios.${index}.weight`, weights[index]] as const,
      ...Object.entries(ofCase).map(
        ([key, field]) => [`scenarios.${index}.distribution.${key}`, field] as const,
      ),
    ]),
  );
  const isComplete =
    text.cases.length >= 2 &&
    text.cases.every(
      ({ name: called, weight }, index) =>
        called.trim() !== "" && weight.trim() !== "" && read[index].isComplete,
    );
  const problem = read.find((ofCase) => ofCase.problem !== null)?.problem ?? null;
  const scenarios = text.cases.flatMap(({ name: called }, index): Scenario[] => {
    const { definition } = read[index];
    const { value: weight } = weights[index];
    return definition === null || weight === null
      ? []
      : [{ name: called.trim(), weight, distribution: definition }];
  });
  const caseSet = text.caseSet.trim();
  return {
    fields,
    problem,
    cells: null,
    isComplete,
    definition:
      isComplete && scenarios.length === text.cases.length
        ? { kind: "scenarios", ...(caseSet !== "" && { caseSet }), scenarios }
        : null,
  };
}
