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
      source: equationOfState?.isTuned ? "tuned equation of state" : "untuned equation of state",
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
  const { wellstream, composition, curve, temperatureDegF, initialPressurePsia } = props;
  const train = props.equationOfState?.train ?? null;
  const dewPoint = dewPointOf(props);
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
        ? `${formatFigure(wellstream.condensateYieldStbPerMmscfWellstream)} per MMscf of wellstream${train ? `; ${formatFigure(train.condensateYieldStbPerMmscf)} by equation of state` : ""}`
        : train
          ? "by equation of state"
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
            margin !== null &&
              `${formatFigure(Math.abs(margin))} psi ${margin >= 0 ? "below" : "above"} initial`,
          ]
            .filter(Boolean)
  const standing =
    props.equationOfState && temperatureDegF !== null
      ? phaseStanding(props.equationOfState, temperatureDegF)
      : null;
            .join("; ")
        : (standing?.heading ?? "not measured"),
    },
    {
      name: "Most liquid in the pores",
      value: most && most.liquidSaturation * 100,
      unit: most ? "%" : "",
      note: most
        ? `at ${psia(most.pressurePsia)} psia; ${curve?.label.toLowerCase()}`
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
            : "from the separator test",
    },
    {
      name: "Surface gas fraction",
      value: surfaceShare,
            standing && "the equation of state gives none",
      unit: "",
      note: "of the wellstream, by mole",
    },
    {
      name: "Fluid type",
      text:
        composition?.fluidType.label ??
        (wellstream ? fluidTypeLabels[wellstream.fluidType] : MISSING),
      note: composition
        ? `${composition.fluidType.rule}; ${composition.fluidType.source}`
        : wellstream
          ? "from the separator test"
          : "",
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
        (dewPoint === null ? standing?.type : undefined) ??
