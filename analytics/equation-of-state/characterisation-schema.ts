import { z } from "zod";

/**
 * How heptanes plus becomes components of the equation of state. `single` keeps it whole; `gamma` splits it by the
 * three-parameter gamma distribution into `fractions` pseudocomponents.
 */
export const heavySplitSchema = z.discriminatedUnion("kind", [
  z.object({ kind: z.literal("single") }).strict(),
  z
    .object({
      kind: z.literal("gamma"),
      fractions: z.number().int().min(2).max(5),
      /** shape of the distribution, 0.5 to 2.5; 1 is exponential */
      shape: z.number().min(0.5).max(2.5).default(1),
    })
    .strict(),
]);

/** What a regression may move, and nothing else. Factors multiply the heavy fractions' properties; 1 is untouched. */
export const tunableNames = [
  "heavyCriticalTemperatureFactor",
  "heavyCriticalPressureFactor",
  "heavyAcentricFactorFactor",
  "methaneHeavyInteractionFactor",
  "heavyVolumeShiftFactor",
] as const;
export const tunableNameSchema = z.enum(tunableNames);
export type TunableName = z.infer<typeof tunableNameSchema>;

/** How far a regression may move each adjustment, and how far one can be set. Common practice, no source. */
export const tuningBounds: Readonly<
  Record<TunableName, { readonly lowest: number; readonly highest: number }>
> = {
  heavyCriticalTemperatureFactor: { lowest: 0.85, highest: 1.15 },
  heavyCriticalPressureFactor: { lowest: 0.7, highest: 1.4 },
  heavyAcentricFactorFactor: { lowest: 0.7, highest: 1.4 },
  methaneHeavyInteractionFactor: { lowest: 0, highest: 4 },
  // It moves the density of the stock-tank liquid with it, so not far.
  heavyVolumeShiftFactor: { lowest: 0.5, highest: 1.5 },
};

function factorOf(name: TunableName) {
  const { lowest, highest } = tuningBounds[name];
  const message = `This factor lies between ${lowest} and ${highest}`;
  return z.number().min(lowest, message).max(highest, message);
}

export const adjustmentsSchema = z
  .object({
    heavyCriticalTemperatureFactor: factorOf("heavyCriticalTemperatureFactor"),
    heavyCriticalPressureFactor: factorOf("heavyCriticalPressureFactor"),
    heavyAcentricFactorFactor: factorOf("heavyAcentricFactorFactor"),
    methaneHeavyInteractionFactor: factorOf("methaneHeavyInteractionFactor"),
    heavyVolumeShiftFactor: factorOf("heavyVolumeShiftFactor"),
  })
  .strict();
export type Adjustments = z.infer<typeof adjustmentsSchema>;

export const untouched: Adjustments = {
  heavyCriticalTemperatureFactor: 1,
  heavyCriticalPressureFactor: 1,
  heavyAcentricFactorFactor: 1,
  methaneHeavyInteractionFactor: 1,
  heavyVolumeShiftFactor: 1,
};

/** A whole characterisation: with the adjustments all at 1 it is untuned, and marked so wherever it goes. */
export const characterisationSchema = z
  .object({
    split: heavySplitSchema,
    /** correlation of the heavy fractions' critical properties */
    criticals: z.enum(["keslerLee", "twu"]),
    adjustments: adjustmentsSchema,
  })
  .strict();
export type Characterisation = z.infer<typeof characterisationSchema>;

/** Whether anything was moved. Whether that makes it tuned is for `tuningStanding` to say. */
export const isAdjusted = ({ adjustments }: Pick<Characterisation, "adjustments">): boolean =>
  tunableNames.some((name) => adjustments[name] !== 1);
