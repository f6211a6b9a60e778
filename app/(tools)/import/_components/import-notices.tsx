import Link from "next/link";
import { errorWords } from "@/app/_client/request";
import type { ImportDetail } from "@/app/api/v1/imports/schema";
import { formatDate } from "@/components/ui/format";
import { Notice } from "@/components/ui/status";

/** What a person should know about the sheet as a whole. */
export function ImportNotices({
  file,
  takeError,
}: {
  file: ImportDetail;
  takeError: Error | null;
}) {
  const { sameFileAs, warnings, state } = file;
  const isOpen = state === "checked";
  if (!takeError && warnings.length === 0 && !(sameFileAs && isOpen)) return null;
  return (
    <div className="grid gap-2">
      {takeError && (
        <Notice tone="error" title={errorWords(takeError)}>
          The book is as it was.
        </Notice>
      )}
      {warnings.map(({ reason }) => (
        <Notice key={reason} title={reason} />
      ))}
      {sameFileAs && isOpen && (
        <Notice tone="info" title="This very file was taken into the book before">
          on {formatDate(sameFileAs.createdAt)} by {sameFileAs.createdBy?.name ?? "somebody"} (
          <Link href={`/import/${sameFileAs.id}`}>that import</Link>). Only what changed since is
          done again.
        </Notice>
      )}
    </div>
  );
}
