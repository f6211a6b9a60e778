import { z } from "zod";
import {
  compositionSheetSchema,
  reportedStreamSchema,
  separatorStagesSchema,
} from "@/analytics/composition/composition-schema";
import { depletionTableSchema } from "@/analytics/depletion/depletion-table-schema";
import { characterisationSchema } from "@/analytics/equation-of-state/characterisation-schema";
import { separatorTestSchema } from "@/analytics/fluid/separator-test-schema";
import { recoveryCurveSchema } from "@/analytics/recovery/recovery-curve-schema";
import { recoveryPlanSchema } from "@/analytics/recovery/recovery-plan-schema";
import { distributionSchema } from "@/analytics/uncertainty/distribution-schema";
import { estimateInputsSchema } from "@/analytics/volumetrics/inputs-schema";
import { quantitySummarySchema, rangeSchema } from "@/analytics/volumetrics/results-schema";
import { meteredRateSchema } from "@/analytics/volumetrics/rates";
import { warningSchema } from "@/analytics/warnings";

/** One line of a table that describes what goes into a request or comes out of it. */
export interface FieldRow {
  /** dotted path; `[]` is each entry of a list, `{name}` each entry of a record */
  path: string;
  type: string;
  needed: boolean;
  note: string;
  /** key of `sharedShapes` when the field is one of those */
  shape: string | null;
}

/** Shapes that several calculations use: described once, and named where they occur. */
export const sharedShapes: Record<string, { title: string; schema: z.ZodType }> = {
  SeparatorTest: { title: "Separator test", schema: separatorTestSchema },
  MeteredRate: { title: "Metered rate", schema: meteredRateSchema },
  Distribution: { title: "Distribution", schema: distributionSchema },
  EstimateInputs: { title: "Inputs of an estimate", schema: estimateInputsSchema },
  CompositionSheet: { title: "Composition sheet", schema: compositionSheetSchema },
  ReportedStream: { title: "Reported stream", schema: reportedStreamSchema },
  SeparatorStages: { title: "Separator stages", schema: separatorStagesSchema },
  Characterisation: { title: "Characterisation", schema: characterisationSchema },
  DepletionTable: { title: "Depletion table", schema: depletionTableSchema },
  RecoveryCurve: { title: "Recovery curve", schema: recoveryCurveSchema },
  RecoveryPlan: { title: "Recovery plan", schema: recoveryPlanSchema },
  Range: { title: "Range", schema: rangeSchema },
  QuantitySummary: { title: "Summary of a quantity", schema: quantitySummarySchema },
  Warning: { title: "Warning", schema: warningSchema },
};

type Json = z.core.JSONSchema.BaseSchema;

/** Shapes other than the one that is being described become references, so that nothing is described twice. */
function toJson(schema: z.ZodType, io: "input" | "output"): Json {
  const registry = z.registry<{ id?: string; description?: string }>();
  for (const [id, shape] of Object.entries(sharedShapes)) {
    if (shape.schema !== schema) registry.add(shape.schema, { id });
  }
  return z.toJSONSchema(schema, {
    io,
    metadata: registry,
    // Descriptions live in zod's own registry, which ours stands in for.
    override: ({ zodSchema, jsonSchema }) => {
      const description = z.globalRegistry.get(zodSchema)?.description;
      if (description) jsonSchema.description = description;
    },
  });
}

const isNull = (schema: Json): boolean => schema.type === "null";

function referenceOf(schema: Json): string | null {
  return schema.$ref?.split("/").at(-1) ?? null;
}

/** Takes "or null" off a schema. */
function withoutNull(schema: Json): { inner: Json; nullable: boolean } {
  const parts = (schema.anyOf ?? []) as Json[];
  if (parts.length === 2 && parts.some(isNull)) {
    const inner = parts.find((part) => !isNull(part)) ?? schema;
    return {
      inner: { ...inner, description: schema.description ?? inner.description },
      nullable: true,
    };
  }
  // a plain type or null comes as a list of types
  const types: unknown = schema.type;
  if (Array.isArray(types) && types.length === 2 && types.includes("null")) {
    const type = types.find((name) => name !== "null") as Json["type"];
    return { inner: { ...schema, type }, nullable: true };
  }
  return { inner: schema, nullable: false };
}

function limitsOf({ minimum, maximum, exclusiveMinimum, exclusiveMaximum }: Json): string {
  const isSafeBound = (value: number): boolean => Math.abs(value) >= Number.MAX_SAFE_INTEGER;
  const parts = [
    typeof exclusiveMinimum === "number" && `above ${exclusiveMinimum}`,
    typeof minimum === "number" && !isSafeBound(minimum) && `from ${minimum}`,
    typeof exclusiveMaximum === "number" && `below ${exclusiveMaximum}`,
    typeof maximum === "number" && !isSafeBound(maximum) && `to ${maximum}`,
  ].filter(Boolean);
  return parts.join(" ");
}

function typeWords(schema: Json): string {
  const shape = referenceOf(schema);
  if (shape) return sharedShapes[shape]?.title.toLowerCase() ?? shape;
  if (schema.const !== undefined) return JSON.stringify(schema.const);
  if (schema.enum) return schema.enum.map((value) => JSON.stringify(value)).join(", ");
  if (schema.type === "array") {
    const items = schema.items as Json | undefined;
    return items ? `list of ${typeWords(items)}` : "list";
  }
  if (schema.anyOf ?? schema.oneOf) return "one of several";
  if (schema.type === "integer") return "whole number";
  return typeof schema.type === "string" ? schema.type : "any";
}

function childrenOf(schema: Json, path: string): FieldRow[] {
  if (referenceOf(schema)) return [];
  if (schema.type === "array" && schema.items) {
    return childrenOf(schema.items as Json, `${path}[]`);
  }
  const alternatives = (schema.oneOf ?? schema.anyOf) as Json[] | undefined;
  if (alternatives) {
    return alternatives.flatMap((alternative) => {
      const kind = (alternative.properties?.kind as Json | undefined)?.const;
      return childrenOf(alternative, kind === undefined ? path : `${path}(${String(kind)})`);
    });
  }
  const entries = schema.additionalProperties as Json | boolean | undefined;
  if (schema.type === "object" && entries && typeof entries === "object") {
    const names = (schema.propertyNames as Json | undefined)?.enum?.map(String) ?? [];
    const entry = fieldRow(entries, `${path}.{name}`, true);
    const note = names.length > 0 ? `name: ${names.join(", ")}` : entry.note;
    return [{ ...entry, note }, ...childrenOf(entries, `${path}.{name}`)];
  }
  const needed = new Set(schema.required ?? []);
  return Object.entries(schema.properties ?? {}).flatMap(([name, property]) => {
    const child = property as Json;
    const childPath = path === "" ? name : `${path}.${name}`;
    const { inner } = withoutNull(child);
    return [fieldRow(child, childPath, needed.has(name)), ...childrenOf(inner, childPath)];
  });
}

function fieldRow(schema: Json, path: string, needed: boolean): FieldRow {
  const { inner, nullable } = withoutNull(schema);
  const items = inner.type === "array" ? (inner.items as Json | undefined) : undefined;
  const notes = [
    inner.description,
    limitsOf(inner),
    schema.default !== undefined && `${JSON.stringify(schema.default)} when left out`,
  ].filter(Boolean);
  return {
    path: path.replace(/^\./, ""),
    type: typeWords(inner) + (nullable ? " or null" : ""),
    needed,
    note: notes.join("; "),
    shape: referenceOf(inner) ?? (items ? referenceOf(items) : null),
  };
}

/**
 * The fields of a zod schema, in its order, as lines of a table.
 *
 * @param io  `input`: what a caller may send, defaults left out; `output`: what comes back
 */
export function describeSchema(schema: z.ZodType, io: "input" | "output"): FieldRow[] {
  return childrenOf(toJson(schema, io), "");
}
