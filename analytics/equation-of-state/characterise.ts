/** From a stream to the components of the equation of state. */
import { lightConstants } from "../composition/components";
import { heavyComponents } from "../composition/heptanes-plus";
import type { HeptanesPlus, Stream, StreamComponent } from "../composition/stream";
import { DomainError } from "../errors";
import type { Warning } from "../warnings";
import { binaryInteraction, type Interacting } from "./binary-interactions";
import { tunableNames, type Adjustments, type Characterisation } from "./characterisation-schema";
import { boilingPointDegR, keslerLee, twu } from "./heavy-fractions";
import { gammaSplit, lumpMeasured } from "./heavy-split";
import type { Characterised } from "./mixture";
import { volumeShiftAtSixtyDegF } from "./volume-shift";

interface Component {
  readonly name: string;
  readonly moleFraction: number;
  readonly criticalTemperatureDegR: number;
  readonly criticalPressurePsia: number;
  readonly acentricFactor: number;
  readonly molecularWeight: number;
  readonly volumeShift: number;
  readonly interacting: Interacting;
}

/**
 * Heptanes plus as the fractions that a characterisation makes of it. `single` keeps one. `gamma` splits the whole by
 * the gamma distribution; where an extended analysis reported it number by number, what was measured is lumped instead,
 * and the distribution is not needed.
 *
 * @returns  empty for a gas without heptanes plus
 * @throws {DomainError | ConvergenceError} as `gammaSplit`
 */
export function heavyFractions(
  stream: Stream,
  { split }: Pick<Characterisation, "split">,
): HeptanesPlus[] {
  if (!stream.heptanesPlus) return [];
  if (split.kind === "single") return [stream.heptanesPlus];
  const measured = heavyComponents(stream.components);
  return measured.length > 1
    ? lumpMeasured(measured, split.fractions)
    : gammaSplit(stream.heptanesPlus, split.fractions, split.shape);
}

/**
 * A stream as a mixture of Peng-Robinson. Light components keep their constants. Each fraction of heptanes plus gets
 * its boiling point by Soreide, critical properties by Kesler and Lee or by Twu, each times its adjustment, and the
 * volume shift that gives its specific gravity at 60 degF with those, times its adjustment.
 *
 * Untuned, the dew point of a gas condensate is good to some hundreds of psi and its liquid drop-out to some points of
 * volume; it is not a prediction until it has been compared with a laboratory.
 *
 * @throws {DomainError} when an adjustment is not above zero, or heptanes plus cannot be split as asked
 * @throws {ConvergenceError} as `gammaSplit` and `volumeShiftAtSixtyDegF`
 * @example characterise(stream, { split: { kind: "single" }, criticals: "keslerLee", adjustments: untouched })
 *   .mixture.names // => ["CO2", "N2", "C1", …, "C7+"]
 * @see D. Y. Peng, D. B. Robinson, Ind. Eng. Chem. Fundam. 15 (1976) 59-64; C. H. Whitson, M. R. Brule, Phase Behavior,
 *   SPE Monograph 20 (2000), ch. 4 and 5
 */
export function characterise(stream: Stream, characterisation: Characterisation): Characterised {
  const { adjustments } = characterisation;
  assertAdjustments(adjustments);
  const light = stream.components.flatMap(({ light: name, moleFraction }): Component[] =>
    name
      ? [
          {
            name,
            moleFraction,
            ...lightConstants[name],
            interacting: { light: name, specificGravity: null },
          },
        ]
      : [],
  );
  const fractions = heavyFractions(stream, characterisation);
  const components = [
    ...light,
    ...fractions.map((fraction, index) =>
      heavyComponent(fraction, heavyName(index, fractions.length), characterisation),
    ),
  ];
  const n = components.length;
  const interactions = new Float64Array(n * n);
  components.forEach(({ interacting: a }, i) => {
    components.forEach(({ interacting: b }, j) => {
      interactions[i * n + j] =
        i === j ? 0 : binaryInteraction(a, b, adjustments.methaneHeavyInteractionFactor);
    });
  });
  const column = (key: Exclude<keyof Component, "name" | "interacting">) =>
    Float64Array.from(components, (component) => component[key]);
  return {
    mixture: {
      names: components.map(({ name }) => name),
      criticalTemperatureDegR: column("criticalTemperatureDegR"),
      criticalPressurePsia: column("criticalPressurePsia"),
      acentricFactor: column("acentricFactor"),
      molecularWeight: column("molecularWeight"),
      volumeShift: column("volumeShift"),
      interactions,
    },
    moleFractions: column("moleFraction"),
    firstHeavy: light.length,
  };
}

/**
 * Gas or liquid of a flash with its components named again, for what works on compositions: heating values, plant
 * liquids, tables.
 *
 * @param moleFractions  in the order of the mixture that `characterise` made of the same stream
 * @throws {DomainError} when there are more or fewer of them than components
 * @example heatingValue(namedComponents(stream, characterisation, train.surfaceGasMoleFractions))
 */
export function namedComponents(
  stream: Stream,
  characterisation: Pick<Characterisation, "split">,
  moleFractions: ArrayLike<number>,
): StreamComponent[] {
  const light = stream.components.filter((component) => component.light !== null);
  const fractions = heavyFractions(stream, characterisation);
  if (moleFractions.length !== light.length + fractions.length) {
    throw new DomainError(
      `${moleFractions.length} mole fractions do not belong to ${light.length + fractions.length} components`,
      { input: "moleFractions", value: moleFractions.length },
    );
  }
  return [
    ...light.map((component, index) => ({ ...component, moleFraction: moleFractions[index] })),
    ...fractions.map(({ molecularWeight, specificGravity }, index) => ({
      name: heavyName(index, fractions.length),
      light: null,
      carbonNumber: 7,
      moleFraction: moleFractions[light.length + index],
      molecularWeight,
      specificGravity,
    })),
  ];
}

const heavyName = (index: number, count: number) => (count === 1 ? "C7+" : `F${index + 1}`);

function assertAdjustments(adjustments: Adjustments): void {
  for (const name of tunableNames) {
    const value = adjustments[name];
    // an interaction or a shift may be tuned to nothing or change its sign; a critical property may not
    const signed = name === "methaneHeavyInteractionFactor" || name === "heavyVolumeShiftFactor";
    if (!(Math.abs(value) <= 10 && (signed || value >= 0.1))) {
      throw new DomainError(
        `An adjustment of ${value} is no factor on a property of heptanes plus: ` +
          (signed ? "it lies between -10 and 10" : "it lies between 0.1 and 10"),
        { input: `characterisation.adjustments.${name}`, value },
      );
    }
  }
}

function heavyComponent(
  { moleFraction, molecularWeight, specificGravity }: HeptanesPlus,
  name: string,
  { criticals, adjustments }: Characterisation,
): Component {
  const boilingPoint = boilingPointDegR(molecularWeight, specificGravity);
  const own = (criticals === "twu" ? twu : keslerLee)(boilingPoint, specificGravity);
  const adjusted = {
    criticalTemperatureDegR:
      own.criticalTemperatureDegR * adjustments.heavyCriticalTemperatureFactor,
    criticalPressurePsia: own.criticalPressurePsia * adjustments.heavyCriticalPressureFactor,
    acentricFactor: own.acentricFactor * adjustments.heavyAcentricFactorFactor,
  };
  return {
    name,
    moleFraction,
    ...adjusted,
    molecularWeight,
    volumeShift:
      volumeShiftAtSixtyDegF(adjusted, molecularWeight, specificGravity) *
      adjustments.heavyVolumeShiftFactor,
    interacting: { light: null, specificGravity },
  };
}

/**
 * Questions that a characterisation raises: a split that an extended analysis makes unnecessary, or fractions beyond the
 * range of the correlations.
 */
export function characterisationWarnings(
  stream: Stream,
  characterisation: Characterisation,
): Warning[] {
  const fractions = heavyFractions(stream, characterisation);
  const warnings: Warning[] = [];
  const heaviest = fractions.at(-1);
  if (heaviest && heaviest.molecularWeight > 700) {
    warnings.push({
      code: "heavy_fraction_outside_range",
      severity: "warning",
      input: "characterisation.split",
      message:
        `The heaviest fraction has a molecular weight of ${Math.round(heaviest.molecularWeight)}; the correlations for ` +
        "critical properties end near 700. Split heptanes plus into fewer fractions.",
    });
  }
  const extended = heavyComponents(stream.components).length > 1;
  if (extended && characterisation.split.kind === "gamma") {
    warnings.push({
      code: "measured_distribution_used",
      severity: "warning",
      input: "characterisation.split",
      message:
        "The analysis reports heptanes plus by carbon number, so what was measured is lumped; the gamma distribution " +
        "and its shape are not used.",
    });
  }
  return warnings;
}
