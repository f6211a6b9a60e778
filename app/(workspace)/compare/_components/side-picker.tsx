"use client";

import { useState } from "react";
import { producingConcepts } from "@/analytics/recovery/recovery-plan-schema";
import type { ComparisonSide } from "@/app/api/v1/comparisons/schema";
import type { RevisionRangeView } from "@/app/api/v1/fields/file-schema";
import { useBasis } from "@/components/basis/use-basis";
import { conceptLabels } from "@/components/estimate/plan-words";
import { Segmented, Select } from "@/components/ui/choice";
import { useFieldFile } from "../../fields/[field]/_queries/field";
import { useRanking } from "../../fields/_queries/ranking";
import { usePlaceOfSide } from "../_queries/comparison";

type Kind = ComparisonSide["kind"];

const kinds: { value: Kind; label: string }[] = [
  { value: "estimate", label: "Revision" },
  { value: "concept", label: "Concept" },
  { value: "field", label: "Whole field" },
];

/** The revision that a reservoir is compared by unless another is chosen: the approved one, else the newest run. */
export function defaultRevision(revisions: readonly RevisionRangeView[]): RevisionRangeView | null {
  const run = revisions.filter(({ condensateRecoverableStb }) => condensateRecoverableStb !== null);
  return run.find(({ state }) => state === "approved") ?? run[0] ?? null;
}

/** Revisions that a side of a kind can be: another concept is worked out on the curve of a recovery plan. */
export function possibleRevisions(
  revisions: readonly RevisionRangeView[],
  kind: "estimate" | "concept",
): RevisionRangeView[] {
  return revisions.filter(
    ({ condensateRecoverableStb, recoveryRoute }) =>
      condensateRecoverableStb !== null && (kind === "estimate" || recoveryRoute !== null),
  );
}

const NO_PLAN = "recoveries typed, no plan";

/** Why a reservoir cannot be a side of a kind; nothing when it can. */
function whyNot(revisions: readonly RevisionRangeView[], kind: "estimate" | "concept") {
  if (possibleRevisions(revisions, kind).length > 0) return undefined;
  return defaultRevision(revisions) === null ? "nothing was run yet" : NO_PLAN;
}

/** Chooses one side: a field, then one of its reservoirs and revisions, or a way of producing it. */
export function SidePicker({
  title,
  side,
  onChange,
}: {
  /** "Left", "Right": what is before, and what is now */
  title: string;
  side: ComparisonSide | null;
  onChange: (side: ComparisonSide) => void;
}) {
  const { basis } = useBasis();
  const fields = useRanking("sort=name&direction=ascending&limit=1000").data?.items ?? [];
  const place = usePlaceOfSide(side).data;
  const [kind, setKind] = useState<Kind | null>(null);
  const [picked, setPicked] = useState<string | null>(null);
  const shownKind = kind ?? side?.kind ?? "estimate";
  const slug =
    picked ??
    place?.place.field.slug ??
    (side?.kind === "field" ? (fields.find(({ id }) => id === side.fieldId)?.slug ?? null) : null);

  function chooseKind(next: Kind) {
    setKind(next);
    const field = fields.find((known) => known.slug === slug);
    if (next === "field" && field) take({ kind: "field", fieldId: field.id });
    if (side === null || side.kind === "field") return;
    const { estimateId } = side;
    if (next === "estimate") take({ kind: "estimate", estimateId });
    // Without a plan there is nothing to take yet: the fields below say so, and where there is one.
    if (next === "concept" && place?.inputs?.recoveryPlan) {
      take({ kind: "concept", estimateId, concept: "depletion" });
    }
  }

  function chooseField(next: string) {
    setPicked(next);
    const field = fields.find((known) => known.slug === next);
    if (shownKind === "field" && field) take({ kind: "field", fieldId: field.id });
  }

  function take(next: ComparisonSide) {
    setKind(null);
    setPicked(null);
    onChange(next);
  }

  return (
    <fieldset className="grid content-start gap-3">
      <legend className="mb-2 text-14 font-semibold">{title}</legend>
      <Segmented label={`${title} is`} value={shownKind} options={kinds} onChange={chooseKind} />
      <div className="grid grid-cols-2 gap-3 phone:grid-cols-1">
        <Select
          label="Field"
          value={slug}
          options={fields.map((field) => ({
            value: field.slug,
            label: field.name,
            note: field.basin.name,
          }))}
          onChange={chooseField}
        />
        {shownKind !== "field" && slug && (
          <RevisionFields
            key={slug}
            slug={slug}
            basis={basis}
            kind={shownKind}
            side={picked === null && side?.kind !== "field" ? side : null}
            onTake={take}
          />
        )}
      </div>
    </fieldset>
  );
}

function RevisionFields({
  slug,
  basis,
  kind,
  side,
  onTake,
}: {
  slug: string;
  basis: ReturnType<typeof useBasis>["basis"];
  kind: "estimate" | "concept";
  side: Exclude<ComparisonSide, { kind: "field" }> | null;
  onTake: (side: ComparisonSide) => void;
}) {
  const reservoirs = useFieldFile(slug, basis).data?.reservoirs ?? [];
  const reservoir = reservoirs.find(({ revisions }) =>
    revisions.some(({ estimateId }) => estimateId === side?.estimateId),
  );
  const concept = side?.kind === "concept" ? side.concept : "depletion";
  const shown = reservoir?.revisions.find(({ estimateId }) => estimateId === side?.estimateId);
  const lacksPlan = kind === "concept" && shown !== undefined && shown.recoveryRoute === null;
  const take = (estimateId: string, next = concept) =>
    onTake(
      kind === "estimate" ? { kind, estimateId } : { kind: "concept", estimateId, concept: next },
    );
  return (
    <>
      <Select
        label="Reservoir"
        value={reservoir?.id ?? null}
        placeholder={reservoirs.length === 0 ? "No reservoir yet" : "Choose"}
        disabled={reservoirs.length === 0}
        options={reservoirs.map(({ id, name, revisions }) => ({
          value: id,
          label: name,
          note: whyNot(revisions, kind),
          disabled: whyNot(revisions, kind) !== undefined,
        }))}
        onChange={(id) => {
          const chosen = reservoirs.find((known) => known.id === id);
          const revision = chosen && defaultRevision(possibleRevisions(chosen.revisions, kind));
          if (revision) take(revision.estimateId);
        }}
      />
      {reservoir && side && (
        <Select
          label="Revision"
          value={side.estimateId}
          options={reservoir.revisions.map((known) => ({
            value: known.estimateId,
            label: `r${known.revision}, ${known.state}`,
            note:
              known.condensateRecoverableStb === null
                ? "not run yet"
                : kind === "concept" && known.recoveryRoute === null
                  ? NO_PLAN
                  : known.note || undefined,
            disabled: possibleRevisions([known], kind).length === 0,
          }))}
          onChange={(estimateId) => take(estimateId)}
        />
      )}
      {kind === "concept" && side && (
        <Select
          label="Produced by"
          value={lacksPlan ? null : concept}
          placeholder="Needs a recovery plan"
          disabled={lacksPlan}
          options={producingConcepts.map((value) => ({ value, label: conceptLabels[value] }))}
          onChange={(next) => take(side.estimateId, next)}
        />
      )}
      {lacksPlan && (
        <p className="col-span-full text-13 text-ink-soft" role="status">
          The recoveries of r{shown.revision} were typed. Another concept needs the curve of a
          recovery plan: choose a reservoir or a revision that has one.
        </p>
      )}
    </>
  );
}
