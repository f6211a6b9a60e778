import type { NearWellRequest } from "@/app/api/v1/calculations/recovery-schema";
import {
  readPlain,
  readQuantity,
  typedFigure,
  type FieldReading,
} from "@/components/estimate/quantities-of-inputs";

export const nearWellFields = [
  "reservoirPressurePsia",
  "flowingPressurePsia",
  "gasExponent",
  "condensateExponent",
  "criticalCondensateSaturation",
  "residualGasSaturation",
] as const;
export type NearWellField = (typeof nearWellFields)[number];
export type NearWellText = Record<NearWellField, string>;

/**
 * Corey exponents and end points to start from, and a drawdown to half of the pressure: common practice, no source.
 *
 * @param dewPointPsia  liquid begins to matter below it
 * @param initialPsia   of the reservoir
 */
export function startingNearWell(dewPointPsia: number, initialPsia: number): NearWellText {
  const reservoir = Math.round(Math.min(dewPointPsia, initialPsia) / 10) * 10;
  return {
    reservoirPressurePsia: typedFigure(reservoir),
    flowingPressurePsia: typedFigure(Math.round(reservoir / 20) * 10),
    gasExponent: "2.5",
    condensateExponent: "3",
    criticalCondensateSaturation: "0.15",
    residualGasSaturation: "0.15",
  };
}

const ends: Record<NearWellField, readonly [number, number]> = {
  reservoirPressurePsia: [15, 25_000],
  flowingPressurePsia: [15, 25_000],
  gasExponent: [1, 6],
  condensateExponent: [1, 6],
  criticalCondensateSaturation: [0, 0.8],
  residualGasSaturation: [0, 0.5],
};

/** What the fields read as, and the question they make; `null` while one is missing or cannot be. */
export function readNearWell(text: NearWellText): {
  fields: Record<NearWellField, FieldReading>;
  asked: Pick<
    NearWellRequest,
    "reservoirPressurePsia" | "flowingPressurePsia" | "relativePermeability"
  > | null;
} {
  const fields = Object.fromEntries(
    nearWellFields.map((name) => [name, readOne(name, text[name])]),
  ) as Record<NearWellField, FieldReading>;
  const { reservoirPressurePsia: reservoir, flowingPressurePsia: flowing } = fields;
  if (reservoir.value !== null && flowing.value !== null && flowing.value >= reservoir.value) {
    const problem = "The flowing pressure has to be below the reservoir's.";
    fields.flowingPressurePsia = { ...flowing, problem };
  }
  const values = Object.values(fields);
  if (values.some(({ value, problem }) => value === null || problem !== null)) {
    return { fields, asked: null };
  }
  const value = (name: NearWellField) => fields[name].value as number;
  return {
    fields,
    asked: {
      reservoirPressurePsia: value("reservoirPressurePsia"),
      flowingPressurePsia: value("flowingPressurePsia"),
      relativePermeability: {
        gasExponent: value("gasExponent"),
        condensateExponent: value("condensateExponent"),
        criticalCondensateSaturation: value("criticalCondensateSaturation"),
        residualGasSaturation: value("residualGasSaturation"),
      },
    },
  };
}

function readOne(name: NearWellField, text: string): FieldReading {
  const reading = name.endsWith("Psia")
    ? readQuantity(text, "pressure", "psia")
    : name.endsWith("Saturation")
      ? readQuantity(text, "fraction", "")
      : readPlain(text);
  const [low, high] = ends[name];
  const { value, problem } = reading;
  if (value === null || problem !== null || (value >= low && value <= high)) return reading;
  const range = `${low.toLocaleString("en-US")} to ${high.toLocaleString("en-US")}`;
  return { ...reading, problem: `It has to be from ${range}.` };
}
