import { z } from "zod";

/** Where gas condensates are found, with room to spare: common practice, no source. */
export const possibleTemperature = { lowest: 60, highest: 500 } as const;
export const HIGHEST_PRESSURE_PSIA = 25_000;

const { lowest, highest } = possibleTemperature;
const temperature = `A reservoir's temperature lies between ${lowest} and ${highest} °F`;

/** degF */
export const reservoirTemperatureSchema = z
  .number()
  .min(lowest, temperature)
  .max(highest, temperature);

/** psia */
export const reservoirPressureSchema = z
  .number()
  .positive("A pressure is above zero")
  .max(HIGHEST_PRESSURE_PSIA, `A reservoir's pressure is at most ${HIGHEST_PRESSURE_PSIA} psia`);
