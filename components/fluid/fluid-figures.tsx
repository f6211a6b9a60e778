import type {
  CompositionResponse,
  EquationOfStateResponse,
} from "@/app/api/v1/calculations/fluid-schema";
import type { WellstreamResponse } from "@/app/api/v1/calculations/schema";
import { fluidTypeLabels } from "@/analytics/fluid/fluid-type";
import { Figure } from "@/components/ui/figure";
import { formatFigure, MISSING } from "@/components/ui/format";
import { Unit } from "@/components/ui/text";
import type { AvailableCurve } from "./available-curves";
import { mostLiquid } from "./curve-reading";
import { phaseStanding } from "./phase-standing";
import { psia } from "./words";

export interface FluidFiguresProps {
  wellstream: WellstreamResponse | null;
  composition: CompositionResponse | null;
  equationOfState: EquationOfStateResponse | null;
  curve: AvailableCurve | null;
  measuredDewPointPsia: number | null;
  temperatureDegF: number | null;
  initialPressurePsia: number | null;
  /** the separator test is no measurement but a flash of the composition */
  isComputed: boolean;
}

/** "untuned equation of state": the mark of every figure that it gives. */
export const equationWords = (result: Pick<EquationOfStateResponse, "isTuned"> | null) =>
  `${result?.isTuned ? "tuned" : "untuned"} equation of state`;

/** Where a separator test comes from, for sources. */
export const testWords = (
  isComputed: boolean,
  result: Pick<EquationOfStateResponse, "isTuned"> | null,
) => (isComputed ? `flash of the composition, ${equationWords(result)}` : "separator test");

/** One place decides a fluid's type: the composition where there is one, which takes the gas-oil ratio into account. */
export function fluidTypeOf(
  wellstream: WellstreamResponse | null,
  composition: CompositionResponse | null,
): { label: string; short: string; rule: string } | null {
  if (composition) {
    const { label, rule, source } = composition.fluidType;
    return { label, short: `by ${rule.split(/: |; |\. /)[0]}`, rule: `${rule}; ${source}` };
  }
  if (!wellstream) return null;
  const ratio = `by ${formatFigure(wellstream.surfaceGasOilRatioScfPerStb, { digits: 4 })} scf/STB`;
  return { label: fluidTypeLabels[wellstream.fluidType], short: ratio, rule: "" };
}

/** The dew point to go by, and where it comes from: measured, computed, or estimated from the composition. */
export function dewPointOf({
  composition,
  equationOfState,
  measuredDewPointPsia,
}: Pick<FluidFiguresProps, "composition" | "equationOfState" | "measuredDewPointPsia">) {
  if (measuredDewPointPsia !== null) {
    return { pressurePsia: measuredDewPointPsia, source: "measured" };
  }
  const saturation = equationOfState?.saturation;
  if (saturation?.upperPsia && saturation.kind === "dewPoint") {
    return {
      pressurePsia: saturation.upperPsia,
      source: equationWords(equationOfState),
    };
  }
  const estimate = composition?.dewPointEstimates[0];
  // An equation of state without a dew point says more than a correlation that knows nothing else.
  if (!estimate || saturation) return null;
  return {
    pressurePsia: estimate.dewPointPsia,
    source: `${estimate.label}, ± ${formatFigure(estimate.statedErrorFraction * 100, { digits: 2 })} %`,
  };
}

/** The figures a fluid is known by, large: those that exist. */
export function FluidFigures(props: FluidFiguresProps) {
  const { wellstream, composition, curve, temperatureDegF, initialPressurePsia, isComputed } =
    props;
  const equation = equationWords(props.equationOfState);
  const fluidType = fluidTypeOf(wellstream, composition);
  const train = props.equationOfState?.train ?? null;
  const dewPoint = dewPointOf(props);
  const standing =
    props.equationOfState && temperatureDegF !== null
      ? phaseStanding(props.equationOfState, temperatureDegF)
      : null;
  const most = curve && mostLiquid(curve.curve);
  const gravity = wellstream?.wellstreamGravity ?? composition?.gravity ?? null;
  const surfaceShare = wellstream?.dryGasFraction ?? null;
  const margin =
    dewPoint && initialPressurePsia !== null ? initialPressurePsia - dewPoint.pressurePsia : null;
  const figures = [
    {
      name: "Condensate yield",
      value: wellstream?.condensateYieldStbPerMmscf ?? train?.condensateYieldStbPerMmscf ?? null,
      unit: "STB/MMscf surface gas",
      note: wellstream
        ? `${formatFigure(wellstream.condensateYieldStbPerMmscfWellstream)} per MMscf of wellstream${isComputed ? `; ${testWords(true, props.equationOfState)}` : train ? `; ${formatFigure(train.condensateYieldStbPerMmscf)} by ${equation}` : ""}`
        : train
          ? equation
          : "needs a separator test",
    },
    {
      name:
        temperatureDegF === null ? "Dew point" : `Dew point at ${formatFigure(temperatureDegF)} °F`,
      value: dewPoint?.pressurePsia ?? null,
      unit: dewPoint ? "psia" : "",
      digits: 4,
      note: dewPoint
        ? [
            dewPoint.source,
            standing && "the equation of state gives none",
            margin !== null &&
              `${formatFigure(Math.abs(margin))} psi ${margin >= 0 ? "below" : "above"} initial`,
          ]
            .filter(Boolean)
            .join("; ")
        : (standing?.heading ?? "not measured"),
    },
    {
      name: "Most liquid in the pores",
      value: most && most.liquidSaturation * 100,
      unit: most ? "%" : "",
      note: most
        ? `of hydrocarbon pore space, at ${psia(most.pressurePsia)} psia; ${curve?.label.toLowerCase()}`
        : "needs a composition or a depletion table",
    },
    {
      name: "Wellstream gravity",
      value: gravity,
      unit: "air = 1",
      note:
        wellstream && composition
          ? `${formatFigure(composition.gravity)} from composition`
          : composition
            ? "from composition"
            : `from the ${testWords(isComputed, props.equationOfState)}`,
    },
    {
      name: "Surface gas fraction",
      value: surfaceShare,
      unit: "",
      note: `of the wellstream, by mole${isComputed && wellstream ? `; ${equation}` : ""}`,
    },
    {
      name: "Fluid type",
      text: (dewPoint === null ? standing?.type : undefined) ?? fluidType?.label ?? MISSING,
      note: fluidType?.short ?? "",
    },
  ];
  return (
    <dl className="key-figures">
      {figures.map(({ name, value, text, unit, note, digits }) => (
        <div key={name}>
          <dt>{name}</dt>
          <dd data-words={text === undefined ? undefined : ""}>
            {text ??
              (value === null || value === undefined ? (
                MISSING
              ) : (
                <Figure value={value} digits={digits} />
              ))}{" "}
            {unit && <Unit>{unit}</Unit>}
          </dd>
          <dd>{note}</dd>
        </div>
      ))}
    </dl>
  );
}
