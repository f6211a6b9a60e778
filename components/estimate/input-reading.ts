import { DomainError } from "@/analytics/errors";
import {
  compileDistribution,
  type CompiledDistribution,
} from "@/analytics/uncertainty/distribution";
import type { Distribution } from "@/analytics/uncertainty/distribution-schema";
import { compilePossible, type PossibleRange } from "@/analytics/uncertainty/possible-range";
import type { InputName } from "@/analytics/volumetrics/inputs-schema";
import type { DriverName } from "@/analytics/volumetrics/results-schema";
import { usualRanges } from "@/analytics/volumetrics/usual-ranges";
import type { InputText } from "./input-text";
import type { PastedCells } from "./pasted-cells";
import type { FieldReading } from "./quantities-of-inputs";
import { readDefinition } from "./range-reading";
import { parametersOfShape } from "./shapes";

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
  /** by path in the distribution, such as `low`, `points.1.value` or `minimum` */
  fields: Record<string, FieldReading>;
  /** why the figures make no distribution, when that is no single field's fault */
  problem: string | null;
  /** would make the input possible; `null` while it is, or while most of the curve is impossible */
  cutOff: CutOff | null;
  isComplete: boolean;
  /** of pasted data; `null` for other shapes */
  cells: PastedCells | null;
}

/** Reads the fields of one input: each by itself, then all of them as a distribution that the input can have. */
export const readInput = (name: InputName, text: InputText): InputReading =>
  readDistribution(name, text, usualRanges[name]);

/** The same for any uncertain quantity, given what it can be. */
export function readDistribution(
  name: DriverName,
  text: InputText,
  range: PossibleRange,
): InputReading {
  const { definition, ...read } = readDefinition(name, text);
  const nothing = { distribution: null, compiled: null, cutOff: null };
  if (definition === null) return { ...nothing, ...read };
  return { ...read, ...compileReading(range, text, definition, read.fields) };
}

function compileReading(
  range: PossibleRange,
  text: InputText,
  distribution: Distribution,
  fields: Record<string, FieldReading>,
): Omit<InputReading, "isComplete" | "cells"> {
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
      cutOff: compiled && distribution.kind !== "scenarios" ? cutOffOf(compiled, error) : null,
      ...placeProblem(fields, error, text),
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
  text: InputText,
): Pick<InputReading, "fields" | "problem"> {
  const key = fieldOf(fields, error.details.input ?? "", text);
  if (key === null) return { fields, problem: error.message };
  return {
    fields: { ...fields, [key]: { ...fields[key], problem: error.message } },
    problem: null,
  };
}

/** Key of the field that a path ends in; `null` when it names none that is on the screen. */
function fieldOf(
  fields: Record<string, FieldReading>,
  path: string,
  text: InputText,
): string | null {
  const [named] = Object.keys(fields)
    .filter((key) => path === key || path.endsWith(`.${key}`))
    .sort((a, b) => b.length - a.length);
  if (named === undefined) return null;
  const parts = named.split(".");
  const bound = parts.at(-1);
  const isHidden = (bound === "minimum" || bound === "maximum") && fields[named].value === null;
  if (!isHidden) return named;
  const [, index] = parts;
  const range = parts[0] === "scenarios" ? text.cases?.cases[Number(index)].range : text;
  if (!range) return null;
  const parameters = parametersOfShape(range);
  const end = bound === "minimum" ? parameters.at(0) : parameters.at(-1);
  return end ? [...parts.slice(0, -1), end.key].join(".") : null;
}
