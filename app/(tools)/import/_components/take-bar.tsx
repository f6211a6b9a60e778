"use client";

import type { ImportDetail } from "@/app/api/v1/imports/schema";
import { Button } from "@/components/ui/button";
import { rowsWords } from "./import-words";

export interface TakeBarProps {
  file: ImportDetail;
  taking: boolean;
  onTake: (rows: "all" | "good") => void;
}

/** The decision: every row, the good ones alone, or none. */
export function TakeBar({ file, taking, onTake }: TakeBarProps) {
  const { create, revise, unchanged, refused } = file.counts;
  const changing = create + revise;
  const parts = [
    create > 0 && `${create} new`,
    revise > 0 && `${revise} revised`,
    unchanged > 0 && `${unchanged} unchanged`,
    refused > 0 && `${refused} refused`,
  ].filter(Boolean);

  if (changing === 0) return null;
  return (
    <div className="selection-bar" role="region" aria-label="Take the rows">
      <b>{parts.join(", ")}</b>
      <span>
        {refused > 0
          ? "Take the good rows and leave the refused ones out, or repair the sheet first and choose it again."
          : "Each becomes a draft of yours, to be submitted to a reviewer."}
      </span>
      <div className="selection-actions">
        <Button
          kind="primary"
          busy={taking}
          busyLabel="Taking the rows…"
          onClick={() => onTake(refused > 0 ? "good" : "all")}
        >
          {refused > 0
            ? `Take ${rowsWords(changing)} without the refused`
            : `Take ${rowsWords(changing)}`}
        </Button>
      </div>
    </div>
  );
}
