import type { InputName } from "@/analytics/volumetrics/inputs-schema";
import { Button } from "@/components/ui/button";
import { Select } from "@/components/ui/choice";
import { formatFigure, lowerFirst } from "@/components/ui/format";
import { Notice } from "@/components/ui/status";
import { CaseRow } from "./case-row";
import { joined, sharingWords, type CaseSet } from "./case-sets";
import { addsUp, scaledTo100, totalPercent } from "./case-weights";
import type { DetailPanelProps } from "./detail-panel";
import { inputCatalogue } from "./input-catalogue";
import type { CasesText, CaseText } from "./input-text";
import { PanelText } from "./panel-parts";
import { singleValue } from "./reshape";

const MOST_CASES = 12;

/** Several things that may be true: a name, a chance and a range each, and what else depends on which is. */
export function CasesPanel(props: DetailPanelProps) {
  const { about, name, text, reading, notesId, caseSets, onChange } = props;
  const typed = text.cases;
  if (!typed) return null;
  const change = onChange && ((cases: CasesText) => onChange({ ...text, cases }));
  const { cases } = typed;
  const setCases = change && ((next: CaseText[]) => change({ ...typed, cases: next }));
  return (
    <div className="range-panel">
      <table className="range-panel-table cases-table">
        <caption className="sr-only">Cases of {about.label}, with their chances and ranges</caption>
        <thead>
          <tr>
            <th scope="col">Case</th>
            <th scope="col">Chance</th>
            <th scope="col">The input is then</th>
            <th scope="col">Low</th>
            <th scope="col">Best</th>
            <th scope="col">High</th>
            {setCases && (
              <th scope="col">
                <span className="sr-only">Take out</span>
              </th>
            )}
          </tr>
        </thead>
        <tbody>
          {cases.map((one, index) => (
            <CaseRow
              key={index}
              {...{ about, name, index, reading, notesId }}
              text={one}
              onChange={
                setCases &&
                ((next) => setCases(cases.map((other, at) => (at === index ? next : other))))
              }
              onRemove={
                setCases && cases.length > 2
                  ? () => setCases(cases.filter((_, at) => at !== index))
                  : undefined
              }
            />
          ))}
        </tbody>
      </table>
      <div className="range-panel-head">
        <Total cases={cases} onScale={setCases && (() => setCases(scaledTo100(cases)))} />
        {setCases && cases.length < MOST_CASES && (
          <Button
            size="small"
            onClick={() =>
              setCases([
                ...cases,
                { name: `Case ${cases.length + 1}`, weight: "", range: singleValue("") },
              ])
            }
          >
            Add a case
          </Button>
        )}
      </div>
      {caseSets && (
        <Sharing
          label={about.label}
          input={name as InputName}
          cases={typed}
          sets={caseSets}
          onChange={change}
        />
      )}
    </div>
  );
}

function Total({ cases, onScale }: { cases: readonly CaseText[]; onScale?: () => void }) {
  const total = totalPercent(cases);
  if (total === null) {
    return <p className="text-ink-soft">The chances have to add up to 100 %.</p>;
  }
  if (addsUp(total)) return <p role="status">The chances add up to 100 %.</p>;
  return (
    <>
      <p role="status" className="text-warning-ink">
        <b>The chances add up to {formatFigure(total, { digits: 4 })} %, not 100 %.</b>
      </p>
      {onScale && (
        <Button size="small" onClick={onScale}>
          Scale to 100 %
        </Button>
      )}
    </>
  );
}

const ALONE = "";
/** No set has this name: names of sets are trimmed. */
const NEW_SET = " new";
/** Stands for a set whose name is still to be typed. */
const UNNAMED = " ";

function Sharing({
  label,
  input,
  cases,
  sets,
  onChange,
}: {
  label: string;
  input: InputName;
  cases: CasesText;
  sets: readonly CaseSet[];
  onChange?: (cases: CasesText) => void;
}) {
  const current = cases.caseSet.trim();
  const own = sets.find(({ name }) => name === current);
  const isShared = own !== undefined && own.inputs.some((other) => other !== input);
  const joinable = sets.filter(({ inputs }) => inputs.some((other) => other !== input));
  const take = (name: string) => {
    const set = sets.find((candidate) => candidate.name === name);
    onChange?.(set ? joined(cases, set) : { ...cases, caseSet: name });
  };
  if (!onChange) return current === "" ? null : <p>{own && sharingWords(own, input)}</p>;
  return (
    <div className="sharing">
      <Select
        label="Which case is true is decided"
        value={cases.caseSet === ALONE ? ALONE : isShared ? current : NEW_SET}
        options={[
          { value: ALONE, label: "for this input alone" },
          ...joinable.map(({ name, inputs }) => ({
            value: name,
            label: `once for “${name}”`,
            note: `with ${inputs
              .filter((other) => other !== input)
              .map((other) => lowerFirst(inputCatalogue[other].label))
              .join(", ")}; takes its cases and chances`,
          })),
          { value: NEW_SET, label: "once for a set of inputs that you name" },
        ]}
        onChange={(next) => {
          if (next === NEW_SET) onChange({ ...cases, caseSet: freeName(sets) });
          else take(next);
        }}
      />
      {cases.caseSet !== ALONE && (
        <div className="grid gap-1">
          {isShared ? (
            <Notice tone="info" title={sharingWords(own, input)} live={false}>
              Names and chances belong to “{own.name}”: a change here changes them there too.
            </Notice>
          ) : (
            <>
              <span className="field-label" aria-hidden="true">
                Name of the set, such as Gas-water contact
              </span>
              <PanelText
                label={`Name of the set of cases of ${label}`}
                value={cases.caseSet.trimStart()}
                maxLength={60}
                onChange={(next) => take(next.trimStart() || UNNAMED)}
              />
              {own && <p className="text-12 text-ink-soft">{sharingWords(own, input)}</p>}
            </>
          )}
          <p className="text-12 text-ink-soft">
            An input of a shared set takes no rank correlation: the case is what ties it to others.
          </p>
        </div>
      )}
    </div>
  );
}

function freeName(sets: readonly CaseSet[]): string {
  const taken = new Set(sets.map(({ name }) => name));
  let count = 1;
  const named = () => (count === 1 ? "Shared cases" : `Shared cases ${count}`);
  while (taken.has(named())) count += 1;
  return named();
}
