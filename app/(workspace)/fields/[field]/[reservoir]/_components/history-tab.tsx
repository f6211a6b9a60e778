"use client";

import { RevisionList } from "@/components/estimate/revision-list";
import { resultFactor, resultUnit, scaled } from "@/components/estimate/result-rows";
import { Section, Stack } from "@/components/ui/section";
import { EmptyState } from "@/components/ui/status";
import { formatDate, MISSING } from "@/components/ui/format";
import { StateMark } from "@/components/ui/text";
import { LedgerTable } from "@/components/ui/table";
import { useReservoir } from "../_editor/reservoir-context";
import { movementFinding } from "./movement-finding";

const name = "condensateRecoverableStb";

/** How the estimate came to be what it is: every revision, who wrote it, who decided, and what both said. */
export function HistoryTab() {
  const { page, resultBasis } = useReservoir();
  const factor = resultFactor(name, resultBasis);
  const unit = resultUnit(name, resultBasis);
  if (page.revisions.length === 0) {
    return (
      <EmptyState title="No revision yet">
        The history begins with the first estimate that is saved.
      </EmptyState>
    );
  }
  return (
    <Stack>
      <Section
        title={movementFinding(page.revisions, factor, unit)}
        note={`Condensate to the tank, ${unit}, each revision as it was run`}
      >
        <RevisionList
          caption="Revisions with their ranges"
          unit={unit}
          revisions={page.revisions.map((revision) => ({
            id: revision.estimateId,
            revision: revision.revision,
            state: revision.state,
            note: revision.note,
            person: revision.creator,
            at: revision.createdAt,
            range: revision[name] && scaled(revision[name], factor),
          }))}
        />
      </Section>
      <Section title="Who wrote, who decided">
        <LedgerTable caption="Revisions, authors and decisions">
          <thead>
            <tr>
              <th scope="col">Revision</th>
              <th scope="col">Written</th>
              <th scope="col">Submitted</th>
              <th scope="col">Decided</th>
              <th scope="col">What the reviewer said</th>
              <th scope="col">Counts from</th>
              <th scope="col">Run on</th>
            </tr>
          </thead>
          <tbody>
            {page.history.map((revision) => (
              <tr key={revision.id}>
                <th scope="row">
                  <StateMark state={revision.state} revision={revision.revision} worded />
                </th>
                <td className="wrap">
                  {revision.creator?.name ?? MISSING}
                  <small className="block text-ink-soft">{formatDate(revision.createdAt)}</small>
                </td>
                <td>{formatDate(revision.submittedAt)}</td>
                <td className="wrap">
                  {revision.decider?.name ?? MISSING}
                  <small className="block text-ink-soft">{formatDate(revision.decidedAt)}</small>
                </td>
                <td className="wrap max-w-[44ch]">{revision.decisionNote || MISSING}</td>
                <td>{formatDate(revision.effectiveOn)}</td>
                <td className="wrap">
                  {revision.computedAt
                    ? `${revision.trials.toLocaleString("en-US")} trials`
                    : MISSING}
                  {revision.engineVersion && (
                    <small className="block text-ink-soft">
                      engine {revision.engineVersion}, seed {revision.seed}
                    </small>
                  )}
                </td>
              </tr>
            ))}
          </tbody>
        </LedgerTable>
      </Section>
    </Stack>
  );
}
