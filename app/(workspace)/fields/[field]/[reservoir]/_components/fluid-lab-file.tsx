"use client";

import { useState } from "react";
import { errorWords } from "@/app/_client/request";
import { LabFileDialog, LabFileDrop } from "@/components/fluid/lab-file";
import { takeLabSheet, type SheetRemarks } from "@/components/fluid/take-lab-sheet";
import { Notice } from "@/components/ui/status";
import { useToast } from "@/components/ui/toast";
import type { SampleDraft } from "../_editor/use-sample";
import { useLabSheet } from "../_queries/fluid-calculations";

/** Reads a laboratory's file into the sheets, after a look at what was found in it. */
export function FluidLabFile({
  draft,
  onTaken,
}: {
  draft: SampleDraft;
  onTaken: (remarks: SheetRemarks) => void;
}) {
  const reading = useLabSheet();
  const toast = useToast();
  const [file, setFile] = useState("");
  const [refusal, setRefusal] = useState<string | null>(null);

  function handleTake() {
    if (!reading.data) return;
    const { change, remarks } = takeLabSheet(reading.data, draft.text);
    draft.change(change);
    onTaken(remarks);
    reading.reset();
    toast({ title: `${file} is in the sheets`, detail: "Look it over, then save the sample." });
  }

  return (
    <div className="grid grid-cols-1 gap-2">
      <LabFileDrop
        busy={reading.isPending}
        onFile={(fileName, text) => {
          setRefusal(null);
          setFile(fileName);
          reading.mutate({ text });
        }}
        onRefuse={(words) => {
          reading.reset();
          setRefusal(words);
        }}
      />
      {(refusal !== null || reading.error) && (
        <Notice tone="error" title="The file was not read.">
          {refusal ?? errorWords(reading.error)} The sheets are as they were.
        </Notice>
      )}
      {reading.data && (
        <LabFileDialog
          fileName={file}
          read={reading.data}
          onTake={handleTake}
          onClose={() => reading.reset()}
        />
      )}
    </div>
  );
}
