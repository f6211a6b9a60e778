"use client";

import { lightComponents } from "@/analytics/composition/composition-schema";
import type {
  CompositionResponse,
  EquationOfStateResponse,
} from "@/app/api/v1/calculations/fluid-schema";
import { Segmented, Select } from "@/components/ui/choice";
import { Figure } from "@/components/ui/figure";
import { formatFigure } from "@/components/ui/format";
import { Icon } from "@/components/ui/icon";
import { Unit } from "@/components/ui/text";
import { ComponentLabel } from "./component-label";
import { componentName } from "./component-names";
import {
  streamConditionNames,
  streamConditions,
  streamLabels,
  streamPlaces,
  streamsOf,
  totalProblem,
  type CompositionReading,
  type CompositionText,
  type StreamName,
} from "./composition-text";
import { EntryCell, EntryGrid, EntryProblems, type EntryState } from "./entry-grid";
import { equationWords } from "./fluid-figures";
import { psia } from "./words";
import { ShareBar } from "./share-bar";

export interface CompositionSheetProps {
  text: CompositionText;
  reading: CompositionReading;
  computed: CompositionResponse | null;
  state: EntryState;
  /** absent: the sheet is read, not typed */
  onChange?: (text: CompositionText) => void;
}

/** A row of the sheet: the places of its cells in each stream; `null` where the stream ends before. */
interface Row {
  symbol: string;
  places: (string | null)[];
}

function rowsOf(text: CompositionText): Row[] {
  const streams = streamsOf(text);
  const lists = streams.map((name) => streamPlaces(name, text.plusFrom[name]));
  const singles = [
    ...lightComponents,
    ...Array.from(
      { length: Math.max(...streams.map((name) => text.plusFrom[name])) - 7 },
      (_, index) => `C${index + 7}`,
    ),
  ];
  return [
    ...singles.map((symbol) => ({
      symbol,
      places: lists.map(
        (list) => list.slice(0, -1).find((entry) => entry.symbol === symbol)?.place ?? null,
      ),
    })),
    {
      symbol: streams.length === 1 ? `C${text.plusFrom.stream}+` : "Plus fraction",
      places: lists.map((list) => list[list.length - 1].place),
    },
  ];
}

/** A composition as the laboratory's sheet has it: every fraction as reported, their sum, and the plus fraction. */
export function CompositionSheet({
  text,
  reading,
  computed,
  state,
  onChange,
}: CompositionSheetProps) {
  const streams = streamsOf(text);
  const rows = rowsOf(text);
  const plusRows = (["molecularWeight", "specificGravity"] as const).map((name) => ({
    label: name === "molecularWeight" ? "molecular weight" : "specific gravity",
    places: streams.map((stream) => `${stream}.plus.${name}`),
  }));
  const conditions = text.kind === "separatorStreams" ? streamConditionNames : [];
  const hasBars = streams.length === 1;
  const columns = (hasBars ? 2 : 1) + streams.length;
  const largest = Math.max(
    ...rows.flatMap(({ places }) =>
      places.map((place) => (place === null ? 0 : (reading.fields[place]?.value ?? 0))),
    ),
    1e-9,
  );
  const named = (place: string, words: string, stream: StreamName) => ({
    place,
    label: streams.length > 1 ? `${streamLabels[stream]}, ${words}` : words,
  });
  const plusWord = streams.map((name) => `C${text.plusFrom[name]}+`);

  return (
    <div className="grid grid-cols-1 gap-3">
      {onChange && <SheetKind text={text} onChange={onChange} />}
      <EntryGrid
        grid={[
          ...rows.map(({ places }) => places),
          ...plusRows.map(({ places }) => places),
          ...conditions.map((name) => [name]),
        ]}
        onFill={state.onChange}
      >
        <table
          className="ledger-table entry-table composition-table"
          data-streams={hasBars ? undefined : ""}
        >
          <caption className="sr-only">Composition as reported</caption>
          <thead>
            <tr>
              <th scope="col">Component</th>
              {streams.map((name) => (
                <th key={name} scope="col" className="right">
                  {hasBars ? "Mol %" : streamLabels[name]}
                </th>
              ))}
              {hasBars && <td />}
            </tr>
          </thead>
          <tbody>
            {rows.map(({ symbol, places }) => (
              <RowOfFractions
                key={symbol}
                symbol={symbol}
                places={places.map((place, index) =>
                  place === null
                    ? null
                    : named(place, componentName(symbol) || symbol, streams[index]),
                )}
                share={
                  streams.length === 1
                    ? (reading.fields[places[0] ?? ""]?.value ?? 0) / largest
                    : null
                }
                {...{ hasBars, columns, state }}
              />
            ))}
            <tr className="total">
              <th scope="row">Total as reported</th>
              {streams.map((name) => (
                <td key={name} className="right">
                  {reading.isEmpty ? "–" : formatFigure(reading.totals[name], { decimals: 2 })}
                </td>
              ))}
              {hasBars && <td />}
            </tr>
            <TotalProblems {...{ streams, reading, columns }} />
            {plusRows.map(({ label, places }) => (
              <RowOfFractions
                key={label}
                heading={
                  <>
                    {streams.length > 1 ? "Plus fraction" : plusWord[0]}, {label}
                  </>
                }
                places={places.map((place, index) =>
                  named(place, `${plusWord[index]} ${label}`, streams[index]),
                )}
                share={null}
                {...{ hasBars, columns, state }}
              />
            ))}
            {conditions.map((name) => (
              <RowOfFractions
                key={name}
                heading={
                  <>
                    {streamConditions[name].label} <Unit>{streamConditions[name].unit}</Unit>
                  </>
                }
                places={[{ place: name, label: streamConditions[name].label }, null]}
                share={null}
                {...{ hasBars, columns, state }}
              />
            ))}
          </tbody>
        </table>
      </EntryGrid>
      {computed && <Normalising computed={computed} />}
    </div>
  );
}

/** What is wrong with a sum, under it; nothing when it is near enough to 100 %. */
function TotalProblems({
  streams,
  reading,
  columns,
}: {
  streams: readonly StreamName[];
  reading: CompositionReading;
  columns: number;
}) {
  const found = streams.flatMap((name) => {
    const words = reading.isEmpty ? null : totalProblem(name, reading);
    return words ? [streams.length > 1 ? `${streamLabels[name]}: ${words}` : words] : [];
  });
  if (found.length === 0) return null;
  return (
    <tr className="follow">
      <td colSpan={columns}>
        {found.map((words) => (
          <p key={words} className="field-error">
            <Icon name="warning" />
            <span>{words}</span>
          </p>
        ))}
      </td>
    </tr>
  );
}

function RowOfFractions({
  symbol,
  heading,
  places,
  share,
  hasBars,
  columns,
  state,
}: {
  symbol?: string;
  heading?: React.ReactNode;
  places: readonly ({ place: string; label: string } | null)[];
  /** of the longest bar; `null`: no bar */
  share: number | null;
  hasBars: boolean;
  columns: number;
  state: EntryState;
}) {
  return (
    <>
      <tr>
        <th scope="row" className={symbol ? "plain" : "plain wrap"}>
          {symbol ? <ComponentLabel symbol={symbol} /> : heading}
        </th>
        {places.map((cell, index) => (
          <td key={index} className="entry">
            {cell && <EntryCell {...cell} state={state} />}
          </td>
        ))}
        {hasBars && (
          <td className="bar-cell">
            {share !== null && symbol && <ShareBar symbol={symbol} share={share} />}
          </td>
        )}
      </tr>
      <EntryProblems
        places={places.filter((cell) => cell !== null)}
        columns={columns}
        state={state}
      />
    </>
  );
}

/** What was done to make the figures add up to 100. */
function Normalising({ computed }: { computed: CompositionResponse }) {
  const words: Record<string, string> = {
    wellstream: "The wellstream",
    gas: "The separator gas",
    liquid: "The separator liquid",
  };
  return (
    <p className="text-12 text-ink-soft">
      {computed.normalised
        .map(({ stream, reportedTotalMolePercent, factor }) =>
          Math.abs(factor - 1) < 1e-9
            ? `${words[stream]} adds up to 100 mol %; nothing was changed.`
            : `${words[stream]} adds up to ${formatFigure(reportedTotalMolePercent, { decimals: 2 })} mol %: every figure was multiplied by ${formatFigure(factor, { digits: 6 })}.`,
        )
        .join(" ")}
    </p>
  );
}

const fractionOptions = Array.from({ length: 30 }, (_, index) => ({
  value: String(index + 7),
  label: `C${index + 7}+`,
}));

function SheetKind({
  text,
  onChange,
}: {
  text: CompositionText;
  onChange: (text: CompositionText) => void;
}) {
  return (
    <div className="flex flex-wrap items-end gap-x-5 gap-y-2">
      <Segmented
        label="What was analysed"
        value={text.kind}
        options={[
          { value: "wellstream", label: "Wellstream" },
          { value: "separatorStreams", label: "Separator gas and liquid" },
        ]}
        onChange={(kind) => onChange({ ...text, kind })}
      />
      {streamsOf(text).map((name) => (
        <Select
          key={name}
          className="w-28"
          label={text.kind === "wellstream" ? "Plus fraction" : `Plus, ${name}`}
          value={String(text.plusFrom[name])}
          options={fractionOptions}
          onChange={(from) =>
            onChange({ ...text, plusFrom: { ...text.plusFrom, [name]: Number(from) } })
          }
        />
      ))}
    </div>
  );
}

/** What a composition says by itself, line by line, under the sheet. */
export function CompositionFacts({
  computed,
  equationOfState,
  reservoir,
}: {
  computed: CompositionResponse;
  equationOfState: EquationOfStateResponse | null;
  reservoir: { pressurePsia: number; temperatureDegF: number } | null;
}) {
  const { zFactors } = computed;
  const gas = equationOfState?.train?.surfaceGas ?? null;
  const liquids = gas?.plantLiquids.reduce((sum, { gallonsPerMscf }) => sum + gallonsPerMscf, 0);
  const rows = [
    computed.heptanesPlus && {
      label: "Heptanes plus",
      value: computed.heptanesPlus.moleFraction * 100,
      unit: "mol %",
    },
    computed.heptanesPlus && {
      label: "Heptanes plus, molecular weight",
      value: computed.heptanesPlus.molecularWeight,
      unit: "lb/lbmol",
    },
    { label: "Wellstream molecular weight", value: computed.molecularWeight, unit: "lb/lbmol" },
    { label: "Wellstream gravity", value: computed.gravity, unit: "air = 1" },
    zFactors &&
      reservoir && {
        label: `z at ${psia(reservoir.pressurePsia)} psia, ${formatFigure(reservoir.temperatureDegF)} °F`,
        value: zFactors.fromComposition,
        unit: "",
        digits: 4,
        note: `${zFactors.compositionMethod}. From gravity ${formatFigure(zFactors.fromGravity, { digits: 4 })} (${zFactors.gravityMethod}): apart by ${formatFigure(Math.abs(zFactors.relativeDifference) * 100, { digits: 2 })} %. Kay with Wichert–Aziz ${formatFigure(zFactors.fromKay, { digits: 4 })}.`,
      },
    gas && {
      label: "Surface gas, gross heating value",
      value: gas.heatingValue.grossRealBtuPerScf,
      unit: "Btu/scf",
      digits: 4,
      note: `Flashed by ${equationWords(equationOfState)}. Real gas at 14.696 psia and 60 °F. Net ${formatFigure(gas.heatingValue.netRealBtuPerScf, { digits: 4 })}, Wobbe ${formatFigure(gas.heatingValue.wobbeRealBtuPerScf, { digits: 4 })}.`,
    },
    gas &&
      liquids !== undefined && {
        label: "Surface gas, plant liquids",
        value: liquids,
        unit: "gal/Mscf",
        note: `Flashed by ${equationWords(equationOfState)}: ${gas.plantLiquids
          .filter(({ gallonsPerMscf }) => gallonsPerMscf > 0)
          .map(({ name, gallonsPerMscf }) => `${name} ${formatFigure(gallonsPerMscf)}`)
          .join(", ")}`,
      },
  ].filter((row) => row !== null && row !== undefined && row !== false);
  return (
    <table className="ledger-table facts-table">
      <caption className="sr-only">What follows from the composition</caption>
      <tbody>
        {rows.map(({ label, value, unit, note, digits }) => (
          <tr key={label}>
            <th scope="row" className="plain wrap">
              {label} {unit && <Unit>{unit}</Unit>}
              {note && <small>{note}</small>}
            </th>
            <td className="right">
              <Figure value={value} digits={digits} />
            </td>
          </tr>
        ))}
      </tbody>
    </table>
  );
}
