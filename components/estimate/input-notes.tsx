import { formatFigure } from "@/components/ui/format";
import { Button } from "@/components/ui/button";
import { Notice } from "@/components/ui/status";
import type { Warning } from "@/analytics/warnings";
import type { CutOff } from "./input-reading";
import { typedFigure } from "./quantities-of-inputs";
import type { UnitSuspicion } from "./unit-suspicion";

export interface InputNotesProps {
  id: string;
  unit: string;
  /** reasons of fields that cannot be read or cannot be */
  problems: string[];
  /** offered with the reason that it would settle */
  cutOff: CutOff | null;
  suspicion: UnitSuspicion | null;
  warnings: readonly Warning[];
  /** takes the figures of the suspected unit; absent where nothing can be changed */
  onConvert?: (values: Record<string, number>) => void;
  /** sets the bound; absent where nothing can be changed */
  onCutOff?: (cutOff: CutOff) => void;
}

const listed = (values: readonly string[]) =>
  values.length < 2 ? values.join("") : `${values.slice(0, -1).join(", ")} and ${values.at(-1)}`;

/** What is impossible, doubtful or unusual about one input, in words with the figures in them. */
export function InputNotes({
  id,
  unit,
  problems,
  cutOff,
  suspicion,
  warnings,
  onConvert,
  onCutOff,
}: InputNotesProps) {
  const converted = suspicion ? Object.values(suspicion.converted) : [];
  const withUnit = (text: string) => (unit ? `${text} ${unit}` : text);
  return (
    <div id={id} className="grid gap-1.5">
      {problems.map((problem) => (
        <Notice
          key={problem}
          tone="error"
          title={problem}
          live={false}
          actions={
            cutOff &&
            onCutOff && (
              <Button size="small" onClick={() => onCutOff(cutOff)}>
                Cut off at {withUnit(typedFigure(cutOff.value))}
              </Button>
            )
          }
        />
      ))}
      {suspicion && (
        <Notice
          title={`${suspicion.typed.length > 1 ? "Are" : "Is"} ${listed(suspicion.typed.map((value) => formatFigure(value, { digits: 4 }).replace(/\.0+$/, "")))} in ${suspicion.words}?`}
          actions={
            onConvert && (
              <Button size="small" onClick={() => onConvert(suspicion.converted)}>
                Use {withUnit(listed(converted.map((value) => plain(value))))}
              </Button>
            )
          }
        >
          {suspicion.ratio !== null &&
            `High is ${formatFigure(suspicion.ratio, { digits: 2 })} times low. `}
          {`${listed(suspicion.typed.map((value) => plain(value)))} ${suspicion.symbol} would be ${withUnit(listed(converted.map((value) => plain(value))))}, which fits. Kept as typed.`}
        </Notice>
      )}
      {warnings.map((warning) => (
        <Notice
          key={warning.code + warning.message}
          tone={warning.severity === "caution" ? "error" : "warning"}
          title={firstSentence(warning.message)}
          live={false}
        >
          {rest(warning.message)}
        </Notice>
      ))}
    </div>
  );
}

const plain = (value: number) => value.toLocaleString("en-US", { maximumSignificantDigits: 4 });

/** The sentence ends where a capital begins after the stop, so that "1.5 times" is no end. */
const SENTENCE_END = /[.?](?= [A-Z])/;

function firstSentence(message: string): string {
  const end = SENTENCE_END.exec(message);
  return end ? message.slice(0, end.index + 1) : message;
}

function rest(message: string): string {
  return message.slice(firstSentence(message).length).trim();
}
