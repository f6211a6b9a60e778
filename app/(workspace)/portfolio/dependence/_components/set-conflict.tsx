import type { PlacedField } from "@/analytics/portfolio/factor-model";
import type { BasinView } from "@/app/api/v1/basins/schema";
import type { DependenceSetView } from "@/app/api/v1/dependence-sets/schema";
import { Button } from "@/components/ui/button";
import { formatDate } from "@/components/ui/format";
import { Notice } from "@/components/ui/status";
import { LedgerTable } from "@/components/ui/table";
import { setDifferences } from "./set-differences";
import type { SetText } from "./set-text";

export interface SetConflictProps {
  /** the set as it is saved now */
  theirs: DependenceSetView;
  mine: SetText;
  basins: readonly BasinView[];
  fields: readonly PlacedField[];
  isFaulty: boolean;
  onTakeTheirs: () => void;
  onSaveMine: () => void;
}

/** Somebody else saved first: who, when, and where the two differ, so that the choice is an informed one. */
export function SetConflict(props: SetConflictProps) {
  const { theirs, mine, basins, fields } = props;
  const differences = setDifferences(theirs, mine, basins, fields);
  const who = theirs.updatedBy?.name ?? "Somebody else";
  return (
    <div className="grid grid-cols-1 gap-3">
      <Notice
        tone="error"
        title={`${who} saved this set after you opened it, ${formatDate(theirs.updatedAt, "time")} UTC.`}
        actions={
          <>
            <Button size="small" onClick={props.onTakeTheirs}>
              Take theirs
            </Button>
            <Button size="small" disabled={props.isFaulty} onClick={props.onSaveMine}>
              Save mine over it
            </Button>
          </>
        }
      >
        {differences.length === 0
          ? "It says the same as what you typed."
          : "What you typed is still here; theirs is kept too, until you choose."}
      </Notice>
      {differences.length > 0 && (
        <LedgerTable
          caption="Where theirs differs from what you typed"
          framed
          className="stacking-table"
        >
          <thead>
            <tr>
              <th scope="col">Where they differ</th>
              <th scope="col">Theirs, saved</th>
              <th scope="col">Yours, typed</th>
            </tr>
          </thead>
          <tbody>
            {differences.map((place) => (
              <tr key={place.what}>
                <th scope="row" className="wrap font-normal">
                  {place.what}
                </th>
                <td className="wrap" data-label="Theirs">
                  {place.theirs}
                </td>
                <td className="wrap" data-label="Yours">
                  {place.mine}
                </td>
              </tr>
            ))}
          </tbody>
        </LedgerTable>
      )}
    </div>
  );
}
