import { DomainError } from "@/analytics/errors";
import {
  compileDistribution,
  type CompiledDistribution,
} from "@/analytics/uncertainty/distribution";
import {
  distributionSchema,
  type Distribution,
  type DistributionKind,
} from "@/analytics/uncertainty/distribution-schema";
import { compilePossible, type PossibleRange } from "@/analytics/uncertainty/possible-range";
import type { InputName } from "@/analytics/volumetrics/inputs-schema";
import type { DriverName } from "@/analytics/volumetrics/results-schema";
import { usualRanges } from "@/analytics/volumetrics/usual-ranges";
import { driverCatalogue } from "./input-catalogue";
import { emptyFields, type InputText } from "./input-text";
import { readField, readPlain, type FieldReading } from "./quantities-of-inputs";
import { shapeOf } from "./shapes";

/** A bound that leaves out what cannot be, for a curve that reaches past it. */
export interface CutOff {
  key: "minimum" | "maximum";
  value: number;
}

/** What the fields of one input read as. */
export interface InputReading {
  /** `null` while something is missing or impossible */
  distribution: Distribution | null;
  /** also of a curve that reaches past what is possible, so that its figures can be seen and reshaped */
  compiled: CompiledDistribution | null;
  /** by parameter key, and by `minimum` and `maximum` */
  fields: Record<string, FieldReading>;
  /** why the figures make no distribution, when that is no single field's fault */
  problem: string | null;
  /** would make the input possible; `null` while it is, or while most of the curve is impossible */
  cutOff: CutOff | null;
  isComplete: boolean;
}

const EMPTY: FieldReading = { value: null, preview: null, problem: null };

/** Reads the fields of one input: each by itself, then all of them as a distribution that the input can have. */
export const readInput = (name: InputName, text: InputText): InputReading =>
  readDistribution(name, text, usualRanges[name]);

/** The same for any uncertain quantity, given what it can be. */
export function readDistribution(
  name: DriverName,
  text: InputText,
  range: PossibleRange,
): InputReading {
  const { unit } = driverCatalogue[name];
  const fields: Record<string, FieldReading> = {};
  for (const { key, inUnit } of shapeOf(text.kind).parameters) {
    fields[key] = readField(text.fields[key] ?? "", name, inUnit, unit);
  }
  const bounded = text.kind !== "constant";
  fields.minimum = bounded ? readField(text.minimum, name, true, unit) : EMPTY;
  fields.maximum = bounded ? readField(text.maximum, name, true, unit) : EMPTY;
  if (name === "temperatureDegF" && text.kind === "normal") {
    // A spread of temperatures has no zero to convert.
    fields.standardDeviation = readPlain(text.fields.standardDeviation ?? "");
  }

  const isComplete = emptyFields(text).length === 0;
  const readable = Object.values(fields).every((field) => field.problem === null);
  if (!isComplete || !readable) {
    const nothing = { distribution: null, compiled: null, problem: null, cutOff: null };
    return { ...nothing, fields, isComplete };
  }
  return { ...compileReading(range, text, fields), isComplete };
}

function compileReading(
  range: PossibleRange,
  text: InputText,
  fields: Record<string, FieldReading>,
): Omit<InputReading, "isComplete"> {
  const values = Object.entries(fields).flatMap(([key, field]) =>
    field.value === null ? [] : [[key, field.value] as const],
  );
  const distribution = distributionSchema.parse({ kind: text.kind, ...Object.fromEntries(values) });
  let compiled: CompiledDistribution | null = null;
  try {
    compiled = compileDistribution(distribution);
    compilePossible(range, distribution);
    return { distribution, compiled, fields, problem: null, cutOff: null };
  } catch (error) {
    if (!(error instanceof DomainError)) throw error;
    return {
      distribution: null,
      compiled,
      cutOff: compiled && cutOffOf(compiled, error),
      ...placeProblem(fields, error, text.kind),
    };
  }
}

/** A cut that leaves less than half of the curve would not be what the person meant: a slip of units, rather. */
const MOST_CUT_OFF = 0.5;

function cutOffOf(compiled: CompiledDistribution, error: DomainError): CutOff | null {
  const { input: key, value } = error.details;
  if ((key !== "minimum" && key !== "maximum") || value === undefined) return null;
  const below = compiled.cdf(value);
  const share = key === "minimum" ? below : 1 - below;
  return share > MOST_CUT_OFF ? null : { key, value };
}

/**
 * Puts the reason at the field that it names, or above all of them. A bound that nobody typed has no field on the
 * screen: its reason goes to the low or high figure that reaches past it.
 */
export function placeProblem(
  fields: Record<string, FieldReading>,
  error: DomainError,
  kind: DistributionKind,
): Pick<InputReading, "fields" | "problem"> {
  const named = error.details.input?.split(".").at(-1);
  const isBound = named === "minimum" || named === "maximum";
  const { parameters } = shapeOf(kind);
  const end = named === "minimum" ? parameters.at(0) : parameters.at(-1);
  const key = isBound && fields[named].value === null ? end?.key : named;
  if (key === undefined || !(key in fields)) return { fields, problem: error.message };
  return {
    fields: { ...fields, [key]: { ...fields[key], problem: error.message } },
    problem: null,
  };
}
