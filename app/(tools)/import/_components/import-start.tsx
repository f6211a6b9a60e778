"use client";

import { useRouter } from "next/navigation";
import type { ReactNode } from "react";
import { errorWords } from "@/app/_client/request";
import { useCan } from "@/app/_client/use-session";
import { Icon } from "@/components/ui/icon";
import { Page, PageHead, Section, Stack } from "@/components/ui/section";
import { Notice } from "@/components/ui/status";
import { useUpload } from "../_queries/imports";
import { FileChoice } from "./file-choice";
import { ImportList } from "./import-list";

/** Where an import begins: the template, the file, and what was brought in before. */
export function ImportStart({ guide }: { guide: ReactNode }) {
  const router = useRouter();
  const can = useCan();
  const upload = useUpload(({ id }) => router.push(`/import/${id}`));
  const mayImport = can("import.create");

  return (
    <Page>
      <PageHead
        title="Bring reservoirs in from a spreadsheet"
        lead="One row a reservoir: its field, ten ranges and a separator test. Every row is checked before anything changes, and importing a sheet again changes only what differs."
      />
      <Stack>
        {mayImport && (
          <div className="columns columns-equal">
            <Section
              title="1. Fill in the template"
              note="Names of columns in row 1, units in row 2. Change a unit in row 2 and the whole column follows it."
            >
              <div className="grid grid-cols-1 gap-3">
                <a
                  className="button justify-self-start"
                  href="/api/v1/imports/template.csv"
                  download
                >
                  <Icon name="down" size={13} />
                  Download the template
                </a>
                <p className="text-13 text-ink-soft">
                  The two example rows begin with # and are left alone. Save the sheet as CSV;
                  commas, semicolons and tabs are all read. Write decimals with a point.
                </p>
                {guide}
              </div>
            </Section>
            <Section
              title="2. Choose the sheet"
              note="Up to 5 MB and 2,000 rows. You see what each row would do before you take it."
            >
              {upload.error && (
                <div className="mb-3">
                  <Notice tone="error" title={errorWords(upload.error)}>
                    Nothing was changed.
                  </Notice>
                </div>
              )}
              <FileChoice busy={upload.isPending} onFile={(file) => upload.mutate(file)} />
            </Section>
          </div>
        )}
        <ImportList />
      </Stack>
    </Page>
  );
}
