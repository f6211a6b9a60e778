import {
  separatorStagesSchema,
  type SeparatorStage,
} from "@/analytics/composition/composition-schema";
import type { SeparatorTest } from "@/analytics/fluid/separator-test-schema";
import {
  readQuantity,
  typedFigure,
  type FieldReading,
} from "@/components/estimate/quantities-of-inputs";
import { aboveZero } from "./composition-text";
import type { Cells } from "./grid-paste";

/** The separators that streams are flashed through, as typed; the last one is the stock tank. */
export interface StagesText {
  count: number;
  cells: Cells;
}

export interface StagesReading {
  fields: Readonly<Record<string, FieldReading>>;
  stages: SeparatorStage[] | null;
  incomplete: readonly string[];
}

export const MOST_STAGES = 6;
const TANK: SeparatorStage = { pressurePsia: 14.696, temperatureDegF: 60 };

export function textOfStages(stages: readonly SeparatorStage[]): StagesText {
  return {
    count: stages.length,
    cells: Object.fromEntries(
      stages.flatMap(({ pressurePsia, temperatureDegF }, index) => [
        [`${index}.pressurePsia`, typedFigure(pressurePsia)],
        [`${index}.temperatureDegF`, typedFigure(temperatureDegF)],
      ]),
    ),
  };
}

/** A two-stage train for a fluid whose separators nobody has given; common practice, no source. */
export const usualStages: readonly SeparatorStage[] = [
  { pressurePsia: 500, temperatureDegF: 80 },
  TANK,
];

/** Two separators to fill in, and a stock tank at standard conditions. */
export const emptyStages = (): StagesText => ({
  count: 3,
  cells: { "2.pressurePsia": "14.696", "2.temperatureDegF": "60" },
});

/** Another number of stages: separators come and go before the tank, which stays the last. */
export function withStageCount(text: StagesText, count: number): StagesText {
  const row = (cells: Cells, index: number) => ({
    pressurePsia: cells[`${index}.pressurePsia`] ?? "",
    temperatureDegF: cells[`${index}.temperatureDegF`] ?? "",
  });
  const rows = Array.from({ length: text.count }, (_, index) => row(text.cells, index));
  const tank = rows[rows.length - 1];
  const separators = Array.from(
    { length: count - 1 },
    (_, index) => rows.slice(0, -1)[index] ?? { pressurePsia: "", temperatureDegF: "" },
  );
  return {
    count,
    cells: Object.fromEntries(
      [...separators, tank].flatMap(({ pressurePsia, temperatureDegF }, index) => [
        [`${index}.pressurePsia`, pressurePsia],
        [`${index}.temperatureDegF`, temperatureDegF],
      ]),
    ),
  };
}

export function readStages({ count, cells }: StagesText): StagesReading {
  const places = Array.from({ length: count }, (_, index) => [
    `${index}.pressurePsia`,
    `${index}.temperatureDegF`,
  ]).flat();
  const fields = Object.fromEntries(
    places.map((place) => [
      place,
      place.endsWith("Psia")
        ? aboveZero(readQuantity(cells[place] ?? "", "pressure", "psia"), "A pressure")
        : readQuantity(cells[place] ?? "", "temperature", "°F"),
    ]),
  );
  const incomplete = places.filter((place) => (cells[place] ?? "").trim() === "");
  const stages = separatorStagesSchema.safeParse(
    Array.from({ length: count }, (_, index) => ({
      pressurePsia: fields[`${index}.pressurePsia`].value,
      temperatureDegF: fields[`${index}.temperatureDegF`].value,
    })),
  );
  return { fields, incomplete, stages: stages.success ? stages.data : null };
}

/** Separators of the separator test, with the stock tank at standard conditions. */
export const stagesOfTest = (test: SeparatorTest): SeparatorStage[] =>
  [test.primarySeparator, test.secondSeparator]
    .filter((stage) => stage !== null)
    .map(({ pressurePsia, temperatureDegF }) => ({ pressurePsia, temperatureDegF }))
    .concat(TANK);
