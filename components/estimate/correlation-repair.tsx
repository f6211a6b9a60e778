"use client";

import { useState } from "react";
import { Button } from "@/components/ui/button";
import { Notice } from "@/components/ui/status";
import { capital, inWords } from "./checklist";
import { correlationChanges, pairName } from "./correlation-words";
import type { Correlation } from "./estimate-text";

const written = (rank: number) => rank.toFixed(2).replace("-", "−");

export interface CorrelationRepairProps {
  /** why the correlations are impossible, naming the pairs */
  reason: string;
  before: readonly Correlation[];
  nearest: readonly Correlation[];
  /** absent: nothing can be changed here */
  onApply?: () => void;
}

/** Correlations that contradict each other, and the nearest set that does not: shown pair by pair before it is taken. */
export function CorrelationRepair({ reason, before, nearest, onApply }: CorrelationRepairProps) {
  const [isShown, setShown] = useState(false);
  const changes = correlationChanges(before, nearest);
  return (
    <div className="grid gap-2">
      <Notice
        tone="error"
        title={reason}
        actions={
          onApply &&
          !isShown && (
            <Button size="small" onClick={() => setShown(true)}>
              Nearest possible matrix
            </Button>
          )
        }
      >
        Kept as typed.
      </Notice>
      {isShown && (
        <div className="range-panel">
          <h3>{largestWords(changes)}</h3>
          <table className="ledger-table correlation-changes">
            <caption className="sr-only">Correlations as typed and nearest possible</caption>
            <thead>
              <tr>
                <th scope="col">Pair</th>
                <th scope="col" className="right">
                  As typed
                </th>
                <th scope="col" className="right">
                  Nearest possible
                </th>
              </tr>
            </thead>
            <tbody>
              {changes.map((change) => (
                <tr key={pairName(change)}>
                  <th scope="row" className="wrap plain">
                    {pairName(change)}
                  </th>
                  <td className="right">{written(change.before)}</td>
                  <td className="right">{written(change.after)}</td>
                </tr>
              ))}
            </tbody>
          </table>
          <p className="text-ink-soft">
            The set with the least total of squared changes in which no pair contradicts the others.
            Nothing is changed until you take it.
          </p>
          <div className="flex flex-wrap gap-2">
            <Button kind="primary" size="small" onClick={onApply}>
              Take these correlations
            </Button>
            <Button size="small" onClick={() => setShown(false)}>
              Keep mine
            </Button>
          </div>
        </div>
      )}
    </div>
  );
}

function largestWords(changes: readonly { before: number; after: number }[]): string {
  const [first] = changes;
  if (!first) return "No pair changes by as much as is shown";
  const largest = Math.abs(first.after - first.before).toFixed(2);
  return `${changes.length === 1 ? "One pair changes" : `${capital(inWords(changes.length))} pairs change`}, the most by ${largest}`;
}
