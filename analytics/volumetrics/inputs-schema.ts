import { z } from "zod";
import { separatorTestSchema } from "../fluid/separator-test-schema";
import { recoveryPlanSchema } from "../recovery/recovery-plan-schema";
import { distributionSchema } from "../uncertainty/distribution-schema";

/** The ten uncertain inputs of an estimate, in the order in which screens list them and trials store them. */
export const inputNames = [
  "areaAcres",
  "netThicknessFt",
  "porosity",
  "waterSaturation",
  "pressurePsia",
  "temperatureDegF",
  "condensateYieldStbPerMmscf",
  "gasRecovery",
  "condensateRecovery",
  "salesGasFraction",
] as const;

export const inputNameSchema = z.enum(inputNames);
export type InputName = z.infer<typeof inputNameSchema>;

const uncertainInputSchema = z
  .object({
    distribution: distributionSchema,
    /** where the range comes from: a map, a log report, an analogue; what a reviewer will ask for */
    source: z.string().max(500).default(""),
    /** why this range and not another, in the expert's words */
    reason: z.string().max(2_000).optional(),
  })
  .strict();

/**
 * Everything an estimate is computed from. `condensateYieldStbPerMmscf` is stock-tank barrels per million scf of
 * total SURFACE gas (all stages), at 14.696 psia and 60 degF, never per wellstream. `gasRecovery` and
 * `condensateRecovery` are fractions of the dry gas and condensate in place; `salesGasFraction` is what is left of
 * recovered surface gas after fuel, flare and plant shrinkage.
 */
export const estimateInputsSchema = z
  .object({
    schemaVersion: z.literal(1),
    uncertain: z.record(inputNameSchema, uncertainInputSchema),
    /** rank correlations between pairs of inputs; pairs that are not listed are independent */
    correlations: z.array(
      z
        .object({ a: inputNameSchema, b: inputNameSchema, rank: z.number().min(-1).max(1) })
        .strict(),
    ),
    /** the separator test the fluid's properties come from, copied in so that a later edit of the sample changes nothing */
    fluid: separatorTestSchema,
    /** depth of the reservoir, ft subsea or below mudline; only for warnings about gradients */
    depthFt: z.number().positive().nullable(),
    /**
     * how recoveries follow from the fluid; with one, the gas and condensate recovery of every trial are worked out and
     * the two inputs of those names, with their correlations, are not looked at. Inputs stored before plans have none
     */
    recoveryPlan: recoveryPlanSchema.nullable().default(null),
  })
  .strict();

export type EstimateInputs = z.infer<typeof estimateInputsSchema>;
