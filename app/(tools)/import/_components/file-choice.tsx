"use client";

import { useId, useRef, useState, type DragEvent } from "react";
import { Button } from "@/components/ui/button";
import { classNames } from "@/components/ui/class-names";
import { TextArea } from "@/components/ui/field";

export interface FileChoiceProps {
  busy: boolean;
  onFile: (file: File) => void;
}

/** A file from the disk, dropped on the page, or cells pasted from an open spreadsheet. */
export function FileChoice({ busy, onFile }: FileChoiceProps) {
  const input = useRef<HTMLInputElement>(null);
  const hintId = useId();
  const [over, setOver] = useState(false);
  const [pasting, setPasting] = useState(false);
  const [text, setText] = useState("");

  function handleDrop(event: DragEvent) {
    event.preventDefault();
    setOver(false);
    const [file] = event.dataTransfer.files;
    if (file && !busy) onFile(file);
  }

  function handleChosen(files: FileList | null) {
    const file = files?.[0];
    if (file) onFile(file);
    // The same file can then be chosen again after it was repaired.
    if (input.current) input.current.value = "";
  }

  return (
    <div className="grid grid-cols-1 gap-3">
      <div
        className={classNames(
          "grid justify-items-start gap-2 border border-dashed p-4",
          over ? "border-petrol bg-petrol-wash" : "border-field bg-sheet",
        )}
        onDragOver={(event) => {
          event.preventDefault();
          setOver(true);
        }}
        onDragLeave={() => setOver(false)}
        onDrop={handleDrop}
      >
        <input
          ref={input}
          type="file"
          accept=".csv,.tsv,.txt,text/csv"
          className="sr-only"
          tabIndex={-1}
          aria-label="CSV file of reservoirs"
          onChange={(event) => handleChosen(event.target.files)}
        />
        <Button
          kind="primary"
          icon="file"
          busy={busy}
          busyLabel="Checking the rows…"
          aria-describedby={hintId}
          onClick={() => input.current?.click()}
        >
          Choose a file
        </Button>
        <p id={hintId} className="text-13 text-ink-soft">
          or drop it here
        </p>
      </div>
      {pasting ? (
        <form
          className="grid gap-2"
          onSubmit={(event) => {
            event.preventDefault();
            onFile(new File([text], "pasted-cells.csv", { type: "text/csv" }));
          }}
        >
          <TextArea
            label="Cells, with the header and the units row"
            hint="Copy the whole sheet in the spreadsheet and paste it here."
            rows={6}
            value={text}
            spellCheck={false}
            wrap="off"
            onChange={(event) => setText(event.target.value)}
          />
          <div className="flex gap-2">
            <Button type="submit" busy={busy} disabled={text.trim() === ""}>
              Check these cells
            </Button>
            <Button kind="quiet" onClick={() => setPasting(false)}>
              Close
            </Button>
          </div>
        </form>
      ) : (
        <Button kind="quiet" className="justify-self-start" onClick={() => setPasting(true)}>
          Paste cells instead
        </Button>
      )}
    </div>
  );
}
