"use client";

import { useId, useRef, useState, type DragEvent } from "react";
import type { LabSheetResponse } from "@/app/api/v1/calculations/fluid-schema";
import { Button } from "@/components/ui/button";
import { classNames } from "@/components/ui/class-names";
import { Dialog } from "@/components/ui/dialog";
import { Notice } from "@/components/ui/status";
import { rowFailures } from "./row-checks";

/** The server takes so many characters. */
const LARGEST_FILE = 200_000;

export interface LabFileProps {
  busy: boolean;
  onFile: (fileName: string, text: string) => void;
  /** what cannot be sent at all, in words */
  onRefuse: (words: string) => void;
}

/** Where a laboratory's file is dropped or chosen. */
export function LabFileDrop({ busy, onFile, onRefuse }: LabFileProps) {
  const [isOver, setOver] = useState(false);
  const input = useRef<HTMLInputElement>(null);
  const id = useId();

  async function take(file: File | undefined) {
    if (!file) return;
    if (/\.(xlsx?|xlsm|ods|pdf)$/i.test(file.name)) {
      onRefuse("This is a workbook or a document. Save the sheet as CSV, or paste its cells.");
    } else if (file.size > LARGEST_FILE) {
      onRefuse(
        `The file has more than ${LARGEST_FILE / 1000} thousand characters. Save only the sheet with the study.`,
      );
    } else onFile(file.name, await file.text());
  }

  function handleDrop(event: DragEvent) {
    event.preventDefault();
    setOver(false);
    void take(event.dataTransfer.files[0]);
  }

  return (
    <div
      className={classNames("lab-drop", isOver && "lab-drop-over")}
      onDragOver={(event) => {
        event.preventDefault();
        setOver(true);
      }}
      onDragLeave={() => setOver(false)}
      onDrop={handleDrop}
    >
      <label htmlFor={id}>Drop the laboratory’s CSV here, or</label>
      <Button
        size="small"
        icon="file"
        busy={busy}
        busyLabel="Reading…"
        onClick={() => input.current?.click()}
      >
        Choose a file
      </Button>
      <input
        ref={input}
        id={id}
        type="file"
        accept=".csv,.tsv,.txt,text/csv"
        className="sr-only"
        tabIndex={-1}
        onChange={(event) => {
          void take(event.target.files?.[0]);
          event.target.value = "";
        }}
      />
      <a href="/api/v1/calculations/lab-sheet-template.csv" download>
        Template
      </a>
    </div>
  );
}

/** Parts of a file that can be taken over. */
export const partsOf = (read: LabSheetResponse): string[] =>
  [
    read.composition && "composition",
    read.depletion && "depletion table",
    read.stages && "separators",
    read.separatorTest && "separator test",
  ].filter((part) => part !== null);

const listed = (parts: readonly string[]) =>
  parts.length < 2 ? parts.join("") : `${parts.slice(0, -1).join(", ")} and ${parts.at(-1)}`;

const example = `composition
component,mol %
N2,0.6
C1,77.2
C7+,6.4
molecular weight of the plus fraction,140
specific gravity of the plus fraction,0.774`;

/** What was read in a file and what was not, before anything of it goes into the sheets. */
export function LabFileDialog({
  fileName,
  read,
  onTake,
  onClose,
}: {
  fileName: string;
  read: LabSheetResponse;
  onTake: () => void;
  onClose: () => void;
}) {
  const parts = partsOf(read);
  const { problems } = read;
  const failed = read.depletion ? rowFailures(read.depletion) : [];
  return (
    <Dialog
      open
      onClose={onClose}
      width={720}
      title={parts.length > 0 ? `Found: ${listed(parts)}` : "Nothing was found in this file"}
      description={
        parts.length > 0
          ? `${fileName}. What is taken over replaces what stands in those sheets; the others stay.`
          : `${fileName} holds no composition, depletion table or separators in a form that is read here. Compare it with the template.`
      }
      actions={
        <>
          <Button onClick={onClose}>{parts.length > 0 ? "Discard" : "Close"}</Button>
          {parts.length > 0 && (
            <Button kind="primary" onClick={onTake}>
              Take it over
            </Button>
          )}
        </>
      }
    >
      <div className="grid grid-cols-1 gap-4">
        {parts.length === 0 && (
          <div>
            <h3>What the template looks like</h3>
            <pre className="table-scroll text-12">{example}</pre>
          </div>
        )}
        {failed.length > 0 && (
          <Notice tone="error" title="The depletion table contradicts itself.">
            {failed.map(({ message }) => message).join(" ")} Put this right in the file, or in the
            sheet after taking it over.
          </Notice>
        )}
        {read.read.length > 0 && (
          <div>
            <h3>How it was read</h3>
            <ul className="lab-read">
              {read.read.map((words) => (
                <li key={words}>{words}</li>
              ))}
            </ul>
          </div>
        )}
        {problems.length > 0 && (
          <div className="grid grid-cols-1 gap-2">
            <Notice
              title={
                problems.length === 1
                  ? "One place was not read as it stands."
                  : `${problems.length} places were not read as they stand.`
              }
            >
              They are marked in the sheets where they have a cell.
            </Notice>
            <LabProblems problems={problems} />
          </div>
        )}
      </div>
    </Dialog>
  );
}

/** Places of the file that were not read, with their reasons. */
export function LabProblems({ problems }: { problems: LabSheetResponse["problems"] }) {
  return (
    <div className="table-scroll" role="region" aria-label="Places not read" tabIndex={0}>
      <table className="ledger-table">
        <caption className="sr-only">Places of the file that were not read</caption>
        <thead>
          <tr>
            <th scope="col" className="right">
              Line
            </th>
            <th scope="col" className="right">
              Column
            </th>
            <th scope="col">Value</th>
            <th scope="col">What about it</th>
          </tr>
        </thead>
        <tbody>
          {problems.map(({ line, column, value, message }, index) => (
            <tr key={index}>
              <td className="right">{line}</td>
              <td className="right">{column ?? "–"}</td>
              <td>{value || "–"}</td>
              <td className="wrap">{message}</td>
            </tr>
          ))}
        </tbody>
      </table>
    </div>
  );
}
