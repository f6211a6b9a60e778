import type { AuditEventView } from "@/app/api/v1/audit-events/schema";
import { Disclosure } from "@/components/ui/dialog";
import { formatDate } from "@/components/ui/format";
import { ColumnHeading, LedgerTable } from "@/components/ui/table";
import { VisuallyHidden } from "@/components/ui/text";
import { actionWords, changesOf, entityWords, type Change } from "./changes";

export interface AuditTableProps {
  events: readonly AuditEventView[];
  /** rows of the last filter, while those of the new one are on their way */
  isOld: boolean;
  onlyRecord: (entity: string, entityId: string) => void;
}

export function AuditTable({ events, isOld, onlyRecord }: AuditTableProps) {
  return (
    <div aria-busy={isOld} className={isOld ? "opacity-60" : undefined}>
      <LedgerTable
        caption="Audit trail, newest first"
        framed
        className="stacking-table audit-table"
      >
        <thead>
          <tr>
            <ColumnHeading>What</ColumnHeading>
            <ColumnHeading unit="UTC">When</ColumnHeading>
            <ColumnHeading>Who</ColumnHeading>
            <ColumnHeading>From what to what</ColumnHeading>
            <ColumnHeading>Record</ColumnHeading>
          </tr>
        </thead>
        <tbody>
          {events.map((event) => (
            <tr key={event.id}>
              <th scope="row">{actionWords(event.action)}</th>
              <td className="soft">{formatDate(event.at, "time")}</td>
              <td data-label="by">{event.actor?.name ?? "Dewledger"}</td>
              <td className="wrap">
                <Changes changes={changesOf(event)} />
              </td>
              <td>
                <button
                  type="button"
                  className="link-button"
                  onClick={() => onlyRecord(event.entity, event.entityId)}
                >
                  {event.entityId.slice(0, 8)}
                  <VisuallyHidden>
                    : only this {entityWords(event.entity).toLowerCase()}
                  </VisuallyHidden>
                </button>
              </td>
            </tr>
          ))}
        </tbody>
      </LedgerTable>
    </div>
  );
}

const SHOWN = 3;

/** The first few values in sight; the rest of a long event (a whole set of inputs) behind a word. */
function Changes({ changes }: { changes: readonly Change[] }) {
  if (changes.length === 0) return <span className="soft">no values</span>;
  const rest = changes.slice(SHOWN);
  return (
    <>
      <ChangeList changes={changes.slice(0, SHOWN)} />
      {rest.length > 0 && (
        <Disclosure label={`${rest.length} more`}>
          <ChangeList changes={rest} />
        </Disclosure>
      )}
    </>
  );
}

const ChangeList = ({ changes }: { changes: readonly Change[] }) => (
  <dl className="changes">
    {changes.map(({ name, before, after }) => (
      <div key={name}>
        <dt>{name}</dt>
        <dd>
          {before !== undefined && (
            <>
              <VisuallyHidden>from </VisuallyHidden>
              <s>{before}</s>
            </>
          )}
          {before !== undefined && after !== undefined && <span aria-hidden="true"> → </span>}
          {after !== undefined && (
            <>
              <VisuallyHidden>{before === undefined ? "set to " : "to "}</VisuallyHidden>
              {after}
            </>
          )}
        </dd>
      </div>
    ))}
  </dl>
);
