"use client";

import { useState } from "react";
import { errorWords } from "@/app/_client/request";
import type { NearWellRequest } from "@/app/api/v1/calculations/recovery-schema";
import {
  nearWellFields,
  readNearWell,
  startingNearWell,
  type NearWellField,
} from "@/components/recovery/near-well-text";
import { Disclosure } from "@/components/ui/dialog";
import { NumberField } from "@/components/ui/field";
import { formatFigure, formatPercent } from "@/components/ui/format";
import { FindingList } from "@/components/estimate/finding-list";
import { Section } from "@/components/ui/section";
import { Notice, Skeleton } from "@/components/ui/status";
import { FigureCell, LedgerTable } from "@/components/ui/table";
import { Flag } from "@/components/ui/text";
import { useNearWell } from "../_queries/recovery";

const about: Record<NearWellField, { label: string; unit?: string; hint?: string }> = {
  reservoirPressurePsia: { label: "Reservoir pressure", unit: "psia" },
  flowingPressurePsia: { label: "Flowing pressure", unit: "psia" },
  gasExponent: { label: "Corey exponent, gas", hint: "Usual 2 to 3" },
  condensateExponent: { label: "Corey exponent, liquid", hint: "Usual 2 to 4" },
  criticalCondensateSaturation: { label: "Critical saturation", hint: "Usual 0.1 to 0.2" },
  residualGasSaturation: { label: "Residual gas", hint: "fraction" },
};

export interface NearWellSectionProps {
  fluid: Pick<NearWellRequest, "sheet" | "characterisation" | "tuning" | "table">;
  temperatureDegF: number;
  dewPointPsia: number;
  /** P50 of the estimate */
  initialPsia: number;
}

/** How much of its rate a well loses to the liquid around it: one moment, assumed relative permeabilities. */
export function NearWellSection(props: NearWellSectionProps) {
  return (
    <Section
      level={3}
      title="What a well loses to the liquid around it"
      note="An estimate for one moment, by two-phase pseudopressure (Fevang and Whitson 1996). It is in none of the figures above."
    >
      <Disclosure label="Estimate it">
        <NearWell {...props} />
      </Disclosure>
    </Section>
  );
}

function NearWell({ fluid, temperatureDegF, dewPointPsia, initialPsia }: NearWellSectionProps) {
  const [text, setText] = useState(() => startingNearWell(dewPointPsia, initialPsia));
  const { fields, asked } = readNearWell(text);
  const query = useNearWell(asked && { ...fluid, temperatureDegF, ...asked });
  const result = query.error ? null : (query.data ?? null);
  return (
    <div className="grid gap-4 pt-3">
      <div className="plan-fields">
        {nearWellFields.map((name) => (
          <NumberField
            key={name}
            className="plan-field"
            label={about[name].label}
            unit={about[name].unit}
            hint={about[name].hint}
            error={fields[name].problem ?? undefined}
            preview={fields[name].preview}
            value={text[name]}
            onChange={(event) => setText({ ...text, [name]: event.target.value })}
          />
        ))}
      </div>
      <p className="text-12 text-ink-soft">
        Relative permeabilities to start from are common practice without a source. High rates near
        the well can win some of the loss back; that is not counted.
      </p>
      {query.error && (
        <Notice tone="error" live={false} title="The estimate could not be made.">
          {errorWords(query.error)}
        </Notice>
      )}
      {!result && query.isFetching && <Skeleton lines={4} label="Integrating the pseudopressure" />}
      {result && (
        <div className="grid gap-3" data-stale={query.isPlaceholderData || undefined}>
          <h4 className="flex flex-wrap items-center gap-2 font-semibold">
            <span>
              About {formatPercent(result.productivityRatio)} of the rate without liquid is left at
              this drawdown
            </span>
            {result.warnings.some(({ code }) => code === "untuned_equation_of_state") && (
              <Flag>Untuned equation of state</Flag>
            )}
          </h4>
          <LedgerTable caption="Along the drawdown" maxHeight="320px">
            <thead>
              <tr>
                {["Pressure, psia", "Liquid in the pores", "Gas krg", "Gas, cp", "Liquid, cp"].map(
                  (heading) => (
                    <th key={heading} scope="col" className="right">
                      {heading}
                    </th>
                  ),
                )}
              </tr>
            </thead>
            <tbody>
              {result.points.map((point, index) => (
                // The dew point stands twice: on either side of it the gas is another.
                <tr key={index}>
                  <th scope="row" className="plain right">
                    {formatFigure(point.pressurePsia, { decimals: 0 })}
                  </th>
                  <td className="right">
                    {formatPercent(point.liquidSaturation, { decimals: 1 })}
                  </td>
                  <FigureCell value={point.gasRelativePermeability} />
                  <FigureCell value={point.gasViscosityCp} />
                  <FigureCell value={point.condensateViscosityCp} />
                </tr>
              ))}
            </tbody>
          </LedgerTable>
          {result.warnings.length > 0 && (
            <FindingList
              findings={result.warnings.map(({ severity, message }) => ({
                tone: severity === "caution" ? "caution" : "warning",
                text: message,
              }))}
            />
          )}
        </div>
      )}
    </div>
  );
}
