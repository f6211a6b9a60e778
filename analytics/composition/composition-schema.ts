import { z } from "zod";

/** Components that a laboratory reports one by one, in the order of a sheet. C6 is the hexanes fraction. */
export const lightComponents = [
  "H2S",
  "CO2",
  "N2",
  "C1",
  "C2",
  "C3",
  "iC4",
  "nC4",
  "iC5",
  "nC5",
  "C6",
] as const;
export type LightComponent = (typeof lightComponents)[number];

const molePercent = z.number().min(0).max(100);

/** What is left after the last fraction that was reported alone: heptanes plus of a C7+ sheet, C30+ of a C30+ sheet. */
export const plusFractionSchema = z
  .object({
    /** 7 for heptanes plus; up to 36 */
    carbonNumber: z.number().int().min(7).max(36),
    molePercent,
    /** lb/lbmol */
    molecularWeight: z.number().positive(),
    /** at 60 degF, water = 1 */
    specificGravity: z.number().positive(),
  })
  .strict();

/**
 * One stream as the laboratory reported it, in mole per cent, before anything is normalised. Components that the sheet
 * leaves out count as zero. `carbonNumbers` are single carbon number fractions (C7, C8, …) of an extended analysis; they
 * run without a gap from 7 to the one before the plus fraction, and are empty on a C7+ sheet.
 */
export const reportedStreamSchema = z
  .object({
    light: z.partialRecord(z.enum(lightComponents), molePercent),
    carbonNumbers: z
      .array(z.object({ carbonNumber: z.number().int().min(7).max(35), molePercent }).strict())
      .max(29)
      .default([]),
    /** `null` for a gas without heptanes plus */
    plus: plusFractionSchema.nullable(),
  })
  .strict();
export type ReportedStream = z.infer<typeof reportedStreamSchema>;

/**
 * A composition sheet: the wellstream itself, or the separator's gas and liquid with the ratio at which they were
 * measured.
 */
export const compositionSheetSchema = z.discriminatedUnion("kind", [
  z.object({ kind: z.literal("wellstream"), stream: reportedStreamSchema }).strict(),
  z
    .object({
      kind: z.literal("separatorStreams"),
      gas: reportedStreamSchema,
      liquid: reportedStreamSchema,
      /** separator gas per barrel of SEPARATOR liquid (not stock-tank), at `basePressurePsia` and 60 degF */
      gasLiquidRatioScfPerSeparatorBarrel: z.number().positive(),
      /** of the separator liquid at separator conditions */
      liquidDensityLbPerCubicFoot: z.number().positive(),
      basePressurePsia: z.number().positive(),
    })
    .strict(),
]);
export type CompositionSheet = z.infer<typeof compositionSheetSchema>;

const stagePressure = "A separator's pressure lies between 14.65 and 3,000 psia";
const stageTemperature = "A separator's temperature lies between 30 and 200 °F";

/**
 * One stage of the separators, in the direction of flow; the last one is the stock tank. It can be what a stage of a
 * separator test can be.
 */
export const separatorStageSchema = z
  .object({
    pressurePsia: z.number().min(14.65, stagePressure).max(3000, stagePressure),
    temperatureDegF: z.number().min(30, stageTemperature).max(200, stageTemperature),
  })
  .strict();
export const separatorStagesSchema = z.array(separatorStageSchema).min(1).max(6);
export type SeparatorStage = z.infer<typeof separatorStageSchema>;
