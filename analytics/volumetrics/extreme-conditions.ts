import type { Warning } from "../warnings";

/** Where high-pressure, high-temperature practice begins, and where US offshore rules define it (30 CFR 250.804). */
const HIGH = { pressurePsia: 10_000, temperatureDegF: 300 } as const;
const DEFINED = { pressurePsia: 15_000, temperatureDegF: 350 } as const;

/**
 * A caution about a reservoir's pressure and temperature where people and equipment are at risk from them.
 *
 * @param state  psia and degF
 * @param lead   what the state is, such as "P10 is"
 * @returns  nothing below 10,000 psia and 300 degF
 */
export function extremeConditionWarnings(
  { pressurePsia, temperatureDegF }: { pressurePsia: number; temperatureDegF: number },
  lead: string,
): Warning[] {
  if (pressurePsia < HIGH.pressurePsia && temperatureDegF < HIGH.temperatureDegF) return [];
  const defined = pressurePsia > DEFINED.pressurePsia || temperatureDegF > DEFINED.temperatureDegF;
  return [
    {
      code: "high_pressure_high_temperature",
      severity: "caution",
      input:
        pressurePsia >= HIGH.pressurePsia ? "uncertain.pressurePsia" : "uncertain.temperatureDegF",
      message:
        `${lead} ${figure(pressurePsia)} psia and ${figure(temperatureDegF)} °F: ` +
        (defined
          ? "a high-pressure, high-temperature reservoir (above 15,000 psia or 350 °F). Wells and equipment need that rating."
          : "approaching high-pressure, high-temperature conditions (from 10,000 psia or 300 °F). Check the rating of wells and equipment."),
    },
  ];
}

const FIGURE = new Intl.NumberFormat("en-GB", { maximumSignificantDigits: 3 });
const figure = (value: number) => FIGURE.format(value);
