import type { Finding } from "@/components/estimate/finding-list";
import { shortConcepts } from "@/components/estimate/plan-words";
import type { ConceptView } from "./concept-findings";

/** Every warning once, with the concepts that it is about unless it is about all of them. */
export function warningsByConcept(concepts: readonly ConceptView[]): Finding[] {
  const found = new Map<string, { tone: Finding["tone"]; about: string[] }>();
  for (const { concept, warnings } of concepts) {
    for (const { message, severity } of warnings) {
      const known = found.get(message) ?? {
        tone: severity === "caution" ? ("caution" as const) : ("warning" as const),
        about: [],
      };
      known.about.push(shortConcepts[concept]);
      found.set(message, known);
    }
  }
  return [...found].map(([text, { tone, about }]) => ({
    tone,
    title: about.length < concepts.length ? about.join(", ") : undefined,
    text,
  }));
}
