"use client";

import { useState } from "react";
import { fromCanonical } from "@/analytics/units/conversions";
import { parseQuantity } from "@/analytics/units/parse-quantity";
import { wellstreamRates } from "@/analytics/volumetrics/rates";
import type { WellstreamResponse } from "@/app/api/v1/calculations/schema";
import { NumberField } from "@/components/ui/field";
import { Figure } from "@/components/ui/figure";
import { formatFigure } from "@/components/ui/format";
import { Section } from "@/components/ui/section";
import { Unit } from "@/components/ui/text";

/** What a day at the first separator's meter takes out of the reservoir. */
export function DailyRates({ wellstream }: { wellstream: WellstreamResponse }) {
  const [text, setText] = useState("");
  const { atReservoir } = wellstream;
  if (!atReservoir) return null;
  const typed = text.trim() === "" ? null : parseQuantity(text, "gasRate", "MMscf/d");
  const rates = typed?.ok
    ? wellstreamRates(
        { stream: "primary-separator-gas", scfPerDay: typed.value },
        wellstream,
        atReservoir.formationVolumeFactorCfPerScf,
      )
    : null;
  const inMmscf = (scfPerDay: number) => fromCanonical(scfPerDay, "gasRate", "MMscf/d");
  const rows = rates && [
    { label: "Gas of all stages", value: inMmscf(rates.surfaceGasScfPerDay), unit: "MMscf/d" },
    { label: "Condensate", value: rates.condensateStbPerDay, unit: "STB/d" },
    { label: "Wet gas", value: inMmscf(rates.wetGasScfPerDay), unit: "MMscf/d" },
    { label: "Reservoir voidage", value: rates.voidageRbPerDay, unit: "rb/d" },
  ];
  return (
    <Section
      title={
        rates
          ? `Each day ${formatFigure(rates.voidageRbPerDay)} barrels leave the reservoir`
          : "What does a day’s rate take out of the reservoir?"
      }
      note="From the first separator’s meter, while the reservoir gives the wellstream that was tested: above the dew point."
    >
      <NumberField
        className="mb-3 w-60 max-w-full"
        label="First separator gas"
        unit="MMscf/d"
        value={text}
        error={typed && !typed.ok ? typed.reason : undefined}
        onChange={(event) => setText(event.target.value)}
      />
      {rows && (
        <table className="ledger-table">
          <caption className="sr-only">Streams of one day</caption>
          <tbody>
            {rows.map(({ label, value, unit }) => (
              <tr key={label}>
                <th scope="row" className="plain">
                  {label} <Unit>{unit}</Unit>
                </th>
                <td className="right">
                  <Figure value={value} />
                </td>
              </tr>
            ))}
          </tbody>
        </table>
      )}
    </Section>
  );
}
