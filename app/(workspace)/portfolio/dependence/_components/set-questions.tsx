"use client";

import type { DependenceSetView } from "@/app/api/v1/dependence-sets/schema";
import { useBasis } from "@/components/basis/use-basis";
import { reportingOf } from "@/components/portfolio/reporting";
import { Button } from "@/components/ui/button";
import { Dialog } from "@/components/ui/dialog";
import { formatFigure } from "@/components/ui/format";
import { liquidOf } from "../../_components/liquid";
import type { SetTotals } from "../_queries/dependence";

export type SetQuestion = "makeDefault" | "saveDefault" | "remove";

export interface SetQuestionsProps {
  question: SetQuestion | null;
  set: DependenceSetView;
  /** the book's own as it is now */
  standing: DependenceSetView | undefined;
  totals: ReadonlyMap<string, SetTotals | undefined>;
  onClose: () => void;
  onSave: () => void;
  onMakeDefault: () => void;
  onRemove: () => void;
}

/** What is asked before totals move for everybody, or a set goes. */
export function SetQuestions({
  question,
  set,
  standing,
  totals,
  onClose,
  onSave,
  onMakeDefault,
  onRemove,
}: SetQuestionsProps) {
  const moves = useMoveWords(totals.get(standing?.id ?? ""), totals.get(set.id));
  return (
    <>
      <Dialog
        open={question === "makeDefault"}
        onClose={onClose}
        title={`Make “${set.name}” the book’s own?`}
        description={`Totals will move on every page, export and link that does not name a set of its own.${moves} Means stay, beyond sampling. Fields of one reservoir keep their ranges; those of fields with several reservoirs move, because reservoirs follow the set inside a field too.`}
        actions={
          <>
            <Button onClick={onClose}>Cancel</Button>
            <Button kind="primary" onClick={onMakeDefault}>
              Let totals stand on it
            </Button>
          </>
        }
      />
      <Dialog
        open={question === "saveDefault"}
        onClose={onClose}
        title={`Save the book’s own set?`}
        description="Totals stand on this set, so they move for everybody as soon as it is saved. To look first, save the change as a new set and compare."
        actions={
          <>
            <Button onClick={onClose}>Cancel</Button>
            <Button kind="primary" onClick={onSave}>
              Save, and let totals move
            </Button>
          </>
        }
      />
      <Dialog
        open={question === "remove"}
        onClose={onClose}
        title={`Delete “${set.name}”?`}
        description="Links that name it will say that it is not there. The audit trail keeps what it held."
        actions={
          <>
            <Button onClick={onClose}>Keep it</Button>
            <Button kind="primary" onClick={onRemove}>
              Delete
            </Button>
          </>
        }
      />
    </>
  );
}

/** " On this basis P90 goes from 4,260 to 4,120 and P10 from … $ million." */
function useMoveWords(from: SetTotals | undefined, to: SetTotals | undefined): string {
  const { basis } = useBasis();
  if (!from?.totals || !to?.totals) return "";
  const liquid = liquidOf(to, reportingOf(basis, to.prices));
  const before = liquid.rangeOf(from.totals.trialByTrial);
  const after = liquid.rangeOf(to.totals.trialByTrial);
  return ` On this basis the portfolio’s P90 goes from ${formatFigure(before.p90)} to ${formatFigure(after.p90)} and its P10 from ${formatFigure(before.p10)} to ${formatFigure(after.p10)} ${liquid.unit}.`;
}
