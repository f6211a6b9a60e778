import type { DriverName } from "@/analytics/volumetrics/results-schema";
import { lowerFirst } from "@/components/ui/format";
import type { CaseSet } from "./case-sets";
import { CasesPanel } from "./cases-panel";
import { DataPanel } from "./data-panel";
import { familyLabels } from "./fit-words";
import type { InputDescription } from "./input-catalogue";
import type { InputReading } from "./input-reading";
import type { InputText } from "./input-text";
import { readPercent } from "./percent-text";
import { PercentilesPanel } from "./percentiles-panel";

export interface DetailPanelProps {
  about: InputDescription;
  name: DriverName;
  text: InputText;
  reading: InputReading;
  /** id of the line that says what is wrong */
  notesId: string;
  /** sets of cases that inputs share; `null` for an input that can share none */
  caseSets: readonly CaseSet[] | null;
  /** absent: the panel is read, not typed */
  onChange?: (text: InputText) => void;
}

/** What describes an input that a few figures do not: percentiles, measured values, cases. */
export function DetailPanel(props: DetailPanelProps) {
  switch (props.text.kind) {
    case "percentiles":
      return <PercentilesPanel {...props} />;
    case "data":
      return <DataPanel {...props} />;
    case "scenarios":
      return <CasesPanel {...props} />;
    default:
      return null;
  }
}

/** What the panel holds, for the line while it is closed; `null` for shapes without one. */
export function panelSummary(text: InputText, reading: InputReading): string | null {
  switch (text.kind) {
    case "percentiles": {
      const points = text.percentiles?.points ?? [];
      const names = points.map(({ exceedance }) => `P${exceedance.replace(/^p/i, "").trim()}`);
      return text.percentiles
        ? `${familyLabels[text.percentiles.family]} through ${names.join(", ")}`
        : null;
    }
    case "data": {
      const count = reading.cells?.values.length ?? 0;
      const shape = text.data?.shape ?? "empirical";
      const curve = shape === "empirical" ? "as measured" : `${lowerFirst(shape)} curve`;
      return `${count.toLocaleString("en-US")} values, ${curve}`;
    }
    case "scenarios": {
      const cases = text.cases?.cases ?? [];
      const names = cases.map(
        ({ name, weight }) => `${name.trim() || "unnamed"} ${shortPercent(weight)}`,
      );
      return names.join(", ");
    }
    default:
      return null;
  }
}

/** A chance as typed, or to four digits where it was worked out. */
function shortPercent(weight: string): string {
  const chance = readPercent(weight, "");
  return typeof chance === "number" ? `${Number((chance * 100).toPrecision(4))} %` : "– %";
}
