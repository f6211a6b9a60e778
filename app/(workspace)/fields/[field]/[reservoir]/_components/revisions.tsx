"use client";

import { RevisionList } from "@/components/estimate/revision-list";
import { resultFactor, resultUnit, scaled } from "@/components/estimate/result-rows";
import { Section } from "@/components/ui/section";
import { useReservoir } from "../_editor/reservoir-context";

const name = "condensateRecoverableStb";

/** Every revision with its mark; the one being typed with its live figures. */
export function Revisions() {
  const { page, shown, draft, results, resultBasis } = useReservoir();
  const factor = resultFactor(name, resultBasis);
  const unit = resultUnit(name, resultBasis);
  if (page.revisions.length === 0) return null;
  return (
    <Section title="Revisions" note={`Condensate to the tank, ${unit}`}>
      <RevisionList
        caption="Revisions of this reservoir"
        unit={unit}
        revisions={page.revisions.map((revision) => {
          const isLive = draft !== null && revision.estimateId === shown?.id;
          const range = isLive
            ? (results.summary?.results[name] ?? revision[name])
            : revision[name];
          return {
            id: revision.estimateId,
            revision: revision.revision,
            state: revision.state,
            note: revision.note,
            person: revision.decider ?? revision.creator,
            at: revision.decidedAt ?? revision.submittedAt ?? revision.createdAt,
            range: range && scaled(range, factor),
          };
        })}
      />
    </Section>
  );
}
