"use client";

import { useState } from "react";
import type { EstimateInputs } from "@/analytics/volumetrics/inputs-schema";
import { compileDistribution } from "@/analytics/uncertainty/distribution";
import { conflictingParts, mergeDrafts, type DraftPart } from "@/components/estimate/differences";
import { inputCatalogue } from "@/components/estimate/input-catalogue";
import { planInWords } from "@/components/estimate/plan-words";
import { shapeOf } from "@/components/estimate/shapes";
import { Button } from "@/components/ui/button";
import { Segmented } from "@/components/ui/choice";
import { Dialog } from "@/components/ui/dialog";
import { formatFigure } from "@/components/ui/format";
import { Notice } from "@/components/ui/status";
import { useReservoir } from "../_editor/reservoir-context";

const otherParts = {
  correlations: "Inputs that move together",
  fluid: "Separator test",
  depthFt: "Depth",
  recoveryPlan: "Recovery plan",
};

const nameOf = (part: DraftPart) =>
  part in otherParts
    ? otherParts[part as keyof typeof otherParts]
    : inputCatalogue[part as keyof typeof inputCatalogue].label;

function wordsOf(inputs: EstimateInputs, part: DraftPart): string {
  if (part === "depthFt") return inputs.depthFt === null ? "not given" : `${inputs.depthFt} ft`;
  if (part === "fluid") return `${formatFigure(inputs.fluid.condensateApi)} °API`;
  if (part === "correlations") {
    return inputs.correlations.length === 1 ? "1 pair" : `${inputs.correlations.length} pairs`;
  }
  if (part === "recoveryPlan") {
    return inputs.recoveryPlan ? planInWords(inputs.recoveryPlan) : "recoveries typed by hand";
  }
  const { distribution, source, reason } = inputs.uncertain[part];
  const { p90, p50, p10 } = compileDistribution(distribution).range;
  const figures = [p90, p50, p10].map((value) => formatFigure(value)).join(" / ");
  return `${figures}, ${shapeOf(distribution.kind).label}${source ? `. ${source}` : ""}${reason ? `. ${reason}` : ""}`;
}

/** Somebody else saved the same draft first. Both versions stay on screen until each difference has been chosen. */
export function ConflictDialog() {
  const { draft } = useReservoir();
  const theirs = draft?.theirs;
  if (!draft || !theirs) return null;
  return <Conflict key={theirs.version} draft={draft} theirs={theirs} />;
}

function Conflict({
  draft,
  theirs,
}: {
  draft: NonNullable<ReturnType<typeof useReservoir>["draft"]>;
  theirs: NonNullable<NonNullable<ReturnType<typeof useReservoir>["draft"]>["theirs"]>;
}) {
  const mine = draft.reading.estimate;
  const [fromTheirs, setFromTheirs] = useState<readonly DraftPart[]>([]);
  const parts = mine ? conflictingParts(mine, theirs.inputs) : [];
  const choose = (part: DraftPart, side: "mine" | "theirs") =>
    setFromTheirs((chosen) =>
      side === "theirs"
        ? [...new Set([...chosen, part])]
        : chosen.filter((other) => other !== part),
    );

  return (
    <Dialog
      open
      onClose={() => undefined}
      width={720}
      title="Somebody else saved this draft first"
      description={`Version ${theirs.version} was saved while you were typing. Nothing of yours is lost: choose for each difference, then go on.`}
      actions={
        <>
          <Button onClick={() => draft.resolveConflict(theirs.inputs)}>Take all of theirs</Button>
          <Button onClick={draft.keepMine}>Keep all of mine</Button>
          <Button
            kind="primary"
            disabled={!mine}
            onClick={() =>
              mine && draft.resolveConflict(mergeDrafts(mine, theirs.inputs, fromTheirs))
            }
          >
            Go on as chosen
          </Button>
        </>
      }
    >
      {!mine ? (
        <Notice title="Yours has a figure to fill in or to correct.">
          Keep yours and correct it, or take theirs.
        </Notice>
      ) : parts.length === 0 ? (
        <p>The two are the same; nothing has to be chosen.</p>
      ) : (
        <div className="table-scroll" role="region" aria-label="Differences" tabIndex={0}>
          <table className="ledger-table">
            <caption className="sr-only">Differences between the two versions</caption>
            <thead>
              <tr>
                <th scope="col">What differs</th>
                <th scope="col">Mine</th>
                <th scope="col">Theirs</th>
                <th scope="col">Take</th>
              </tr>
            </thead>
            <tbody>
              {parts.map((part) => (
                <tr key={part}>
                  <th scope="row">{nameOf(part)}</th>
                  <td className="wrap">{wordsOf(mine, part)}</td>
                  <td className="wrap">{wordsOf(theirs.inputs, part)}</td>
                  <td>
                    <Segmented
                      label={`${nameOf(part)}: whose`}
                      value={fromTheirs.includes(part) ? "theirs" : "mine"}
                      options={[
                        { value: "mine", label: "Mine" },
                        { value: "theirs", label: "Theirs" },
                      ]}
                      onChange={(side) => choose(part, side)}
                    />
                  </td>
                </tr>
              ))}
            </tbody>
          </table>
        </div>
      )}
    </Dialog>
  );
}
