import { fluidTypeLabels } from "@/analytics/fluid/fluid-type";
import type { WellstreamResponse } from "@/app/api/v1/calculations/schema";
import { Figure } from "@/components/ui/figure";
import { formatFigure, formatPercent, MISSING } from "@/components/ui/format";
import { Unit } from "@/components/ui/text";
import type { Finding } from "./finding-list";

export interface ReservoirState {
  pressurePsia: number;
  temperatureDegF: number;
}

/** The figures a fluid is known by, large. */
export function FluidKeyFigures({
  wellstream,
  dewPointPsia,
  reservoir,
}: {
  wellstream: WellstreamResponse;
  dewPointPsia: number | null;
  reservoir: ReservoirState | null;
}) {
  const { atReservoir } = wellstream;
  const margin = dewPointPsia !== null && reservoir ? reservoir.pressurePsia - dewPointPsia : null;
  const figures = [
    {
      name: "Condensate yield",
      value: wellstream.condensateYieldStbPerMmscf,
      unit: "STB/MMscf surface gas",
      note: `${formatFigure(wellstream.condensateYieldStbPerMmscfWellstream)} per MMscf of wellstream`,
    },
    {
      name: "Wellstream gravity",
      value: wellstream.wellstreamGravity,
      unit: "air = 1",
      note: `${formatFigure(wellstream.wellstreamMolecularWeight)} lb/lbmol`,
    },
    {
      name: "Surface gas fraction",
      value: wellstream.dryGasFraction,
      unit: "",
      note: "of the wellstream, by mole",
    },
    {
      name: "Dew point",
      value: dewPointPsia,
      unit: dewPointPsia === null ? "" : "psia",
      note:
        margin === null
          ? dewPointPsia === null
            ? "not measured"
            : "at reservoir temperature"
          : `${formatFigure(Math.abs(margin))} psi ${margin >= 0 ? "below" : "above"} the initial pressure`,
    },
    {
      name: "z at the reservoir",
      value: atReservoir?.zFactor ?? null,
      unit: "",
      note: atReservoir
        ? `Bg ${formatFigure(atReservoir.formationVolumeFactorCfPerScf)} cf/scf`
        : "needs pressure and temperature",
    },
  ];
  return (
    <dl className="key-figures">
      {figures.map(({ name, value, unit, note }) => (
        <div key={name}>
          <dt>{name}</dt>
          <dd>
            {value === null ? MISSING : <Figure value={value} />} {unit && <Unit>{unit}</Unit>}
          </dd>
          <dd>{note}</dd>
        </div>
      ))}
    </dl>
  );
}

const streams: Record<WellstreamResponse["balance"][number]["stream"], string> = {
  primary_separator: "First separator gas",
  second_separator: "Second separator gas",
  stock_tank: "Stock-tank gas",
  unmeasured: "Unmeasured gas, estimated",
  condensate: "Condensate, as vapour",
};

/** Where the moles of one stock-tank barrel's wellstream come from. */
export function BalanceTable({ wellstream }: { wellstream: WellstreamResponse }) {
  return (
    <table className="ledger-table">
      <caption className="sr-only">Mole balance of one stock-tank barrel</caption>
      <thead>
        <tr>
          <th scope="col">Stream</th>
          <th scope="col" className="right">
            scf/STB
          </th>
          <th scope="col" className="right">
            Gravity
          </th>
          <th scope="col" className="right">
            Share
          </th>
          <th scope="col" className="w-[26%]">
            <span className="sr-only">Share, drawn</span>
          </th>
        </tr>
      </thead>
      <tbody>
        {wellstream.balance.map(({ stream, scfPerStb, gravity, moleShare }) => (
          <tr key={stream}>
            <th scope="row" className="wrap plain">
              {streams[stream]}
            </th>
            <td className="right">
              <Figure value={scfPerStb} digits={4} />
            </td>
            <td className="right">
              <Figure value={gravity} />
            </td>
            <td className="right">{formatPercent(moleShare, { decimals: 1 })}</td>
            <td>
              <i
                className="balance-bar"
                data-stream={stream}
                style={{ width: `${(moleShare * 100).toFixed(2)}%` }}
              />
            </td>
          </tr>
        ))}
        <tr className="total">
          <th scope="row">Wellstream</th>
          <td className="right">
            <Figure value={wellstream.wellstreamScfPerStb} digits={4} />
          </td>
          <td className="right">
            <Figure value={wellstream.wellstreamGravity} />
          </td>
          <td className="right">
            {formatPercent(
              wellstream.balance.reduce((sum, { moleShare }) => sum + moleShare, 0),
              { decimals: 1 },
            )}
          </td>
          <td />
        </tr>
      </tbody>
    </table>
  );
}

/** Figures of the gas, for those who check. */
export function GasTable({
  wellstream,
  fluidType,
}: {
  wellstream: WellstreamResponse;
  /** absent: by the gas-oil ratio */
  fluidType?: { label: string; rule: string } | null;
}) {
  const { pseudocritical, atReservoir } = wellstream;
  const rows = [
    {
      label: "Fluid type",
      text: fluidType?.label ?? fluidTypeLabels[wellstream.fluidType],
      note: fluidType?.rule,
    },
    {
      label: "Condensate molecular weight",
      value: wellstream.condensateMolecularWeight,
      unit: wellstream.condensateMolecularWeightMethod === "laboratory" ? "laboratory" : "Cragoe",
    },
    { label: "Vapour equivalent", value: wellstream.vapourEquivalentScfPerStb, unit: "scf/STB" },
    { label: "Gas of all stages", value: wellstream.surfaceGasOilRatioScfPerStb, unit: "scf/STB" },
    { label: "Gravity of all surface gas", value: wellstream.surfaceGasGravity, unit: "air = 1" },
    { label: "Pseudocritical temperature", value: pseudocritical.temperatureDegR, unit: "°R" },
    { label: "Pseudocritical pressure", value: pseudocritical.pressurePsia, unit: "psia" },
    { label: "Reduced pressure", value: atReservoir?.reducedPressure, unit: "" },
    { label: "Reduced temperature", value: atReservoir?.reducedTemperature, unit: "" },
    {
      label: "Gas density in the reservoir",
      value: atReservoir?.densityLbPerCubicFoot,
      unit: "lb/cf",
    },
    { label: "Gas viscosity in the reservoir", value: atReservoir?.viscosityCp, unit: "cp" },
  ];
  return (
    <table className="ledger-table">
      <caption className="sr-only">Properties of the wellstream</caption>
      <tbody>
        {rows.map(({ label, value, unit, text, note }) => (
          <tr key={label}>
            <th scope="row" className={note ? "plain wrap" : "plain"}>
              {label} {unit && <Unit>{unit}</Unit>}
              {note && <small className="block text-ink-soft">{note}</small>}
            </th>
            <td className="right">{text ?? <Figure value={value} digits={4} />}</td>
          </tr>
        ))}
      </tbody>
    </table>
  );
}

/** What can be said for and against the sample, from what was computed. */
export function fluidFindings(
  wellstream: WellstreamResponse,
  dewPointPsia: number | null,
  reservoir: ReservoirState | null,
): Finding[] {
  const findings: Finding[] = [];
  if (wellstream.unmeasuredVapourScfPerStb === null) {
    findings.push({
      tone: "done",
      title: "Every stage was measured",
      text: "The balance of moles and mass is exact.",
    });
  } else {
    findings.push({
      tone: "warning",
      title: "Low-pressure gas was not measured",
      text: `Estimated at ${formatFigure(wellstream.unmeasuredVapourScfPerStb)} scf/STB by the correlation of Gold, McCain and Jennings (1989).`,
    });
  }
  findings.push(
    wellstream.condensateMolecularWeightMethod === "laboratory"
      ? {
          tone: "done",
          title: "Molecular weight from the laboratory",
          text: `${formatFigure(wellstream.condensateMolecularWeight)} lb/lbmol`,
        }
      : {
          tone: "warning",
          title: "Molecular weight of the condensate not measured",
          text: `${formatFigure(wellstream.condensateMolecularWeight)} lb/lbmol from its gravity by Cragoe (1929).`,
        },
  );
  if (dewPointPsia !== null && reservoir) {
    const isAbove = reservoir.pressurePsia >= dewPointPsia;
    findings.push({
      tone: isAbove ? "done" : "warning",
      title: isAbove ? "One gas phase at initial pressure" : "Two phases at initial pressure",
      text: `Dew point ${formatFigure(dewPointPsia, { digits: 4 })} psia, initial pressure ${formatFigure(reservoir.pressurePsia, { digits: 4 })} psia (P50).`,
    });
  }
  const told = new Set(["saturated_fluid"]);
  for (const { code, severity, message } of wellstream.warnings) {
    if (told.has(code)) continue;
    findings.push({
      tone: severity === "caution" ? "caution" : "warning",
      text:
        code === "sour_gas"
          ? `${message} A competent person plans entry, equipment and monitoring under local rules.`
          : message,
    });
  }
  return findings;
}
