/**
 * A composition sheet as it stands in its fields: text by the place of each figure in the sheet (`stream.light.C1`),
 * beside the sheet that it reads as. What the server says about a figure lands at its field by the same place.
 */
import {
  compositionSheetSchema,
  lightComponents,
  type CompositionSheet,
  type ReportedStream,
} from "@/analytics/composition/composition-schema";
import {
  readPlain,
  readQuantity,
  typedFigure,
  type FieldReading,
} from "@/components/estimate/quantities-of-inputs";
import type { Cells } from "./grid-paste";

export const streamNames = ["stream", "gas", "liquid"] as const;
export type StreamName = (typeof streamNames)[number];

export interface CompositionText {
  kind: CompositionSheet["kind"];
  /** first carbon number of each stream's plus fraction */
  plusFrom: Readonly<Record<StreamName, number>>;
  cells: Cells;
}

export interface CompositionReading {
  fields: Readonly<Record<string, FieldReading>>;
  /** `null` while something is missing or cannot be read */
  sheet: CompositionSheet | null;
  /** places to fill in */
  incomplete: readonly string[];
  /** mole per cent as typed, of each stream that the sheet has */
  totals: Readonly<Partial<Record<StreamName, number>>>;
  isEmpty: boolean;
}

export const streamLabels: Record<StreamName, string> = {
  stream: "Wellstream",
  gas: "Separator gas",
  liquid: "Separator liquid",
};

export const streamsOf = ({ kind }: Pick<CompositionText, "kind">): readonly StreamName[] =>
  kind === "wellstream" ? ["stream"] : ["gas", "liquid"];

/** Condition fields of a sheet of separator streams, with their labels. */
export const streamConditions = {
  gasLiquidRatioScfPerSeparatorBarrel: {
    label: "Gas per barrel of separator liquid",
    unit: "scf/bbl",
  },
  liquidDensityLbPerCubicFoot: { label: "Density of the separator liquid", unit: "lb/cf" },
  basePressurePsia: { label: "Base of the gas volume, at 60 °F", unit: "psia" },
} as const;
export type StreamCondition = keyof typeof streamConditions;
export const streamConditionNames = Object.keys(streamConditions) as StreamCondition[];

export const emptyComposition = (): CompositionText => ({
  kind: "wellstream",
  plusFrom: { stream: 7, gas: 7, liquid: 7 },
  cells: { basePressurePsia: "14.696" },
});

const written = (value: number | null | undefined) =>
  value === null || value === undefined ? "" : typedFigure(value);

/** Cells of a stored stream under a prefix such as `stream` or `rows.2.producedGas`. */
export function cellsOfStream(prefix: string, stream: ReportedStream): Cells {
  const { light, carbonNumbers, plus } = stream;
  return {
    ...Object.fromEntries(
      lightComponents.map((name) => [`${prefix}.light.${name}`, written(light[name])]),
    ),
    ...Object.fromEntries(
      carbonNumbers.map(({ carbonNumber, molePercent }) => [
        `${prefix}.carbonNumbers.${carbonNumber}`,
        written(molePercent),
      ]),
    ),
    [`${prefix}.plus.molePercent`]: written(plus?.molePercent),
    [`${prefix}.plus.molecularWeight`]: written(plus?.molecularWeight),
    [`${prefix}.plus.specificGravity`]: written(plus?.specificGravity),
  };
}

/** First carbon number of a stored stream's plus fraction. */
export const plusFromOf = ({ plus, carbonNumbers }: ReportedStream): number =>
  plus?.carbonNumber ?? (carbonNumbers.at(-1)?.carbonNumber ?? 6) + 1;

/** Text of a stored sheet. Reading it back gives the same sheet. */
export function textOfComposition(sheet: CompositionSheet): CompositionText {
  const empty = emptyComposition();
  if (sheet.kind === "wellstream") {
    return {
      kind: sheet.kind,
      plusFrom: { ...empty.plusFrom, stream: plusFromOf(sheet.stream) },
      cells: { ...empty.cells, ...cellsOfStream("stream", sheet.stream) },
    };
  }
  return {
    kind: sheet.kind,
    plusFrom: {
      ...empty.plusFrom,
      gas: plusFromOf(sheet.gas),
      liquid: plusFromOf(sheet.liquid),
    },
    cells: {
      ...cellsOfStream("gas", sheet.gas),
      ...cellsOfStream("liquid", sheet.liquid),
      ...Object.fromEntries(streamConditionNames.map((name) => [name, written(sheet[name])])),
    },
  };
}

/** Places of a stream's mole per cent, from H2S to the plus fraction. */
export function streamPlaces(prefix: string, plusFrom: number) {
  return [
    ...lightComponents.map((name) => ({
      symbol: name as string,
      place: `${prefix}.light.${name}`,
    })),
    ...Array.from({ length: plusFrom - 7 }, (_, index) => ({
      symbol: `C${index + 7}`,
      place: `${prefix}.carbonNumbers.${index + 7}`,
    })),
    { symbol: `C${plusFrom}+`, place: `${prefix}.plus.molePercent` },
  ];
}

const NOTHING: FieldReading = { value: null, preview: null, problem: null };

/** Mole per cent, 0 to 100: "5.4", "5.4 %", "0.054*100". */
export function readMolePercent(text: string): FieldReading {
  const reading = readQuantity(text, "fraction", "%", "%");
  if (reading.value === null) return reading;
  const value = Number((reading.value * 100).toPrecision(12));
  return value > 100
    ? { ...NOTHING, problem: "A share cannot be more than 100 %." }
    : { ...reading, value };
}

/** A quantity that must be above zero where it is given. */
export function aboveZero(reading: FieldReading, noun: string): FieldReading {
  return reading.value !== null && reading.value <= 0
    ? { ...NOTHING, problem: `${noun} must be above zero.` }
    : reading;
}

const plusWords = (plusFrom: number) => (plusFrom === 7 ? "Heptanes plus" : `C${plusFrom}+`);

/** A stream's fields, and the stream they read as. */
export function readStreamCells(prefix: string, plusFrom: number, cells: Cells) {
  const text = (place: string) => cells[place] ?? "";
  const places = streamPlaces(prefix, plusFrom);
  const fields: Record<string, FieldReading> = Object.fromEntries(
    places.map(({ place }) => [place, readMolePercent(text(place))]),
  );
  const weight = `${prefix}.plus.molecularWeight`;
  const gravity = `${prefix}.plus.specificGravity`;
  fields[weight] = aboveZero(
    readQuantity(text(weight), "molecularWeight", "lb/lbmol"),
    "A molecular weight",
  );
  fields[gravity] = aboveZero(readPlain(text(gravity)), "A specific gravity");

  const value = (place: string) => fields[place].value;
  const share = value(`${prefix}.plus.molePercent`) ?? 0;
  const incomplete = share > 0 ? [weight, gravity].filter((place) => text(place) === "") : [];
  for (const place of incomplete) {
    const property = place === weight ? "molecular weight" : "specific gravity";
    fields[place] = { ...NOTHING, problem: `${plusWords(plusFrom)} needs its ${property}.` };
  }
  const isEmpty = Object.keys(fields).every((place) => text(place) === "");
  const total = places.reduce((sum, { place }) => sum + (value(place) ?? 0), 0);
  const isReadable =
    Object.values(fields).every(({ problem }) => problem === null) && incomplete.length === 0;
  const stream: ReportedStream | null =
    isReadable && !isEmpty
      ? {
          light: Object.fromEntries(
            lightComponents.flatMap((name) => {
              const figure = value(`${prefix}.light.${name}`);
              return figure === null ? [] : [[name, figure]];
            }),
          ),
          carbonNumbers: Array.from({ length: plusFrom - 7 }, (_, index) => ({
            carbonNumber: index + 7,
            molePercent: value(`${prefix}.carbonNumbers.${index + 7}`) ?? 0,
          })),
          plus:
            value(weight) !== null && value(gravity) !== null
              ? {
                  carbonNumber: plusFrom,
                  molePercent: share,
                  molecularWeight: value(weight) ?? 0,
                  specificGravity: value(gravity) ?? 0,
                }
              : null,
        }
      : null;
  return { fields, stream, incomplete, isEmpty, total: Number(total.toPrecision(12)) };
}

/** Sums that the engine takes, mole per cent. */
const POSSIBLE_TOTAL = [95, 105] as const;

/** What is wrong with the sum of a stream's figures as they stand; `null` for one that can be worked with. */
export function totalProblem(
  name: StreamName,
  { fields, totals }: Pick<CompositionReading, "fields" | "totals">,
): string | null {
  const isShare = (place: string) =>
    place.startsWith(`${name}.`) && !/\.plus\.(molecularWeight|specificGravity)$/.test(place);
  const unread = Object.entries(fields).filter(
    ([place, { problem }]) => isShare(place) && problem !== null,
  ).length;
  if (unread > 0) {
    return unread === 1
      ? "One figure cannot be read; the sum leaves it out."
      : `${unread} figures cannot be read; the sum leaves them out.`;
  }
  const total = totals[name] ?? 0;
  const [least, most] = POSSIBLE_TOTAL;
  if (total >= least && total <= most) return null;
  return total < least
    ? `A sheet adds up to 100 %. Below ${least} % something is missing, and nothing is worked out.`
    : `A sheet adds up to 100 %. Above ${most} % something is counted twice, and nothing is worked out.`;
}

function readCondition(name: StreamCondition, text: string): FieldReading {
  const { label, unit } = streamConditions[name];
  const reading =
    name === "basePressurePsia"
      ? readQuantity(text, "pressure", unit)
      : name === "gasLiquidRatioScfPerSeparatorBarrel"
        ? readQuantity(text, "gasOilRatio", unit)
        : readPlain(text);
  return aboveZero(reading, label);
}

/** Reads every field, and all of them as a sheet. */
export function readCompositionText(text: CompositionText): CompositionReading {
  const names = streamsOf(text);
  const streams = names.map((name) => ({
    name,
    ...readStreamCells(name, text.plusFrom[name], text.cells),
  }));
  const conditions: Record<string, FieldReading> =
    text.kind === "wellstream"
      ? {}
      : Object.fromEntries(
          streamConditionNames.map((name) => [name, readCondition(name, text.cells[name] ?? "")]),
        );
  const incomplete = [
    ...streams.flatMap(({ name, isEmpty, incomplete: places }) =>
      isEmpty ? [`${name}.light.C1`] : places,
    ),
    ...Object.keys(conditions).filter((name) => (text.cells[name] ?? "") === ""),
  ];
  const candidate =
    text.kind === "wellstream"
      ? { kind: text.kind, stream: streams[0].stream }
      : {
          kind: text.kind,
          gas: streams[0].stream,
          liquid: streams[1].stream,
          ...Object.fromEntries(
            Object.entries(conditions).map(([name, { value }]) => [name, value]),
          ),
        };
  const parsed = compositionSheetSchema.safeParse(candidate);
  return {
    fields: Object.assign({}, conditions, ...streams.map(({ fields }) => fields)) as Record<
      string,
      FieldReading
    >,
    sheet: incomplete.length === 0 && parsed.success ? parsed.data : null,
    incomplete,
    totals: Object.fromEntries(streams.map(({ name, total }) => [name, total])),
    isEmpty: streams.every(({ isEmpty }) => isEmpty),
  };
}

/**
 * `#/sheet/stream/carbonNumbers/2/molePercent` -> `stream.carbonNumbers.9`: the place that the server means.
 *
 * @param under  the request's own name of the sheet; a pointer may leave it out
 */
export function placeOfPointer(pointer: string, under: string): string {
  const parts = pointer.replace(/^#?\//, "").split("/");
  return parts
    .slice(parts[0] === under ? 1 : 0)
    .join(".")
    .replace(
      /carbonNumbers\.(\d+)(\.\w+)?$/,
      (_, index: string) => `carbonNumbers.${Number(index) + 7}`,
    );
}
