"use client";

import Link from "next/link";

import { ReadError } from "@/app/_client/read-error";
import { formatDate } from "@/components/ui/format";
import { Section } from "@/components/ui/section";
import { EmptyState, Skeleton } from "@/components/ui/status";
import { LedgerTable } from "@/components/ui/table";
import { useImports } from "../_queries/imports";
import { outcomeWords } from "./import-words";

/** What was brought in before, by everybody. */
export function ImportList() {
  const { data, error, isPending, refetch } = useImports();
  if (isPending) return <Skeleton lines={4} label="Loading earlier imports" />;
  if (!data) {
    return (
      <ReadError error={error} onRetry={refetch}>
        Earlier imports are kept; only this list could not be read.
      </ReadError>
    );
  }
  if (data.items.length === 0) {
    return (
      <EmptyState title="No sheet has been brought in yet">
        Each one is listed here with what became of its rows, and can be opened again.
      </EmptyState>
    );
  }
  return (
    <Section
      title="Earlier imports"
      note={
        data.total > data.items.length
          ? `The last ${data.items.length} of ${data.total.toLocaleString("en-GB")}.`
          : undefined
      }
    >
      <LedgerTable caption="Earlier imports, newest first">
        <thead>
          <tr>
            <th scope="col">File</th>
            <th scope="col">Outcome</th>
            <th scope="col" className="right">
              Rows
            </th>
            <th scope="col" className="hide-phone">
              By
            </th>
            <th scope="col">On</th>
          </tr>
        </thead>
        <tbody>
          {data.items.map((item) => (
            <tr key={item.id}>
              <th scope="row" className="wrap">
                <Link href={`/import/${item.id}`}>{item.fileName}</Link>
              </th>
              <td className="wrap">{outcomeWords(item)}</td>
              <td className="right">{item.rowsTotal.toLocaleString("en-GB")}</td>
              <td className="hide-phone">{item.createdBy?.name ?? "–"}</td>
              <td>{formatDate(item.createdAt)}</td>
            </tr>
          ))}
        </tbody>
      </LedgerTable>
    </Section>
  );
}
