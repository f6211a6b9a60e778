import { reportingUnits } from "@/analytics/units/reporting-units";
import type { Range, SimulationSummary } from "@/analytics/volumetrics/results-schema";
import { scaled, type ResultBasis } from "@/components/estimate/result-rows";

export interface DerivedRow {
  label: string;
  unit: string;
  range: Range;
}

/** What follows from the inputs on the way to the volumes. Yields in the unit of the basis, rock figures per acre-foot. */
export function derivedRows(summary: SimulationSummary, basis: ResultBasis): DerivedRow[] {
  const { derived } = summary;
  const { condensateYield } = reportingUnits(basis.units, basis.base);
  return [
    { label: "Deviation factor z", unit: "", range: derived.zFactor },
    {
      label: "Gas volume factor",
      unit: "cf/scf",
      range: derived.gasFormationVolumeFactorCfPerScf,
    },
    { label: "Wellstream gravity", unit: "air = 1", range: derived.wellstreamGravity },
    {
      label: "Surface gas in the wellstream",
      unit: "by mole",
      range: derived.dryGasFraction,
    },
    {
      label: "Condensate per wellstream",
      unit: condensateYield.unit,
      range: scaled(derived.condensateYieldStbPerMmscfWellstream, condensateYield.factor),
    },
    ...(summary.recovery
      ? [
          {
            label: "Gas recovery, worked out",
            unit: "of dry gas in place",
            range: summary.inputs.gasRecovery,
          },
          {
            label: "Condensate recovery, worked out",
            unit: "of condensate in place",
            range: summary.inputs.condensateRecovery,
          },
        ]
      : []),
    {
      label: "Wet gas per rock",
      unit: "Mscf/acre-ft",
      range: scaled(derived.wetGasPerAcreFootScf, 1e-3),
    },
    {
      label: "Condensate per rock",
      unit: "STB/acre-ft",
      range: derived.condensatePerAcreFootStb,
    },
  ];
}
