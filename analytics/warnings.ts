import { z } from "zod";

/**
 * Something a reviewer would ask about: outside the usual range, or a method used where it is known to be poor.
 * A warning flags; it never blocks and never changes a number.
 */
export const warningSchema = z.object({
  /** stable, for tests and for grouping, such as `unusual_value`, `z_low_reduced_temperature`, `sour_gas` */
  code: z.string(),
  /** `caution` where people can get hurt (H2S, high pressure and temperature); `warning` otherwise */
  severity: z.enum(["warning", "caution"]),
  /** path of the input it is about, such as `uncertain.porosity` or `fluid.condensateApi` */
  input: z.string().optional(),
  /** one or two sentences with the figures in them */
  message: z.string(),
});

export type Warning = z.infer<typeof warningSchema>;
