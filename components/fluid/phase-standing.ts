import type { EquationOfStateResponse } from "@/app/api/v1/calculations/fluid-schema";
import { formatFigure } from "@/components/ui/format";
import { psia } from "./words";

/** What speaks against the dew point of a gas condensate. */
export interface PhaseStanding {
  readonly kind: "dryGas" | "aboveCricondentherm" | "oil";
  /** the finding with its figure, for headings */
  readonly heading: string;
  /** type of fluid, in a word or two */
  readonly type: string;
  /** what to look at, for the field that decides */
  readonly advice: string;
}

/**
 * Whether the equation of state gives the fluid a dew point at this temperature, and if not, what it is.
 *
 * @returns  `null` for a fluid with a dew point
 */
export function phaseStanding(
  {
    saturation,
    envelope,
    train,
  }: Pick<EquationOfStateResponse, "saturation" | "envelope" | "train">,
  temperatureDegF: number,
): PhaseStanding | null {
  if (saturation.kind === "dewPoint") return null;
  if (saturation.kind === "bubblePoint") {
    const heading = `This is an oil at reservoir temperature (bubble point ${psia(saturation.upperPsia)} psia)`;
    return {
      kind: "oil",
      heading:
        saturation.measuredPsia === null
          ? heading
          : `By the equation of state t${heading.slice(1)}`,
      type: "Oil at reservoir temperature",
      advice: `By the equation of state this is an oil at ${formatFigure(temperatureDegF)} °F. Look at the heptanes plus and at the temperature.`,
    };
  }
  const limit = envelope.cricondentherm;
  const at = `${formatFigure(temperatureDegF)} °F`;
  const advice = limit
    ? `The computed cricondentherm is ${formatFigure(limit.temperatureDegF)} °F: at ${at} no liquid drops out. Look at the temperature.`
    : `At ${at} no liquid drops out. Look at the temperature.`;
  if (train === null) {
    return { kind: "dryGas", heading: "Dry gas: no liquid drops out", type: "Dry gas", advice };
  }
  return {
    kind: "aboveCricondentherm",
    heading: limit
      ? `No dew point at ${at}: the computed cricondentherm is ${formatFigure(limit.temperatureDegF)} °F`
      : `No dew point at ${at}: no liquid drops out`,
    type: "Gas without a dew point",
    advice,
  };
}
