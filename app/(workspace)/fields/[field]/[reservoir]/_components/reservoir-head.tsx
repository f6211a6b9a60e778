"use client";

import { useRouter } from "next/navigation";
import { useState } from "react";
import { errorWords } from "@/app/_client/request";
import { useCan } from "@/app/_client/use-session";
import { isSameFluid } from "@/components/estimate/differences";
import { RouteFlag } from "@/components/estimate/route-flag";
import { Button, LinkButton } from "@/components/ui/button";
import { formatFigure } from "@/components/ui/format";
import { PageHead } from "@/components/ui/section";
import { Flag, StateMark } from "@/components/ui/text";
import { useToast } from "@/components/ui/toast";
import { useReservoir } from "../_editor/reservoir-context";
import { createDraft, runDraft, useEstimateStep } from "../_queries/reservoir-page";
import { SaveWords } from "./save-words";
import { SubmitDialog } from "./submit-dialog";

/** Where we are, how the revision stands, and what can be done with it. */
export function ReservoirHead() {
  const { page, shown, draft, text, results, withBasis } = useReservoir();
  const { field } = page;
  const hydrogenSulphide = (text?.fluid ?? shown?.inputs.fluid)?.hydrogenSulphide ?? 0;
  const depthFt = text?.depthFt ?? page.depthFt;
  return (
    <PageHead
      crumbs={[
        { label: "Fields", href: withBasis("/fields") },
        { label: field.basin.name },
        { label: field.name, href: withBasis(`/fields/${field.slug}`) },
        { label: page.name },
      ]}
      title={`${field.name}, ${page.name}`}
      meta={
        <>
          {shown ? (
            <StateMark state={shown.state} revision={shown.revision} worded />
          ) : (
            <span>{draft ? "First estimate" : "No estimate"}</span>
          )}
          {depthFt !== null && <span>{depthFt.toLocaleString("en-US")} ft</span>}
          {hydrogenSulphide > 0 && (
            <Flag icon="warning">
              Sour, {formatFigure(hydrogenSulphide * 100, { digits: 2 })} % H<sub>2</sub>S
            </Flag>
          )}
          <RouteFlag route={results.summary?.recovery?.route} />
          {draft && <SaveWords state={draft.saveState} />}
        </>
      }
      actions={draft ? <DraftActions /> : <ReaderActions />}
    />
  );
}

function DraftActions() {
  const { place, page, draft, shown, before, results, withBasis } = useReservoir();
  const [isSubmitting, setSubmitting] = useState(false);
  const toast = useToast();
  const run = useEstimateStep(place, async () => {
    const saved = draft?.isSaved ? null : await draft?.save();
    const target = saved ?? shown;
    if (!target || draft?.theirs) throw new Error("Save the draft first.");
    return runDraft(target.id, saved?.version ?? draft?.base.version ?? target.version);
  });
  const create = useEstimateStep(place, () => {
    const inputs = draft?.reading.estimate;
    if (!inputs) throw new Error("Complete the inputs first.");
    const sample = page.fluidSamples.find(({ separatorTest }) =>
      isSameFluid(separatorTest, inputs.fluid),
    );
    return createDraft(page.id, { inputs, fluidSampleId: sample?.id ?? null });
  });
  const fail = (title: string) => ({
    onError: (error: Error) => toast({ tone: "error", title, detail: errorWords(error) }),
  });

  if (!shown) {
    return (
      <>
        <Button onClick={() => draft?.revert()}>Clear</Button>
        <Button
          kind="primary"
          disabled={draft?.reading.estimate === null}
          busy={create.isPending}
          busyLabel="Saving…"
          onClick={() => create.mutate(undefined, fail("The first estimate was not saved"))}
        >
          Save as r1
        </Button>
      </>
    );
  }
  return (
    <>
      {before && (
        <LinkButton href={withBasis(`/fields/${place.field}/${place.reservoir}/compare`)}>
          Compare with r{before.revision}
        </LinkButton>
      )}
      {!results.isFull && (
        <Button
          busy={run.isPending}
          busyLabel={`Running ${shown.trials.toLocaleString("en-US")} trials…`}
          disabled={draft?.reading.estimate === null}
          onClick={() => run.mutate(undefined, fail("The run did not finish"))}
        >
          Run {shown.trials.toLocaleString("en-US")} trials
        </Button>
      )}
      <Button kind="primary" onClick={() => setSubmitting(true)}>
        Submit for review
      </Button>
      <SubmitDialog open={isSubmitting} onClose={() => setSubmitting(false)} />
    </>
  );
}

function ReaderActions() {
  const { place, page, withBasis, shown, before, startFirst } = useReservoir();
  const can = useCan();
  const toast = useToast();
  const router = useRouter();
  const begin = useEstimateStep(place, () => createDraft(page.id));
  const here = `/fields/${place.field}/${place.reservoir}`;
  return (
    <>
      {before && shown && (
        <LinkButton href={withBasis(`${here}/compare`)}>Compare with r{before.revision}</LinkButton>
      )}
      {startFirst && (
        <Button kind="primary" onClick={startFirst}>
          Begin the first estimate
        </Button>
      )}
      {page.open === null && page.approved && can("estimate.create") && (
        <Button
          kind="primary"
          busy={begin.isPending}
          busyLabel="Copying…"
          onClick={() =>
            begin.mutate(undefined, {
              onSuccess: () => router.push(withBasis(here)),
              onError: (error) =>
                toast({ tone: "error", title: "No draft was begun", detail: errorWords(error) }),
            })
          }
        >
          Begin a draft from r{page.approved.revision}
        </Button>
      )}
    </>
  );
}
