import { z } from "zod";
import {
  compositionSheetSchema,
  separatorStagesSchema,
} from "@/analytics/composition/composition-schema";
import { depletionTableSchema } from "@/analytics/depletion/depletion-table-schema";
import { findingSchema } from "@/analytics/depletion/finding-schema";
import { tuningRecordSchema } from "@/analytics/depletion/tuning-record";
import {
  characterisationSchema,
  tunableNameSchema,
} from "@/analytics/equation-of-state/characterisation-schema";
import {
  reservoirPressureSchema,
  reservoirTemperatureSchema,
} from "@/analytics/fluid/reservoir-state-schema";
import { separatorTestSchema } from "@/analytics/fluid/separator-test-schema";
import { recoveryCurveSchema } from "@/analytics/recovery/recovery-curve-schema";
import { warningSchema } from "@/analytics/warnings";

/**
 * Stateless calculations on compositions: nothing is stored. Gas volumes are scf at 14.696 psia and 60 degF, condensate
 * STB, fractions run from 0 to 1 unless a name says percent.
 */

const reservoirState = z
  .object({ pressurePsia: reservoirPressureSchema, temperatureDegF: reservoirTemperatureSchema })
  .strict();

// composition: a sheet normalised, with what follows from it without an equation of state

export const compositionRequestSchema = z
  .object({
    sheet: compositionSheetSchema,
    reservoir: reservoirState.nullable().default(null),
    /** to set its wellstream gravity beside the composition's */
    separatorTest: separatorTestSchema.nullable().default(null),
  })
  .strict();
export type CompositionRequest = z.infer<typeof compositionRequestSchema>;

const namedFractionSchema = z.object({ name: z.string(), moleFraction: z.number() });

export const compositionResponseSchema = z.object({
  /** sum of the sheet as reported; null when two streams were recombined (each stream's sum is in `normalised`) */
  normalised: z.array(
    z.object({
      stream: z.enum(["wellstream", "gas", "liquid"]),
      reportedTotalMolePercent: z.number(),
      /** every reported figure was multiplied by this; 1 when nothing was done */
      factor: z.number(),
    }),
  ),
  components: z.array(
    z.object({
      name: z.string(),
      /** `null` for recombined streams */
      reportedMolePercent: z.number().nullable(),
      moleFraction: z.number(),
      molecularWeight: z.number(),
    }),
  ),
  heptanesPlus: z
    .object({
      moleFraction: z.number(),
      molecularWeight: z.number(),
      specificGravity: z.number(),
    })
    .nullable(),
  molecularWeight: z.number(),
  gravity: z.number(),
  gravityFromSeparatorTest: z.number().nullable(),
  fluidType: z.object({
    type: z.string(),
    label: z.string(),
    /** the rule that decided, in words with the figure */
    rule: z.string(),
    source: z.string(),
  }),
  zFactors: z
    .object({
      fromComposition: z.number(),
      compositionMethod: z.string(),
      /** Kay's rule with Wichert–Aziz, as a second opinion */
      fromKay: z.number(),
      fromGravity: z.number(),
      gravityMethod: z.string(),
      /** composition less gravity, over gravity */
      relativeDifference: z.number(),
    })
    .nullable(),
  dewPointEstimates: z.array(
    z.object({
      method: z.enum(["nemethKennedy", "elsharkawy"]),
      label: z.string(),
      source: z.string(),
      dewPointPsia: z.number(),
      /** stated average error of the method */
      statedErrorFraction: z.number(),
      warnings: z.array(warningSchema),
    }),
  ),
  warnings: z.array(warningSchema),
});
export type CompositionResponse = z.infer<typeof compositionResponseSchema>;

/** The `record` of a tuning and the table it was fitted to: without them, adjustments do not count as tuned. */
export const tunedBy = {
  tuning: tuningRecordSchema.nullable().default(null),
  table: depletionTableSchema.nullable().default(null),
};

// equation of state: phase behaviour, separators and simulated depletion of a characterised fluid

export const equationOfStateRequestSchema = z
  .object({
    sheet: compositionSheetSchema,
    characterisation: characterisationSchema,
    temperatureDegF: reservoirTemperatureSchema,
    measuredDewPointPsia: reservoirPressureSchema.nullable().default(null),
    stages: separatorStagesSchema,
    /** steps of the simulated depletion; null chooses ten from the dew point down */
    depletionPressuresPsia: z.array(reservoirPressureSchema).max(40).nullable().default(null),
    ...tunedBy,
  })
  .strict();
export type EquationOfStateRequest = z.infer<typeof equationOfStateRequestSchema>;

const envelopePointSchema = z.object({ temperatureDegF: z.number(), pressurePsia: z.number() });

export const heatingValueSchema = z.object({
  /** ideal gas, 14.696 psia and 60 degF */
  grossIdealBtuPerScf: z.number(),
  grossRealBtuPerScf: z.number(),
  netRealBtuPerScf: z.number(),
  wobbeRealBtuPerScf: z.number(),
  compressionFactor: z.number(),
  relativeDensity: z.number(),
  warnings: z.array(warningSchema),
});

export const surfaceGasSchema = z.object({
  gravity: z.number(),
  components: z.array(namedFractionSchema),
  heatingValue: heatingValueSchema,
  /** liquid content, gallons per thousand scf */
  plantLiquids: z.array(z.object({ name: z.string(), gallonsPerMscf: z.number() })),
});

export const separatorTrainSchema = z.object({
  stages: z.array(
    z.object({
      pressurePsia: z.number(),
      temperatureDegF: z.number(),
      gasScfPerStb: z.number(),
      /** air = 1; null when the stage gives no gas */
      gasGravity: z.number().nullable(),
      /** barrels of the stage's liquid per stock-tank barrel */
      liquidVolumeFactor: z.number(),
    }),
  ),
  condensateApi: z.number(),
  condensateMolecularWeight: z.number(),
  totalGasScfPerStb: z.number(),
  condensateYieldStbPerMmscf: z.number(),
  condensateYieldStbPerMmscfWellstream: z.number(),
  /** gas of all stages together */
  surfaceGas: surfaceGasSchema,
  /** the same as a separator sheet, for two or three stages; null for other numbers of stages */
  separatorTest: separatorTestSchema.nullable(),
});

export const equationOfStateResponseSchema = z.object({
  components: z.array(
    z.object({
      name: z.string(),
      moleFraction: z.number(),
      molecularWeight: z.number(),
      criticalTemperatureDegR: z.number(),
      criticalPressurePsia: z.number(),
      acentricFactor: z.number(),
    }),
  ),
  isTuned: z.boolean(),
  saturation: z.object({
    /** at reservoir temperature; null above the cricondentherm */
    upperPsia: z.number().nullable(),
    kind: z.enum(["dewPoint", "bubblePoint", "none"]),
    lowerDewPointPsia: z.number().nullable(),
    measuredPsia: z.number().nullable(),
    /** computed less measured */
    mismatchPsia: z.number().nullable(),
  }),
  envelope: z.object({
    bubble: z.array(envelopePointSchema),
    dew: z.array(envelopePointSchema),
    critical: envelopePointSchema.nullable(),
    cricondentherm: envelopePointSchema.nullable(),
    cricondenbar: envelopePointSchema.nullable(),
    /** lines of equal liquid share by volume */
    quality: z.array(
      z.object({ liquidVolumeFraction: z.number(), points: z.array(envelopePointSchema) }),
    ),
  }),
  /** null for a fluid that leaves no liquid in the stock tank, or gives no gas; the warnings say which */
  train: separatorTrainSchema.nullable(),
  /** null when there is no dew point at this temperature */
  depletion: depletionTableSchema.nullable(),
  curve: recoveryCurveSchema.nullable(),
  warnings: z.array(warningSchema),
});
export type EquationOfStateResponse = z.infer<typeof equationOfStateResponseSchema>;

// depletion: a laboratory's table checked, and what it brings to the surface

export const depletionRequestSchema = z
  .object({
    sheet: compositionSheetSchema,
    table: depletionTableSchema,
    stages: separatorStagesSchema,
    /** flashes the produced gas through the separators */
    characterisation: characterisationSchema,
  })
  .strict();
export type DepletionRequest = z.infer<typeof depletionRequestSchema>;

export const depletionResponseSchema = z.object({
  findings: z.array(findingSchema),
  rows: z.array(
    z.object({
      pressurePsia: z.number(),
      liquidPercent: z.number().nullable(),
      cumulativeProducedMolePercent: z.number().nullable(),
      gasZ: z.number().nullable(),
      reportedTwoPhaseZ: z.number().nullable(),
      /** from gas z and moles left */
      computedTwoPhaseZ: z.number().nullable(),
      /** cumulative, per MMscf of wellstream at the dew point */
      condensateStb: z.number().nullable(),
      surfaceGasMscf: z.number().nullable(),
      producingYieldStbPerMmscf: z.number().nullable(),
      /** heptanes plus in the produced gas, mole per cent */
      heptanesPlusMolePercent: z.number().nullable(),
    }),
  ),
  hoffmann: z.array(
    z.object({
      pressurePsia: z.number(),
      points: z.array(
        z.object({
          name: z.string(),
          characterisationFactor: z.number(),
          logKTimesPressure: z.number(),
        }),
      ),
      slope: z.number(),
      intercept: z.number(),
      rSquared: z.number(),
    }),
  ),
  /** null when the table cannot carry one; the findings say why. Checks that failed are its `doubts` */
  curve: recoveryCurveSchema.nullable(),
  /** how the streams were separated: by the equation of state, or by Standing's K values where that gave no answer */
  method: z.enum(["equationOfState", "kValues"]),
  warnings: z.array(warningSchema),
});
export type DepletionResponse = z.infer<typeof depletionResponseSchema>;

// tuning

export const tuningRequestSchema = z
  .object({
    sheet: compositionSheetSchema,
    characterisation: characterisationSchema,
    table: depletionTableSchema,
    /** what may move; nothing else does */
    tunables: z.array(tunableNameSchema).min(1).max(5),
  })
  .strict();
export type TuningRequest = z.infer<typeof tuningRequestSchema>;

const fitSchema = z.object({
  dewPointPsia: z.number().nullable(),
  rows: z.array(
    z.object({
      pressurePsia: z.number(),
      liquidPercent: z.number().nullable(),
      cumulativeProducedMolePercent: z.number().nullable(),
    }),
  ),
  /** weighted sum of squares that was minimised */
  objective: z.number(),
  averageLiquidErrorPoints: z.number().nullable(),
});

export const tuningResponseSchema = z.object({
  characterisation: characterisationSchema,
  /** to keep with the characterisation: what it was fitted to and by how much it misses */
  record: tuningRecordSchema,
  before: fitSchema,
  after: fitSchema,
  changes: z.array(
    z.object({
      name: tunableNameSchema,
      from: z.number(),
      to: z.number(),
      atBound: z.boolean(),
    }),
  ),
  iterations: z.number().int(),
  warnings: z.array(warningSchema),
});
export type TuningResponse = z.infer<typeof tuningResponseSchema>;

// lab sheet: a laboratory's CSV read, cell by cell

/** Many times what a laboratory's study fills. */
export const LONGEST_LAB_SHEET = 200_000;

export const labSheetRequestSchema = z
  .object({
    text: z.string().max(LONGEST_LAB_SHEET, {
      error: `A sheet of more than ${LONGEST_LAB_SHEET / 1000} thousand characters is not read. Send only the sheet with the study.`,
    }),
  })
  .strict();
export type LabSheetRequest = z.infer<typeof labSheetRequestSchema>;

export const labSheetResponseSchema = z.object({
  /** what was found in the file; null when it holds none */
  composition: compositionSheetSchema.nullable(),
  depletion: depletionTableSchema.nullable(),
  stages: separatorStagesSchema.nullable(),
  separatorTest: separatorTestSchema.nullable(),
  /** what was read with which unit, in words */
  read: z.array(z.string()),
  problems: z.array(
    z.object({
      line: z.number().int(),
      column: z.number().int().nullable(),
      value: z.string(),
      /** where the figure belongs in what was read, such as `depletion.rows.3.gasZ`; absent when it has no place */
      place: z.string().nullable().optional(),
      /** why it was not read, and what was done: a cell left empty, a row left out */
      message: z.string(),
    }),
  ),
});
export type LabSheetResponse = z.infer<typeof labSheetResponseSchema>;
