import { z } from "zod";
import { reportedStreamSchema } from "../composition/composition-schema";
import {
  reservoirPressureSchema,
  reservoirTemperatureSchema,
} from "../fluid/reservoir-state-schema";

/** One pressure step. `null` where the laboratory did not report. */
export const depletionRowSchema = z
  .object({
    pressurePsia: reservoirPressureSchema,
    /** retrograde liquid, per cent of the cell's volume at the dew point */
    liquidPercent: z.number().nullable(),
    /** produced wellstream so far, mole per cent of the fluid at the dew point */
    cumulativeProducedMolePercent: z.number().nullable(),
    /** of the produced (equilibrium) gas */
    gasZ: z.number().nullable(),
    twoPhaseZ: z.number().nullable(),
    viscosityCp: z.number().nullable(),
    /** the gas produced in this step, mole per cent as reported */
    producedGas: reportedStreamSchema.nullable(),
  })
  .strict();
export type DepletionRow = z.infer<typeof depletionRowSchema>;

/**
 * A constant-volume depletion study, from the laboratory or simulated. Rows run from the dew point (first row, nothing
 * produced, no liquid) to the lowest pressure. Values are as reported: the checks judge them, the schema only says what
 * can be stored.
 */
export const depletionTableSchema = z
  .object({
    temperatureDegF: reservoirTemperatureSchema,
    dewPointPsia: reservoirPressureSchema,
    rows: z.array(depletionRowSchema).min(2).max(40),
  })
  .strict();
export type DepletionTable = z.infer<typeof depletionTableSchema>;
