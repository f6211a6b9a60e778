"use client";

import { useRouter } from "next/navigation";
import { useState } from "react";
import { useLeaveWarning } from "@/app/_client/use-leave-warning";
import { currentRow, errorWords, ProblemError } from "@/app/_client/request";
import type { PlacedField } from "@/analytics/portfolio/factor-model";
import type { BasinView } from "@/app/api/v1/basins/schema";
import { dependenceSetSchema, type DependenceSetView } from "@/app/api/v1/dependence-sets/schema";
import { useBasis } from "@/components/basis/use-basis";
import { Button } from "@/components/ui/button";
import { Section } from "@/components/ui/section";
import { Notice } from "@/components/ui/status";
import { useToast } from "@/components/ui/toast";
import { useCreateSet, useRemoveSet, useSaveSet, type SetTotals } from "../_queries/dependence";
import { SetConflict } from "./set-conflict";
import { SetFields } from "./set-fields";
import { SetQuestions, type SetQuestion } from "./set-questions";
import { newFactor, readSetText, setTextOf, type SetText } from "./set-text";

export interface SetEditorProps {
  /** null for a new one, which begins as a copy of the book's own */
  set: DependenceSetView | null;
  sets: readonly DependenceSetView[];
  basins: readonly BasinView[];
  fields: readonly PlacedField[];
  totals: ReadonlyMap<string, SetTotals | undefined>;
}

/** A set in the planner's hands. Saved under the version it was read at, so nobody's work is lost. */
export function SetEditor({ set, sets, basins, fields, totals }: SetEditorProps) {
  const router = useRouter();
  const toast = useToast();
  const { withBasis, basis, setBasis } = useBasis();
  const standing = sets.find(({ isDefault }) => isDefault);
  const [base, setBase] = useState(set);
  const [text, setText] = useState<SetText>(() => startOf(set, standing));
  const [question, setQuestion] = useState<SetQuestion | null>(null);
  const [problem, setProblem] = useState<unknown>(null);
  const create = useCreateSet();
  const save = useSaveSet(set?.id ?? "");
  const remove = useRemoveSet(set?.id ?? "");

  const { body, faults } = readSetText(text, basins, fields);
  const isFaulty = Object.keys(faults).length > 0;
  const isDirty = JSON.stringify(text) !== JSON.stringify(startOf(base, standing));
  const theirs = currentRow(problem, dependenceSetSchema);
  const told = { ...serverFaults(problem), ...faults };
  useLeaveWarning(isDirty);

  async function run(work: () => Promise<void>) {
    setQuestion(null);
    setProblem(null);
    try {
      await work();
    } catch (error) {
      setProblem(error);
    }
  }

  const handleCreate = () =>
    run(async () => {
      const made = await create.mutateAsync(body);
      toast({
        title: `“${made.name}” is saved.`,
        detail: "Totals stand on it when you choose it.",
      });
      router.replace(withBasis(`/portfolio/dependence?set=${made.id}`), { scroll: false });
    });

  const handleSave = (version: number) =>
    run(async () => {
      const saved = await save.mutateAsync({ version, body });
      setBase(saved);
      setText(setTextOf(saved));
      toast({ title: `“${saved.name}” is saved.` });
    });

  const handleMakeDefault = () =>
    run(async () => {
      if (!base) return;
      const saved = await save.mutateAsync({ version: base.version, body: { isDefault: true } });
      setBase(saved);
      if (basis.dependence === saved.id) setBasis({ dependence: "default" });
      toast({ title: `Totals stand on “${saved.name}” now.` });
    });

  const handleRemove = () =>
    run(async () => {
      if (!base) return;
      await remove.mutateAsync(base.version);
      toast({ title: `“${base.name}” is gone.` });
      const next = basis.dependence === base.id ? "/portfolio/dependence?dependence=default" : null;
      router.replace(next ?? withBasis("/portfolio/dependence"), { scroll: false });
    });

  function handleTakeTheirs(current: DependenceSetView) {
    setBase(current);
    setText(setTextOf(current));
    setProblem(null);
  }

  return (
    <Section
      title={base ? `What “${base.name}” says` : "A new set"}
      note={
        base?.isDefault
          ? "The book’s own: every page that does not choose a set stands on it."
          : "No page stands on it unless its basis says so."
      }
      tools={
        <>
          {base && !base.isDefault && (
            <>
              <Button size="small" kind="quiet" onClick={() => setQuestion("remove")}>
                Delete
              </Button>
              <Button
                size="small"
                disabled={isDirty}
                title={isDirty ? "Save first" : undefined}
                onClick={() => setQuestion("makeDefault")}
              >
                Make it the book’s own
              </Button>
            </>
          )}
        </>
      }
    >
      <div className="grid grid-cols-1 gap-5">
        {problem !== null && !theirs && (
          <Notice tone="error" title={problemWords(problem)}>
            What you typed is still here.
          </Notice>
        )}
        {theirs && (
          <SetConflict
            theirs={theirs}
            mine={text}
            basins={basins}
            fields={fields}
            isFaulty={isFaulty}
            onTakeTheirs={() => handleTakeTheirs(theirs)}
            onSaveMine={() => void handleSave(theirs.version)}
          />
        )}
        <SetFields
          text={text}
          faults={told}
          basins={basins}
          fields={fields}
          onChange={(change) => setText((now) => ({ ...now, ...change }))}
          onAddFactor={() =>
            setText((now) => ({ ...now, sharedFactors: [...now.sharedFactors, newFactor()] }))
          }
        />
        <div className="flex flex-wrap items-center gap-3">
          <Button
            kind="primary"
            disabled={isFaulty || (base !== null && !isDirty)}
            busy={create.isPending || save.isPending}
            busyLabel="Saving…"
            onClick={() => {
              if (!base) void handleCreate();
              else if (base.isDefault) setQuestion("saveDefault");
              else void handleSave(base.version);
            }}
          >
            {base ? "Save" : "Save as a new set"}
          </Button>
          {base && isDirty && (
            <Button kind="quiet" onClick={() => setText(setTextOf(base))}>
              Undo the changes
            </Button>
          )}
          <span className="text-13 text-ink-soft">
            {isFaulty
              ? "Something above needs attention first."
              : isDirty || !base
                ? "Once saved, its total stands in the table above, beside the others."
                : "Saved."}
          </span>
        </div>
      </div>
      {base && (
        <SetQuestions
          question={question}
          set={base}
          standing={standing}
          totals={totals}
          onClose={() => setQuestion(null)}
          onSave={() => void handleSave(base.version)}
          onMakeDefault={() => void handleMakeDefault()}
          onRemove={() => void handleRemove()}
        />
      )}
    </Section>
  );
}

/** A new set begins as a copy of the book's own, without its name. */
function startOf(set: DependenceSetView | null, standing: DependenceSetView | undefined): SetText {
  if (set) return setTextOf(set);
  const dependence = standing?.dependence ?? {
    portfolioRank: 0,
    basinRanks: {},
    otherBasinsRank: 0,
    sharedFactors: [],
  };
  return setTextOf({ name: "", note: "", dependence });
}

/** What the server says about single places, at those places. */
function serverFaults(error: unknown): Record<string, string> {
  if (!(error instanceof ProblemError)) return {};
  return Object.fromEntries(
    error.errors.map(({ pointer, detail }) => [
      pointer.replace(/^#\/(dependence\/)?/, "").replaceAll("/", "."),
      detail,
    ]),
  );
}

/** Every reason why it cannot be saved, not only how many there are. */
function problemWords(error: unknown): string {
  if (!(error instanceof ProblemError) || error.errors.length < 2) return errorWords(error);
  return error.errors.map(({ detail }) => detail).join(" ");
}
