import { z } from "zod";
import {
  producingConcepts,
  type ProducingConcept,
} from "@/analytics/recovery/recovery-plan-schema";
import { vectorNames, type VectorName } from "@/analytics/volumetrics/results-schema";
import type { ComparisonSide } from "@/app/api/v1/comparisons/schema";

/** What a comparison's address holds. */
export interface ComparisonAddress {
  left: ComparisonSide | null;
  right: ComparisonSide | null;
  result: VectorName;
}

export const defaultResult: VectorName = "condensateRecoverableStb";

/** "estimate:<id>", "concept:<id>:cycling", "field:<id>" */
export function writeSide(side: ComparisonSide): string {
  switch (side.kind) {
    case "estimate":
      return `estimate:${side.estimateId}`;
    case "concept":
      return `concept:${side.estimateId}:${side.concept}`;
    case "field":
      return `field:${side.fieldId}`;
  }
}

const isId = (text: string | undefined): text is string => z.uuid().safeParse(text).success;
const isConcept = (text: string | undefined): text is ProducingConcept =>
  (producingConcepts as readonly (string | undefined)[]).includes(text);

/** The side that a part of an address names; `null` for nothing, or for what is not understood. */
export function readSide(text: string | null): ComparisonSide | null {
  const [kind, id, concept] = (text ?? "").split(":");
  if (!isId(id)) return null;
  if (kind === "estimate") return { kind, estimateId: id };
  if (kind === "field") return { kind, fieldId: id };
  return kind === "concept" && isConcept(concept) ? { kind, estimateId: id, concept } : null;
}

export function readComparison(search: Pick<URLSearchParams, "get">): ComparisonAddress {
  const result = vectorNames.find((name) => name === search.get("result"));
  return {
    left: readSide(search.get("left")),
    right: readSide(search.get("right")),
    result: result ?? defaultResult,
  };
}

/** The address of a comparison, without the basis. */
export function comparisonHref({
  left,
  right,
  result = defaultResult,
}: {
  left: ComparisonSide | null;
  right: ComparisonSide | null;
  result?: VectorName;
}): string {
  const parts = [
    left && `left=${writeSide(left)}`,
    right && `right=${writeSide(right)}`,
    result !== defaultResult && `result=${result}`,
  ].filter(Boolean);
  return parts.length === 0 ? "/compare" : `/compare?${parts.join("&")}`;
}
