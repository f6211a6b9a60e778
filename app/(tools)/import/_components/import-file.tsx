"use client";

import { useState } from "react";

import { ReadError } from "@/app/_client/read-error";
import type { ImportDetail, RowKind } from "@/app/api/v1/imports/schema";
import { LinkButton } from "@/components/ui/button";
import { formatDate } from "@/components/ui/format";
import { Page, PageHead, Section, Stack } from "@/components/ui/section";
import { Skeleton } from "@/components/ui/status";
import { useImport, useTake } from "../_queries/imports";
import { ImportNotices } from "./import-notices";
import { ImportProgress } from "./import-progress";
import { importTitle, rowsWords } from "./import-words";
import { ProblemTable } from "./problem-table";
import { RowTable } from "./row-table";
import { TakeBar } from "./take-bar";

const crumbs = [{ label: "Import", href: "/import" }, { label: "Sheet" }];

/** One sheet: what its rows would do, then how far their runs are, then what was done. */
export function ImportFile({ id }: { id: string }) {
  const [show, setShow] = useState<RowKind>("all");
  const [offset, setOffset] = useState(0);
  const { data: file, error, isPending, refetch } = useImport(id, show, offset);
  const take = useTake(id);

  if (isPending) {
    return (
      <Page>
        <PageHead title="Import" crumbs={crumbs} />
        <Skeleton lines={8} label="Loading the sheet" />
      </Page>
    );
  }
  if (!file) {
    return (
      <Page>
        <PageHead title="Import" crumbs={crumbs} />
        <ReadError error={error} onRetry={refetch}>
          The sheet is kept; only this page could not be read.
        </ReadError>
      </Page>
    );
  }

  return (
    <Page>
      <PageHead
        title={importTitle(file)}
        crumbs={crumbs}
        meta={<FileMeta file={file} />}
        actions={<LinkButton href="/import">Choose another sheet</LinkButton>}
      />
      <Stack>
        <ImportNotices file={file} takeError={take.error} />
        {(file.state === "applying" || file.state === "applied") && <ImportProgress file={file} />}
        {file.state === "failed" && (
          <Section
            title="What stands in the way"
            note="No row was read. Repair the sheet, save it as CSV and choose it again."
          >
            <ProblemTable problems={file.problems} />
          </Section>
        )}
        {file.rowsTotal > 0 && (
          <RowTable
            file={file}
            show={show}
            onShow={(kind) => {
              setShow(kind);
              setOffset(0);
            }}
            onPage={setOffset}
          />
        )}
        {file.mayCommit && (
          <TakeBar file={file} taking={take.isPending} onTake={(rows) => take.mutate(rows)} />
        )}
      </Stack>
    </Page>
  );
}

function FileMeta({ file }: { file: ImportDetail }) {
  return (
    <>
      <span>{file.fileName}</span>
      {file.rowsTotal > 0 && <span>{rowsWords(file.rowsTotal)}</span>}
      <span>
        {file.createdBy?.name ?? "Somebody"}, {formatDate(file.createdAt, "time")} UTC
      </span>
      {file.remarks > 0 && <span>{rowsWords(file.remarks)} with # left alone</span>}
    </>
  );
}
