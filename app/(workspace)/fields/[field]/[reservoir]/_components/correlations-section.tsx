"use client";

import { useState } from "react";
import { errorWords } from "@/app/_client/request";
import { capital, inWords } from "@/components/estimate/checklist";
import { CorrelationGrid } from "@/components/estimate/correlation-grid";
import { CorrelationRepair } from "@/components/estimate/correlation-repair";
import {
  correlationChanges,
  countedPairs,
  fixedInputs,
  fixedWords,
  pairName,
  refusedPairs,
  withNearest,
} from "@/components/estimate/correlation-words";
import type { Correlation, EstimateText } from "@/components/estimate/estimate-text";
import { Button } from "@/components/ui/button";
import { Section } from "@/components/ui/section";
import { Notice } from "@/components/ui/status";
import type { Draft } from "../_editor/use-draft";
import { useCorrelationCheck } from "../_queries/correlations";

/** Which inputs move together: the matrix, whether it is possible, and the nearest one that is. */
export function CorrelationsSection({ text, draft }: { text: EstimateText; draft: Draft | null }) {
  const fixed = fixedInputs(text);
  const counted = countedPairs(text);
  const refused = refusedPairs(text);
  const { check, error } = useCorrelationCheck(counted);
  const [replaced, setReplaced] = useState<{ before: Correlation[]; after: Correlation[] } | null>(
    null,
  );
  // Undone, or typed over: there is nothing to go back to any more.
  const canUndo = replaced !== null && replaced.after === text.correlations;
  const replace = (after: Correlation[]) => {
    setReplaced({ before: text.correlations, after });
    draft?.setCorrelations(after);
  };
  return (
    <Section
      title={title(counted, check?.possible ?? null)}
      note={
        draft
          ? "Rank correlation, from −1 to 1: how far the order of one input follows the order of another. 0 is independent; hatched, they move against each other. Type in either half."
          : "Rank correlation, from −1 to 1: how far the order of one input follows the order of another. Hatched: they move against each other."
      }
    >
      <div className="correlation-columns">
        <CorrelationGrid
          pairs={text.correlations}
          fixed={fixed}
          conflicts={correlationChanges(counted, check?.nearest?.correlations ?? counted)}
          onChange={draft?.setCorrelation}
        />
        <div className="grid gap-2 text-13">
          {check?.nearest && check.reason !== null && (
            <CorrelationRepair
              key={JSON.stringify(counted)}
              reason={check.reason}
              before={counted}
              nearest={check.nearest.correlations}
              onApply={
                draft
                  ? () => replace(withNearest(text, check.nearest?.correlations ?? []))
                  : undefined
              }
            />
          )}
          {check?.possible && counted.length > 1 && (
            <p role="status">These correlations are possible together.</p>
          )}
          {canUndo && draft && (
            <Notice
              tone="success"
              title="Correlations replaced."
              live={false}
              actions={
                <Button size="small" onClick={() => draft.setCorrelations(replaced.before)}>
                  Undo
                </Button>
              }
            />
          )}
          {refused.length > 0 && (
            <Notice
              tone="error"
              title={`${refused.map(pairName).join("; ")}: an input of a shared set of cases takes no rank correlation.`}
              actions={
                draft && (
                  <Button
                    size="small"
                    onClick={() =>
                      replace(text.correlations.filter((pair) => !refused.includes(pair)))
                    }
                  >
                    Take {refused.length === 1 ? "it" : "them"} out
                  </Button>
                )
              }
            />
          )}
          {error && (
            <Notice title="The correlations could not be checked.">{errorWords(error)}</Notice>
          )}
          {fixedWords(fixed).map((words) => (
            <p key={words} className="text-ink-soft">
              {words}
            </p>
          ))}
        </div>
      </div>
    </Section>
  );
}

function title(counted: readonly Correlation[], possible: boolean | null): string {
  if (counted.length === 0) return "Every input moves by itself";
  if (possible === false) return "These correlations cannot all hold";
  return counted.length === 1
    ? "One pair of inputs moves together"
    : `${capital(inWords(counted.length))} pairs of inputs move together`;
}
