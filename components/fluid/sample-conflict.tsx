"use client";

import { useState } from "react";
import { Button } from "@/components/ui/button";
import { Segmented } from "@/components/ui/choice";
import { Dialog } from "@/components/ui/dialog";
import {
  differingParts,
  mergeSamples,
  samplePartWords,
  type SamplePart,
} from "./sample-differences";
import type { StoredSample } from "./sample-text";

/** Somebody else saved the same sample first: for each part that differs, whose is kept. */
export function SampleConflict({
  mine,
  theirs,
  opened,
  onResolve,
  onClose,
}: {
  mine: StoredSample;
  theirs: StoredSample;
  /** as it stood before either of us began: what I left alone is theirs unless I say otherwise */
  opened: StoredSample;
  onResolve: (merged: StoredSample) => void;
  onClose: () => void;
}) {
  const parts = differingParts(mine, theirs);
  const [fromTheirs, setFromTheirs] = useState<readonly SamplePart[]>(() => {
    const touched = differingParts(mine, opened);
    return parts.filter((part) => !touched.includes(part));
  });
  return (
    <Dialog
      open
      onClose={onClose}
      width={620}
      title="Somebody else saved this sample first"
      description="Nothing of yours is lost. Choose for each part that differs, then save again."
      actions={
        <>
          <Button onClick={() => onResolve(theirs)}>Take all of theirs</Button>
          <Button kind="primary" onClick={() => onResolve(mergeSamples(mine, theirs, fromTheirs))}>
            Go on as chosen
          </Button>
        </>
      }
    >
      {parts.length === 0 ? (
        <p>The two are the same; nothing has to be chosen.</p>
      ) : (
        <table className="ledger-table">
          <caption className="sr-only">Parts that differ</caption>
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
                <th scope="row">{samplePartWords[part]}</th>
                <td className="wrap">{wordsOf(mine, part)}</td>
                <td className="wrap">{wordsOf(theirs, part)}</td>
                <td>
                  <Segmented
                    label={`${samplePartWords[part]}: whose`}
                    value={fromTheirs.includes(part) ? "theirs" : "mine"}
                    options={[
                      { value: "mine", label: "Mine" },
                      { value: "theirs", label: "Theirs" },
                    ]}
                    onChange={(side) =>
                      setFromTheirs((chosen) =>
                        side === "theirs"
                          ? [...chosen.filter((other) => other !== part), part]
                          : chosen.filter((other) => other !== part),
                      )
                    }
                  />
                </td>
              </tr>
            ))}
          </tbody>
        </table>
      )}
    </Dialog>
  );
}

function wordsOf({ separatorTest, study, ...rest }: StoredSample, part: SamplePart): string {
  switch (part) {
    case "separatorTest":
      return `${study.separatorTestOrigin === "computed" ? "computed, " : ""}${separatorTest.condensateApi} °API`;
    case "composition":
      if (study.composition === null) return "none";
      return study.composition.kind === "wellstream" ? "wellstream" : "gas and liquid";
    case "stages":
      return study.stages === null ? "those of the test" : `${study.stages.length} stages`;
    case "depletion":
      return study.depletion === null ? "none" : `${study.depletion.rows.length} pressures`;
    case "equationOfState":
      return study.tuning ? "tuned" : study.characterisation ? "untuned" : "as it comes";
    default:
      return rest[part] || "–";
  }
}
