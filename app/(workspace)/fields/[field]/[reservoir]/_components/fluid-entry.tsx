"use client";

import { ProblemError } from "@/app/_client/request";
import { FindingList } from "@/components/estimate/finding-list";
import { SeparatorSheet } from "@/components/estimate/separator-sheet";
import {
  fieldOfPointer,
  readSheet,
  textOfTest,
  type SheetFieldName,
} from "@/components/estimate/sheet-text";
import { fluidFindings } from "@/components/estimate/wellstream-view";
import { CompositionFacts, CompositionSheet } from "@/components/fluid/composition-sheet";
import { sampleFindings } from "@/components/fluid/sample-findings";
import { WellstreamTable } from "@/components/fluid/wellstream-table";
import { Segmented } from "@/components/ui/choice";
import { Disclosure } from "@/components/ui/dialog";
import { formatFigure } from "@/components/ui/format";
import { Section, Stack } from "@/components/ui/section";
import type { FluidPartProps } from "./fluid-sample";

/** Separator test and composition, and whether they belong together. */
export function FluidEntry(props: FluidPartProps) {
  return (
    <>
      <Stack close>
        <SeparatorSection {...props} />
        <ChecksSection {...props} />
      </Stack>
      <CompositionSection {...props} />
    </>
  );
}

function SeparatorSection({ draft, study, mayType, remarks, setRemarks }: FluidPartProps) {
  const { text, reading } = draft;
  const isComputed = text.origin === "computed";
  const shown = isComputed ? (study.test ? textOfTest(study.test) : null) : text.separator;
  return (
    <Section
      id="sheets"
      title="Separator test"
      note={
        isComputed
          ? "Worked out from the composition by flash through the separators: no measurement."
          : "Gas volumes per stock-tank barrel, at the base of the sheet. Other units and arithmetic are read: “38 bar”, “12*640”. Cells can be pasted from a spreadsheet."
      }
    >
      <div className="grid grid-cols-1 gap-3">
        {mayType && (reading.composition.sheet !== null || isComputed) && (
          <Segmented
            label="Where the separator test comes from"
            value={text.origin}
            options={[
              { value: "measured", label: "Measured" },
              { value: "computed", label: "From the composition" },
            ]}
            onChange={(origin) => draft.change({ origin })}
          />
        )}
        {shown ? (
          <SeparatorSheet
            sheet={shown}
            reading={isComputed ? readSheet(shown) : reading.separator}
            problems={problemsOf(study.wellstream.error)}
            remarks={remarks.separatorTest}
            onChange={
              mayType && !isComputed
                ? (separator) => {
                    draft.change({ separator });
                    setRemarks({
                      ...remarks,
                      separatorTest: keep(
                        remarks.separatorTest,
                        text.separator.fields,
                        separator.fields,
                      ),
                    });
                  }
                : undefined
            }
          />
        ) : (
          <p className="text-13 text-ink-soft">
            Needs a composition that leaves liquid in the tank, and two or three stages of
            separators.
          </p>
        )}
      </div>
    </Section>
  );
}

/** Remarks at cells that still say what they said. */
export function keep(
  remarks: Readonly<Record<string, string>>,
  before: Readonly<Record<string, string>>,
  now: Readonly<Record<string, string>>,
): Readonly<Record<string, string>> {
  const places = Object.keys(remarks);
  return places.every((place) => before[place] === now[place])
    ? remarks
    : Object.fromEntries(
        places
          .filter((place) => before[place] === now[place])
          .map((place) => [place, remarks[place]]),
      );
}

function ChecksSection({
  draft,
  study,
  reservoir,
  criticalBand,
  waterSaturation,
  curve,
}: FluidPartProps) {
  const { text, reading } = draft;
  const wellstream = study.wellstream.data ?? null;
  const isMeasured = text.origin === "measured";
  const findings = [
    ...sampleFindings({
      wellstream: isMeasured ? wellstream : null,
      composition: study.composition.data,
      equationOfState: study.equationOfState.data,
      depletion: study.depletion.data,
      screeningWarnings: study.screeningWarnings,
      curve,
      tuning: text.tuning,
      dewPoints: {
        test: reading.separator.fields.dewPointPsia.value,
        table: study.table?.dewPointPsia ?? null,
      },
      criticalBand,
      waterSaturation,
    }),
    ...(wellstream && isMeasured
      ? fluidFindings(wellstream, study.measuredDewPointPsia, reservoir)
      : []),
  ];
  if (findings.length === 0) return null;
  const passed = findings.filter(({ tone }) => tone === "done");
  const notMade = findings.filter(({ tone }) => tone === "open");
  return (
    <Section id="checks" title="Does the sample hold together?">
      <FindingList findings={findings.filter(({ tone }) => tone !== "done" && tone !== "open")} />
      {notMade.length > 0 && (
        <Disclosure label={`Not checked: ${notMade.length}`}>
          <FindingList findings={notMade} />
        </Disclosure>
      )}
      {passed.length > 0 && (
        <Disclosure
          label={passed.length === 1 ? "One check passed" : `${passed.length} checks passed`}
          defaultOpen={passed.length === findings.length}
        >
          <FindingList findings={passed} />
        </Disclosure>
      )}
    </Section>
  );
}

function CompositionSection({
  draft,
  study,
  mayType,
  reservoir,
  remarks,
  setRemarks,
}: FluidPartProps) {
  const { text, reading } = draft;
  const { composition } = reading;
  const computed = study.composition.data;
  const isStreams = text.composition.kind === "separatorStreams";
  if (composition.isEmpty && !mayType) {
    return (
      <Section title="Wellstream">
        <p className="text-13 text-ink-soft">No composition was reported with this sample.</p>
      </Section>
    );
  }
  return (
    <Section
      title="Wellstream"
      note={
        computed
          ? `${computed.fluidType.label}; ${formatFigure(computed.gravity)} times as heavy as air`
          : "Mol % as the laboratory reported it; the rest appears when it is filled in."
      }
    >
      <div className="grid grid-cols-1 gap-4">
        <CompositionSheet
          text={text.composition}
          reading={composition}
          computed={computed}
          state={{
            cells: text.composition.cells,
            fields: composition.fields,
            problems: study.problems.composition,
            remarks: { ...study.remarks.composition, ...remarks.composition },
            onChange: mayType
              ? (changes) => {
                  draft.change((now) => ({
                    composition: {
                      ...now.composition,
                      cells: { ...now.composition.cells, ...changes },
                    },
                  }));
                  setRemarks({
                    ...remarks,
                    composition: keep(remarks.composition, text.composition.cells, {
                      ...text.composition.cells,
                      ...changes,
                    }),
                  });
                }
              : undefined,
          }}
          onChange={mayType ? (next) => draft.change({ composition: next }) : undefined}
        />
        {computed && isStreams && <WellstreamTable computed={computed} />}
        {computed && (
          <CompositionFacts
            computed={computed}
            equationOfState={study.equationOfState.data}
            reservoir={reservoir}
          />
        )}
      </div>
    </Section>
  );
}

/** The engine's refusals, at the fields they are about. */
function problemsOf(error: Error | null): Partial<Record<SheetFieldName, string>> {
  if (!(error instanceof ProblemError)) return {};
  return Object.fromEntries(
    error.errors.flatMap(({ pointer, detail }) => {
      const field = fieldOfPointer(pointer);
      return field ? [[field, detail]] : [];
    }),
  );
}
