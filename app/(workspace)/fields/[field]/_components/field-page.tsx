"use client";

import { useState } from "react";
import { errorWords, ProblemError } from "@/app/_client/request";
import { useCan } from "@/app/_client/use-session";
import type { FieldFileView } from "@/app/api/v1/fields/file-schema";
import { useBasis } from "@/components/basis/use-basis";
import { comparisonHref } from "@/components/compare/sides";
import { prmsClassNames, prmsFill, prmsSubClassNames } from "@/components/fields/prms";
import { reportingOf, shownRange } from "@/components/portfolio/reporting";
import { Button, LinkButton } from "@/components/ui/button";
import { formatFigure, formatPercent } from "@/components/ui/format";
import { Columns, Page, PageHead, Stack } from "@/components/ui/section";
import { Notice, Skeleton } from "@/components/ui/status";
import { ClassMark } from "@/components/ui/text";
import { useFieldFile } from "../_queries/field";
import { AddReservoirDialog } from "./add-reservoir-dialog";
import { EditFieldDialog } from "./edit-field-dialog";
import { FieldFacts } from "./field-facts";
import { FieldFigures } from "./field-figures";
import { FieldReservoirs } from "./field-reservoirs";
import { FieldTimeline } from "./field-timeline";

/** One field: who holds it, its reservoirs, what they come to together on the basis, and how that came about. */
export function FieldPage({ slug }: { slug: string }) {
  const { basis, withBasis } = useBasis();
  const can = useCan();
  const query = useFieldFile(slug, basis);
  const [dialog, setDialog] = useState<"edit" | "reservoir" | null>(null);

  if (query.isPending) {
    return (
      <Page wide>
        <Skeleton lines={12} label="Loading the field" />
      </Page>
    );
  }
  if (query.isError) return <Failure error={query.error} onRetry={() => void query.refetch()} />;

  const file = query.data;
  const { field } = file;
  return (
    <Page wide>
      <PageHead
        crumbs={[
          { label: "Fields", href: withBasis("/fields") },
          { label: field.basin.name },
          { label: field.name },
        ]}
        title={field.name}
        lead={<Lead file={file} />}
        meta={
          <>
            <ClassMark fill={prmsFill[field.prmsClass]}>
              {prmsClassNames[field.prmsClass]},{" "}
              {prmsSubClassNames[field.prmsSubClass].toLowerCase()}
            </ClassMark>
            <span>{formatPercent(field.chanceOfCommerciality)} chance of commerciality</span>
            <span>Operator {field.operator}</span>
            <span>
              Working interest {formatPercent(field.workingInterest)}, net revenue{" "}
              {formatPercent(field.netRevenueInterest, { decimals: 1 })}
            </span>
            <span>
              {field.responsibleEngineer
                ? `Engineer ${field.responsibleEngineer.name}`
                : "No responsible engineer"}
            </span>
          </>
        }
        actions={
          <>
            <LinkButton
              href={withBasis(
                comparisonHref({ left: { kind: "field", fieldId: field.id }, right: null }),
              )}
            >
              Compare
            </LinkButton>
            {can("field.update") && (
              <Button onClick={() => setDialog("edit")}>Edit the field</Button>
            )}
            {can("reservoir.create") && (
              <Button kind="primary" icon="plus" onClick={() => setDialog("reservoir")}>
                Add a reservoir
              </Button>
            )}
          </>
        }
      />
      <Stack>
        <FieldReservoirs file={file} onAdd={() => setDialog("reservoir")} />
        <Columns>
          <FieldFigures file={file} />
          <FieldFacts field={field} />
        </Columns>
        <FieldTimeline file={file} />
      </Stack>
      {dialog === "edit" && <EditFieldDialog field={field} onClose={() => setDialog(null)} />}
      {dialog === "reservoir" && (
        <AddReservoirDialog field={field} onClose={() => setDialog(null)} />
      )}
    </Page>
  );
}

/** The answer first: what reaches the tank, and where the field stands among the others. */
function Lead({ file }: { file: FieldFileView }) {
  const { basis } = useBasis();
  const { ranked, fieldsInAll, prices } = file;
  if (!ranked.ranges) {
    return <>No estimate on this basis yet, so the field is in no total.</>;
  }
  const reporting = reportingOf(basis, prices);
  const { p90, p50, p10 } = shownRange(
    ranked.ranges.condensateRecoverableStb,
    reporting.condensate,
  );
  const liquid =
    ranked.ranges.liquidValue && shownRange(ranked.ranges.liquidValue, reporting.money);
  return (
    <>
      {formatFigure(p50)} {reporting.condensate.unit} of condensate to the tank at P50 (P90{" "}
      {formatFigure(p90)}, P10 {formatFigure(p10)}), {reporting.words}.
      {liquid &&
        ` Worth ${formatFigure(liquid.mean)} ${reporting.money.unit} on average, undiscounted at the deck’s flat price: number ${ranked.rank} of ${fieldsInAll}.`}
    </>
  );
}

function Failure({ error, onRetry }: { error: Error; onRetry: () => void }) {
  const isMissing = error instanceof ProblemError && error.status === 404;
  return (
    <Page>
      <PageHead title={isMissing ? "No such field" : "The field could not be loaded"} />
      <Notice
        tone="error"
        title={isMissing ? "Nothing is at this address." : errorWords(error)}
        actions={
          isMissing ? (
            <LinkButton href="/fields" size="small">
              All fields
            </LinkButton>
          ) : (
            <Button size="small" onClick={onRetry}>
              Try again
            </Button>
          )
        }
      >
        {isMissing ? "It may have been renamed." : "Nothing was changed."}
      </Notice>
    </Page>
  );
}
