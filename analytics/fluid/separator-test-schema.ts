import { z } from "zod";

const positive = z.number().positive();
const fraction = z.number().min(0).max(1);

/** Gas leaving one stage. `null` where the laboratory or the field did not measure it. */
const measuredGas = z
  .object({ gasOilRatioScfPerStb: z.number().nonnegative(), gasGravity: positive })
  .strict()
  .nullable();

/**
 * A separator test as a laboratory or a well-test crew reports it: two stages (separator and stock tank) or three
 * (two separators and stock tank). All gas volumes are per STOCK-TANK barrel, at `basePressurePsia` and 60 degF.
 */
export const separatorTestSchema = z
  .object({
    /** pressure base at which the gas volumes below were reported, psia; 14.696 unless the sheet says otherwise */
    basePressurePsia: positive,
    primarySeparator: z
      .object({
        pressurePsia: positive,
        temperatureDegF: z.number(),
        gasOilRatioScfPerStb: positive,
        gasGravity: positive,
      })
      .strict(),
    /** only in a three-stage test */
    secondSeparator: z
      .object({ pressurePsia: positive, temperatureDegF: z.number(), gas: measuredGas })
      .strict()
      .nullable(),
    /** vapour of the stock tank; `null` when it was vented unmeasured and must be estimated */
    stockTankGas: measuredGas,
    condensateApi: z.number(),
    /** laboratory value, lb/lbmol; `null` lets the correlation of Cragoe estimate it */
    condensateMolecularWeight: positive.nullable(),
    /** mole fractions of the wellstream */
    nitrogen: fraction,
    carbonDioxide: fraction,
    hydrogenSulphide: fraction,
    /** measured dew point at reservoir temperature, psia; `null` when not measured */
    dewPointPsia: positive.nullable(),
  })
  .strict();

export type SeparatorTest = z.infer<typeof separatorTestSchema>;
