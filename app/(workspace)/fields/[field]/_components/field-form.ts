/** The text of a field's form, and what it reads as. */
import type { FieldView, NewFieldRequest } from "@/app/api/v1/fields/schema";
import { ProblemError } from "@/app/_client/request";
import { readPlain, readQuantity, typedFigure } from "@/components/estimate/quantities-of-inputs";
import { prmsSubClasses, type PrmsClass, type PrmsSubClass } from "@/models/vocabulary";

export interface FieldText {
  name: string;
  basinId: string | null;
  operator: string;
  workingInterest: string;
  netRevenueInterest: string;
  prmsClass: PrmsClass;
  prmsSubClass: PrmsSubClass;
  chanceOfCommerciality: string;
  latitude: string;
  longitude: string;
  waterDepthFt: string;
  responsibleEngineerId: string | null;
  notes: string;
}

export type FieldProblems = Partial<Record<keyof FieldText, string>>;

const percent = (value: number) => typedFigure(Number((value * 100).toPrecision(12)));

export function textOfField(field: FieldView | null): FieldText {
  const written = (value: number | null | undefined) =>
    value === null || value === undefined ? "" : typedFigure(value);
  return {
    name: field?.name ?? "",
    basinId: field?.basin.id ?? null,
    operator: field?.operator ?? "",
    workingInterest: field ? percent(field.workingInterest) : "",
    netRevenueInterest: field ? percent(field.netRevenueInterest) : "",
    prmsClass: field?.prmsClass ?? "contingent",
    prmsSubClass: field?.prmsSubClass ?? "development_pending",
    chanceOfCommerciality: field ? percent(field.chanceOfCommerciality) : "",
    latitude: written(field?.latitude),
    longitude: written(field?.longitude),
    waterDepthFt: written(field?.waterDepthFt),
    responsibleEngineerId: field?.responsibleEngineer?.id ?? null,
    notes: field?.notes ?? "",
  };
}

/** The first sub-class of a class, for when the class changes. */
export const firstSubClass = (prmsClass: PrmsClass): PrmsSubClass => prmsSubClasses[prmsClass][0];

/** Reads the form; either the field, or what is wrong with it. */
export function readField(
  text: FieldText,
): { field: NewFieldRequest; problems: null } | { field: null; problems: FieldProblems } {
  const problems: FieldProblems = {};
  const required = (key: "name" | "operator", words: string) => {
    if (text[key].trim() === "") problems[key] = words;
    return text[key].trim();
  };
  const share = (key: "workingInterest" | "netRevenueInterest" | "chanceOfCommerciality") => {
    const { value, problem } = readQuantity(text[key], "fraction", "%", "%");
    if (problem !== null) problems[key] = problem;
    else if (value === null) problems[key] = "Enter a percentage.";
    else if (value > 1) problems[key] = "At most 100 %.";
    return value ?? 0;
  };
  const optional = (key: "latitude" | "longitude" | "waterDepthFt") => {
    const { value, problem } =
      key === "waterDepthFt" ? readQuantity(text[key], "length", "ft") : readPlain(text[key]);
    if (problem !== null) problems[key] = problem;
    return value;
  };
  const field: NewFieldRequest = {
    name: required("name", "Enter a name."),
    basinId: text.basinId ?? "",
    operator: required("operator", "Enter the operator."),
    workingInterest: share("workingInterest"),
    netRevenueInterest: share("netRevenueInterest"),
    chanceOfCommerciality: share("chanceOfCommerciality"),
    prmsClass: text.prmsClass,
    prmsSubClass: text.prmsSubClass,
    latitude: optional("latitude"),
    longitude: optional("longitude"),
    waterDepthFt: optional("waterDepthFt"),
    responsibleEngineerId: text.responsibleEngineerId,
    notes: text.notes.trim(),
  };
  if (text.basinId === null) problems.basinId = "Choose a basin.";
  if (field.netRevenueInterest > field.workingInterest && !problems.netRevenueInterest) {
    problems.netRevenueInterest = "Cannot be above the working interest.";
  }
  return Object.keys(problems).length > 0 ? { field: null, problems } : { field, problems: null };
}

/** What has been changed, as the API takes it: commercial data that was not touched is not sent. */
export function changesOf(field: NewFieldRequest, before: FieldView): Partial<NewFieldRequest> {
  const old: Record<string, unknown> = {
    ...before,
    basinId: before.basin.id,
    responsibleEngineerId: before.responsibleEngineer?.id ?? null,
  };
  return Object.fromEntries(Object.entries(field).filter(([key, value]) => value !== old[key]));
}

/** The server's refusals, at their fields. */
export function problemsOf(error: Error | null): FieldProblems {
  if (!(error instanceof ProblemError)) return {};
  if (error.code === "already_exists") return { name: error.message };
  return Object.fromEntries(
    error.errors.map(({ pointer, detail }) => [pointer.replace(/^#\//, ""), detail]),
  );
}
